import { assertNumber } from '../numerics/assert-number.ts';
import {
  amplitudeLimitRatio,
  windPiece,
  windPieceIndex,
  windPieceValue,
  type WindPowerCurve,
} from './wind-power-curve.ts';

/** Air density at which wind power curves are stated. @source common practice: 15 °C at sea level */
export const referenceDensityKgPerM3 = 1.225;

/** A wire that vibrates in a wind. */
export interface WindPowerState {
  readonly frequencyHz: number;
  readonly diameterM: number;
  /** A/D, zero to peak at the antinode. */
  readonly amplitudeRatio: number;
  readonly densityKgPerM3: number;
  /** Reduction by turbulence, 1 in smooth flow. */
  readonly turbulenceFactorRatio: number;
}

/**
 * Wind power per metre, (ρ/1.225)·f³·D⁴·fnc(A/D)·q.
 *
 * @param curve reduced wind power curve
 * @param state f [Hz] > 0, D [m] > 0, A/D 0 to 0.5, ρ [kg/m³] > 0, q 0 to 1
 * @returns power, scalar [W/m]
 * @throws EngineInputError if an input is outside its bounds; the curve is never evaluated above A/D 0.5
 * @source that of the curve; similarity f³D⁴ closed form
 * @validity that of the curve
 * @accuracy that of the curve
 */
export function windPower(curve: WindPowerCurve, state: WindPowerState): number {
  assertNumber('frequencyHz', state.frequencyHz, { above: 0 });
  assertNumber('diameterM', state.diameterM, { above: 0 });
  assertNumber('amplitudeRatio', state.amplitudeRatio, { atLeast: 0, atMost: amplitudeLimitRatio });
  assertNumber('densityKgPerM3', state.densityKgPerM3, { above: 0 });
  assertNumber('turbulenceFactorRatio', state.turbulenceFactorRatio, { atLeast: 0, atMost: 1 });
  const x = state.amplitudeRatio;
  const reduced = windPieceValue(windPiece(curve, windPieceIndex(curve, x)), x);
  const density = state.densityKgPerM3 / referenceDensityKgPerM3;
  return density * state.turbulenceFactorRatio * state.frequencyHz ** 3 * state.diameterM ** 4 * reduced;
}

/**
 * Amplitude over diameter at which a cubic reduced wind power curve is largest.
 *
 * @param coefs constant to cubic term; the cubic term below 0
 * @returns x, scalar [ratio]
 * @throws EngineInputError if the cubic term is not below 0
 * @source closed form: larger root of the derivative
 * @validity the fit must not be used beyond
 * @accuracy rounding
 */
export function cubicPeakRatio(coefs: readonly [number, number, number, number]): number {
  const [, c1, c2, c3] = coefs;
  assertNumber('coefs[3]', c3, { below: 0 });
  return (-c2 - Math.sqrt(c2 * c2 - 3 * c3 * c1)) / (3 * c3);
}
