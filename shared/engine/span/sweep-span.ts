import { respondEnd, type ImpedanceStore } from '../ends/respond-end.ts';
import { clampedWire } from '../ends/clamped-wire.ts';
import type { EndResponse } from '../ends/end-response.ts';
import { waveTable, type WaveTable } from '../waves/wave-table.ts';
import { referenceDensityKgPerM3 } from '../wind/wind-power.ts';
import { balanceSolver, solveSpanBalance, type BalanceInput, type BalanceSolver } from './span-balance.ts';
import type { EndPair, SpanOutcome } from './span-row.ts';
import type { SpanSetup } from './span-setup.ts';

/** Outcomes by the number that a sweep keeps for each. */
export const outcomeCodes = {
  steady: 0,
  quiet: 1,
  'amplitude-limit': 2,
  'no-damper-data': 3,
} as const satisfies Record<SpanOutcome, number>;
const outcomesByCode: readonly SpanOutcome[] = ['steady', 'quiet', 'amplitude-limit', 'no-damper-data'];

/** Outcome of a code. */
export const outcomeOf = (code: number): SpanOutcome => outcomesByCode[code] ?? 'no-damper-data';

/** Both ends' responses at the frequencies of a sweep. */
export type EndResponses = readonly [EndResponse, EndResponse];

/** Balance of a span at a list of frequencies, as plain arrays; amplitudes are 0 where there is none. */
export interface SpanSweep {
  readonly frequenciesHz: Float64Array;
  readonly windSpeedsMPerS: Float64Array;
  readonly outcomeCodes: Uint8Array;
  readonly endAmplitudesM: EndPair<Float64Array>;
  readonly responses: EndResponses;
  /** False if a damper's clamp velocity did not settle on its impedance tables. */
  readonly isSettled?: boolean;
}

/** Called after each solved frequency, with the solver still in that state. */
export type SweepVisitor = (index: number, solver: BalanceSolver, outcome: SpanOutcome) => void;

/**
 * Responses of both ends of a span at given frequencies.
 *
 * @param setup         checked span
 * @param frequenciesHz f, [n] [Hz], > 0
 * @param velocities    clamp velocities of the dampers of both ends, for models that depend on them
 * @returns wave table and both responses
 * @source closed form, see clampResponse
 * @validity see clampResponse
 * @accuracy see clampResponse
 */
export function respondEnds(
  setup: SpanSetup,
  frequenciesHz: Float64Array,
  velocities?: EndPair<Float64Array[]>,
): { waves: WaveTable; responses: EndResponses } {
  const bendingStiffnessNm2 = setup.wire.bendingStiffnessMinNm2;
  const wire = { massKgPerM: setup.wire.massKgPerM, tensionN: setup.tensionN, bendingStiffnessNm2 };
  const waves = waveTable(wire, frequenciesHz);
  const from = { wire, impedances: new Map() satisfies ImpedanceStore };
  const clamped = clampedWire(waves);
  const respond = (end: 0 | 1) => respondEnd(clamped, setup.ends[end], { ...from, velocities: velocities?.[end] });
  return { waves, responses: [respond(0), respond(1)] };
}

function balanceInput(setup: SpanSetup): BalanceInput {
  return {
    diameterM: setup.wire.diameterM,
    spanLengthM: setup.lengthM,
    dampingExponentNumber: setup.methods.selfDamping.amplitudeExponentNumber,
    impedanceNsPerM: 0,
    angularFrequencyRadPerS: 0,
    windScaleWPerM: 0,
    dampingScaleWPerM: 0,
    leftReflectionRatio: 1,
    rightReflectionRatio: 1,
  };
}

/** Wind power per metre at 1 Hz and fnc = 1. */
function windFactorOf({ wire, airDensityKgPerM3, methods }: SpanSetup): number {
  return (airDensityKgPerM3 / referenceDensityKgPerM3) * wire.diameterM ** 4 * methods.turbulenceFactorRatio;
}

/** What the balance needs at one frequency of a wave table; the reflections are left at 1. */
export function balanceInputAt(setup: SpanSetup, waves: WaveTable, index: number): BalanceInput {
  const input = balanceInput(setup);
  setFrequency(input, { setup, waves, index, windFactor: windFactorOf(setup) });
  return input;
}

function setFrequency(
  input: BalanceInput,
  at: { readonly setup: SpanSetup; readonly waves: WaveTable; readonly index: number; readonly windFactor: number },
): void {
  const { waves, index } = at;
  const { factor, frequencyExponentNumber } = at.setup.methods.selfDamping;
  const f = waves.frequenciesHz[index] as number;
  input.impedanceNsPerM = waves.impedancesNsPerM[index] as number;
  input.angularFrequencyRadPerS = waves.angularFrequenciesRadPerS[index] as number;
  input.windScaleWPerM = at.windFactor * f * f * f;
  input.dampingScaleWPerM = factor * Math.exp(frequencyExponentNumber * Math.log(f));
}

/**
 * Steady vibration of a span at each of a list of frequencies.
 *
 * @param setup checked span with its methods
 * @param from.waves, from.responses as `respondEnds` gives them
 * @param visit called per frequency for energies and profiles
 * @returns outcome and end amplitudes per frequency
 * @source closed form on the chosen methods, see solveSpanBalance
 * @validity see solveSpanBalance; one frequency at a time
 * @accuracy see solveSpanBalance
 */
export function sweepSpan(
  setup: SpanSetup,
  from: { readonly waves: WaveTable; readonly responses: EndResponses },
  visit?: SweepVisitor,
): SpanSweep {
  const { waves, responses } = from;
  const { methods, wire } = setup;
  const count = waves.frequenciesHz.length;
  const sweep: SpanSweep = {
    frequenciesHz: waves.frequenciesHz,
    windSpeedsMPerS: waves.frequenciesHz.map((f) => (f * wire.diameterM) / methods.strouhalNumber),
    outcomeCodes: new Uint8Array(count),
    endAmplitudesM: [new Float64Array(count), new Float64Array(count)],
    responses,
  };
  const solver = balanceSolver(methods.windCurve);
  const input = balanceInput(setup);
  const at = { setup, waves, index: 0, windFactor: windFactorOf(setup) };
  for (let index = 0; index < count; index += 1) {
    if (responses[0].hasData[index] === 0 || responses[1].hasData[index] === 0) {
      sweep.outcomeCodes[index] = outcomeCodes['no-damper-data'];
      visit?.(index, solver, 'no-damper-data');
      continue;
    }
    at.index = index;
    setFrequency(input, at);
    input.leftReflectionRatio = responses[0].reflectionRatio[index] as number;
    input.rightReflectionRatio = responses[1].reflectionRatio[index] as number;
    const { outcome, leftAmplitudeRatio, rightAmplitudeRatio } = solveSpanBalance(solver, input);
    sweep.outcomeCodes[index] = outcomeCodes[outcome];
    sweep.endAmplitudesM[0][index] = leftAmplitudeRatio * wire.diameterM;
    sweep.endAmplitudesM[1][index] = rightAmplitudeRatio * wire.diameterM;
    visit?.(index, solver, outcome);
  }
  return sweep;
}
