import { amplitudeLimitRatio } from '../wind/wind-power-curve.ts';
import type { BalanceSolver } from './span-balance.ts';
import { amplitudeRatioAt, spanEnergy, spanPlace, type SpanEnergy } from './span-place.ts';
import type { EndPair, SpanOutcome, SpanRow } from './span-row.ts';
import type { SpanSetup } from './span-setup.ts';
import { solveSweep } from './solve-sweep.ts';
import { outcomeOf, type EndResponses, type SpanSweep } from './sweep-span.ts';

type RowPowers = Pick<
  SpanRow,
  'midAmplitudeM' | 'windPowerW' | 'selfDampingPowerW' | 'endPowerW' | 'energyClosureRatio'
>;

const noPowers = (midAmplitudeM: number | null, powerW: number | null): RowPowers => ({
  midAmplitudeM,
  windPowerW: powerW,
  selfDampingPowerW: powerW,
  endPowerW: [powerW, powerW],
  energyClosureRatio: powerW,
});

function steadyPowers(setup: SpanSetup, solver: BalanceSolver, energy: SpanEnergy): RowPowers {
  const middle = spanPlace(solver, energy.layout, setup.lengthM / 2);
  return {
    midAmplitudeM: amplitudeRatioAt(solver, middle) * setup.wire.diameterM,
    windPowerW: energy.windW,
    selfDampingPowerW: energy.selfDampingW,
    endPowerW: [energy.leftW, energy.rightW],
    energyClosureRatio: energy.closureRatio,
  };
}

function powersOf(setup: SpanSetup, solver: BalanceSolver, outcome: SpanOutcome): RowPowers {
  switch (outcome) {
    case 'steady':
      return steadyPowers(setup, solver, spanEnergy(solver));
    case 'quiet':
      return noPowers(0, 0);
    case 'amplitude-limit':
      return noPowers(amplitudeLimitRatio * setup.wire.diameterM, null);
    case 'no-damper-data':
      return noPowers(null, null);
  }
}

/** Half the outer strand's diameter times curvature per antinode amplitude times amplitude. */
function strains(
  setup: SpanSetup,
  responses: EndResponses,
  at: { index: number; amplitudesM: EndPair<number> | null },
) {
  const radiusM = setup.wire.outerStrandDiameterM / 2;
  const strainAt = (side: 0 | 1, curvatures: Float64Array) =>
    at.amplitudesM === null ? null : radiusM * (curvatures[at.index] as number) * at.amplitudesM[side];
  const damperStrains = (side: 0 | 1) => responses[side].damperCurvaturePerM2.map((series) => strainAt(side, series));
  const clamp: EndPair<number | null> = [
    strainAt(0, responses[0].clampCurvaturePerM2),
    strainAt(1, responses[1].clampCurvaturePerM2),
  ];
  const damper: EndPair<(number | null)[]> = [damperStrains(0), damperStrains(1)];
  return { clampStrainRatio: clamp, damperClampStrainRatio: damper };
}

/**
 * Full rows of the energy balance of a span: amplitudes, reflections, strains and powers at each frequency.
 *
 * @param setup         checked span with its methods
 * @param frequenciesHz f, [n] [Hz], each > 0, in any order
 * @returns rows [n] in the order of the frequencies, and the sweep they come from
 * @source closed form on the chosen methods
 * @validity see solveSpanBalance and clampResponse
 * @accuracy see solveSpanBalance and clampResponse
 */
export function spanRows(setup: SpanSetup, frequenciesHz: Float64Array): { rows: SpanRow[]; sweep: SpanSweep } {
  const powers: RowPowers[] = [];
  const sweep = solveSweep(setup, frequenciesHz, (index, solver, outcome) => {
    powers[index] = powersOf(setup, solver, outcome);
  });
  const { responses } = sweep;
  const rows = powers.map((power, index): SpanRow => {
    const outcome = outcomeOf(sweep.outcomeCodes[index] as number);
    const reflection = (side: 0 | 1) =>
      responses[side].hasData[index] === 0 ? null : (responses[side].reflectionRatio[index] as number);
    const amplitudesM: EndPair<number> | null =
      outcome === 'no-damper-data'
        ? null
        : [sweep.endAmplitudesM[0][index] as number, sweep.endAmplitudesM[1][index] as number];
    return {
      frequencyHz: frequenciesHz[index] as number,
      windSpeedMPerS: sweep.windSpeedsMPerS[index] as number,
      outcome,
      endAmplitudeM: amplitudesM ?? [null, null],
      endReflectionRatio: [reflection(0), reflection(1)],
      ...strains(setup, responses, { index, amplitudesM }),
      ...power,
    };
  });
  return { rows, sweep };
}
