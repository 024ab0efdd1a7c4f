import { assertNumber } from '../numerics/assert-number.ts';
import { selfDampingPower, type SelfDampingLaw } from '../self-damping/self-damping-law.ts';
import { amplitudeLimitRatio, type WindPowerCurve } from '../wind/wind-power-curve.ts';
import { windPower, type WindPowerState } from '../wind/wind-power.ts';

/** A span with one amplitude along its whole length. */
export interface ClassicalSpan {
  readonly wind: Omit<WindPowerState, 'amplitudeRatio'>;
  readonly curve: WindPowerCurve;
  readonly selfDamping: SelfDampingLaw;
  readonly lengthM: number;
  readonly impedanceNsPerM: number;
  /** Inverse standing wave ratio of each end. */
  readonly endIswRatios: readonly number[];
}

/** Amplitude of the classical balance. */
export type ClassicalAmplitude =
  | { readonly outcome: 'steady'; readonly amplitudeRatio: number }
  | { readonly outcome: 'quiet' }
  | { readonly outcome: 'amplitude-limit'; readonly amplitudeRatio: number };

const smallestRatio = 1e-6;
const stepLimitCount = 200;

/**
 * Amplitude at which wind power equals self-damping and end losses when it is the same along the whole span:
 * L·P_wind = L·P_self + Σ S·½Z₀ω²A².
 *
 * @param span wind, curve, self-damping law, length [m], impedance [N·s/m], S of each end 0 to 1
 * @returns A/D zero to peak at the antinode [ratio], or why there is none
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: energy principle published; the limit of the travelling-wave balance for weak ends
 * @validity S ≪ 1, so that the amplitude is nearly the same everywhere
 * @accuracy 1e-15 relative for the stated equation
 */
export function classicalBalance(span: ClassicalSpan): ClassicalAmplitude {
  assertNumber('lengthM', span.lengthM, { above: 0 });
  assertNumber('impedanceNsPerM', span.impedanceNsPerM, { above: 0 });
  span.endIswRatios.forEach((ratio, index) => assertNumber(`endIswRatios[${index}]`, ratio, { atLeast: 0, atMost: 1 }));
  const { frequencyHz, diameterM } = span.wind;
  const iswSum = span.endIswRatios.reduce((sum, ratio) => sum + ratio, 0);
  const endFactor = 0.5 * span.impedanceNsPerM * (2 * Math.PI * frequencyHz * diameterM) ** 2 * iswSum;
  const surplus = (x: number) =>
    windPower(span.curve, { ...span.wind, amplitudeRatio: x }) -
    selfDampingPower(span.selfDamping, { frequencyHz, xRatio: x }) -
    (endFactor * x * x) / span.lengthM;
  if (surplus(smallestRatio) <= 0) return { outcome: 'quiet' };
  if (surplus(amplitudeLimitRatio) > 0) return { outcome: 'amplitude-limit', amplitudeRatio: amplitudeLimitRatio };
  let lower = smallestRatio;
  let upper: number = amplitudeLimitRatio;
  for (let step = 0; step < stepLimitCount && upper - lower > Number.EPSILON * upper; step += 1) {
    const middle = Math.sqrt(lower * upper);
    if (surplus(middle) > 0) lower = middle;
    else upper = middle;
  }
  return { outcome: 'steady', amplitudeRatio: upper };
}
