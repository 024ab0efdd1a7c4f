import { hoursPerYearCount } from './normal-wind-hours.ts';
import { weibullShare, type WeibullWind } from './weibull-share.ts';

const secondsPerHour = 3600;

/**
 * Cycles per year in a bin of wind speed, all wind normal to the span.
 *
 * @param wind            Weibull distribution
 * @param bin.lowerMPerS  V₁, bin.upperMPerS V₂, scalars [m/s]
 * @param bin.frequencyHz f at the middle of the bin, scalar [Hz]
 * @returns cycles, scalar [number]
 * @source closed form: hours of the bin times frequency; a year of 8766 h
 * @validity one frequency stands for the bin
 * @accuracy that of the distribution
 */
export function yearlyCycles(
  wind: WeibullWind,
  bin: { readonly lowerMPerS: number; readonly upperMPerS: number; readonly frequencyHz: number },
): number {
  return weibullShare(wind, bin.lowerMPerS, bin.upperMPerS) * hoursPerYearCount * secondsPerHour * bin.frequencyHz;
}
