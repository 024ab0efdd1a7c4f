import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { BalanceSolver } from '../span/span-balance.ts';
import { amplitudeRatioAt, fluxAt, spanEnergy, spanPlace } from '../span/span-place.ts';
import type { SpanOutcome } from '../span/span-row.ts';
import type { SpanWireCase, SpanWireProfile, VibrationBasis } from './span-wire-assessment.ts';
import { caseSetup, sweepAt } from './wind-sweep.ts';

/** Where a profile is wanted. */
export interface ProfileRequest {
  readonly frequencyHz: number;
  /** Number of points from end to end; 121 when left out. */
  readonly pointCount?: number | undefined;
}

const defaultPointCount = 121;
const frequencyLimits = { above: 0, atMost: 1000 } as const;
const pointLimits = { atLeast: 2, atMost: 10_000 } as const;

/** Fills amplitudes and fluxes at the positions from a solved span. */
function fill(profile: SpanWireProfile, solver: BalanceSolver, diameterM: number): void {
  const { layout } = spanEnergy(solver);
  for (const positionM of profile.positionsM) {
    const place = spanPlace(solver, layout, positionM);
    profile.amplitudesM.push(amplitudeRatioAt(solver, place) * diameterM);
    profile.fluxesW.push(fluxAt(solver, place));
  }
}

/**
 * Antinode amplitude and net energy flux along the span at one frequency.
 *
 * @param input case of one span wire
 * @param basis methods of the balance
 * @param request.frequencyHz f, scalar [Hz], 0 to 1000
 * @param request.pointCount  number of points, whole number, 2 to 10 000
 * @returns positions from the left end [m], amplitudes [m] and fluxes towards the right end [W]; empty unless steady
 * @throws EngineInputError naming the field for input that cannot be
 * @source closed form on the chosen methods
 * @validity see solveSpanBalance
 * @accuracy 1e-9 of the amplitude
 */
export function spanWireProfile(input: SpanWireCase, basis: VibrationBasis, request: ProfileRequest): SpanWireProfile {
  const pointCount = request.pointCount ?? defaultPointCount;
  assertNumber('frequencyHz', request.frequencyHz, frequencyLimits);
  assertNumber('pointCount', pointCount, pointLimits);
  if (!Number.isInteger(pointCount)) throw new EngineInputError('pointCount', 'must be a whole number');
  const setup = caseSetup(input, basis);
  const profile: SpanWireProfile = {
    outcome: 'quiet',
    frequencyHz: request.frequencyHz,
    positionsM: [],
    amplitudesM: [],
    fluxesW: [],
  };
  sweepAt(setup, Float64Array.of(request.frequencyHz), (_, solver, outcome: SpanOutcome) => {
    profile.outcome = outcome;
    if (outcome !== 'steady') return;
    const step = setup.lengthM / (pointCount - 1);
    profile.positionsM = Array.from({ length: pointCount }, (_point, index) => index * step);
    fill(profile, solver, setup.wire.diameterM);
  });
  return profile;
}
