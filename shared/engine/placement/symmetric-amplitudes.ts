import { balanceSolver, solveSpanBalance } from '../span/span-balance.ts';
import type { SpanSetup } from '../span/span-setup.ts';
import { balanceInputAt } from '../span/sweep-span.ts';
import type { WaveTable } from '../waves/wave-table.ts';

/** ln A against ln u for a span whose ends reflect alike, at each frequency; u = −½ln|Γ|. */
export interface SymmetricAmplitudes {
  readonly logAmplitudes: readonly Float64Array[];
}

const smallestLogU = Math.log(1e-6);
const largestLogU = Math.log(7);
const gridCount = 48;
const gridStep = (largestLogU - smallestLogU) / (gridCount - 1);
const floorAmplitudeM = 1e-12;

/**
 * Table of end amplitudes of a span with equal ends, so that a trial placement costs no balance.
 *
 * @param setup checked span; its own ends are not used
 * @param waves wave table at the frequencies of the search [n]
 * @returns ln A [n × 48]
 * @source closed form on the chosen methods, see solveSpanBalance
 * @validity both ends alike
 * @accuracy about 1 % between the grid's points; for ranking only
 */
export function symmetricAmplitudes(setup: SpanSetup, waves: WaveTable): SymmetricAmplitudes {
  const solver = balanceSolver(setup.methods.windCurve);
  const logAmplitudes = Array.from(waves.frequenciesHz, (_, index) => {
    const input = balanceInputAt(setup, waves, index);
    return Float64Array.from({ length: gridCount }, (_point, place) => {
      const ratio = Math.exp(-2 * Math.exp(smallestLogU + place * gridStep));
      input.leftReflectionRatio = ratio;
      input.rightReflectionRatio = ratio;
      const { leftAmplitudeRatio } = solveSpanBalance(solver, input);
      return Math.log(Math.max(leftAmplitudeRatio * setup.wire.diameterM, floorAmplitudeM));
    });
  });
  return { logAmplitudes };
}

/** Amplitude at both ends for a reflection, straight lines in log–log. */
export function symmetricAmplitude(table: SymmetricAmplitudes, index: number, reflectionRatio: number): number {
  const u = -0.5 * Math.log(Math.max(reflectionRatio, Number.MIN_VALUE));
  const at = (Math.log(Math.max(u, 1e-300)) - smallestLogU) / gridStep;
  const place = Math.min(Math.max(at, 0), gridCount - 1);
  const lower = Math.min(Math.floor(place), gridCount - 2);
  const values = table.logAmplitudes[index];
  const from = values?.[lower] ?? -Infinity;
  const to = values?.[lower + 1] ?? -Infinity;
  return Math.exp(from + (to - from) * (place - lower));
}
