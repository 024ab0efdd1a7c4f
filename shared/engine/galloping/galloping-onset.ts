import { assertNumber } from '../numerics/assert-number.ts';

/** An iced wire in steady wind, one vertical freedom. */
export interface IcedWire {
  readonly massKgPerM: number;
  readonly frequencyHz: number;
  readonly dampingRatio: number;
  readonly airDensityKgPerM3: number;
  /** The length the coefficients are referred to. */
  readonly referenceLengthM: number;
  /** Slope of the lift coefficient per radian of angle of attack. */
  readonly liftSlopeCoef: number;
  readonly dragCoef: number;
}

/** Wind speed from which the wire gallops, or that it does not by this mechanism. */
export type GallopingOnset =
  | { readonly outcome: 'unstable'; readonly windSpeedMPerS: number; readonly denHartogCoef: number }
  | { readonly outcome: 'stable'; readonly denHartogCoef: number };

/**
 * Den Hartog sum, dC_L/dα + C_D; below 0 the section can gallop.
 *
 * @param liftSlopeCoef dC_L/dα, scalar [per radian]; a slope per degree must be converted first
 * @param dragCoef      C_D, scalar, ≥ 0
 * @returns sum, scalar [per radian]
 * @throws EngineInputError if an input is outside its bounds
 * @source published: J. P. Den Hartog, Transmission line vibration due to sleet, AIEE Trans. 51 (1932)
 *   1074-1076; read second-hand
 * @validity quasi-steady flow, small motion, no twist, wind square to the span
 * @accuracy rounding
 */
export function denHartogSum(liftSlopeCoef: number, dragCoef: number): number {
  assertNumber('liftSlopeCoef', liftSlopeCoef);
  assertNumber('dragCoef', dragCoef, { atLeast: 0 });
  return liftSlopeCoef + dragCoef;
}

/**
 * Wind speed at which vertical galloping starts, 4mωζ/(ρd|D|).
 *
 * @param wire mass m [kg/m] > 0, frequency [Hz] > 0, damping ζ [ratio of critical] ≥ 0, air density ρ
 *   [kg/m³] > 0, reference length d [m] > 0, lift slope [per radian], drag coefficient ≥ 0
 * @returns unstable with the onset speed [m/s], or stable; both with the Den Hartog sum D
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: 2mζω + ½ρVdD = 0; some printed forms have 2 in place of 4, which fails the energy balance
 * @validity reduced speed V/(fd) well above 20, small motion, no twist
 * @accuracy rounding
 */
export function gallopingOnset(wire: IcedWire): GallopingOnset {
  assertNumber('massKgPerM', wire.massKgPerM, { above: 0 });
  assertNumber('frequencyHz', wire.frequencyHz, { above: 0 });
  assertNumber('dampingRatio', wire.dampingRatio, { atLeast: 0 });
  assertNumber('airDensityKgPerM3', wire.airDensityKgPerM3, { above: 0 });
  assertNumber('referenceLengthM', wire.referenceLengthM, { above: 0 });
  const denHartogCoef = denHartogSum(wire.liftSlopeCoef, wire.dragCoef);
  if (denHartogCoef >= 0) return { outcome: 'stable', denHartogCoef };
  const damping = 4 * wire.massKgPerM * 2 * Math.PI * wire.frequencyHz * wire.dampingRatio;
  const push = wire.airDensityKgPerM3 * wire.referenceLengthM * -denHartogCoef;
  return { outcome: 'unstable', windSpeedMPerS: damping / push, denHartogCoef };
}
