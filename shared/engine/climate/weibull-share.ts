import { gammaFunction } from '../numerics/gamma-function.ts';

/** Weibull distribution of wind speed. */
export interface WeibullWind {
  readonly scaleMPerS: number;
  readonly shapeNumber: number;
}

/**
 * Share of time with the wind speed between two values, exp(−(V₁/A)^k) − exp(−(V₂/A)^k).
 *
 * @param wind        A, scalar [m/s], > 0; k, scalar, > 0
 * @param lowerMPerS  V₁, scalar [m/s], ≥ 0
 * @param upperMPerS  V₂, scalar [m/s], ≥ V₁; Infinity allowed
 * @returns share, scalar [ratio]
 * @source closed form: Weibull's distribution
 * @validity that of the fit of the distribution
 * @accuracy rounding
 */
export function weibullShare(wind: WeibullWind, lowerMPerS: number, upperMPerS: number): number {
  const above = (speed: number) => Math.exp(-((speed / wind.scaleMPerS) ** wind.shapeNumber));
  return above(lowerMPerS) - above(upperMPerS);
}

/**
 * Mean of a Weibull distribution, A·Γ(1 + 1/k).
 *
 * @param wind A, scalar [m/s], > 0; k, scalar, > 0
 * @returns mean wind speed, scalar [m/s]
 * @source closed form
 * @validity that of the fit of the distribution
 * @accuracy 1e-14 relative
 */
export function weibullMean(wind: WeibullWind): number {
  return wind.scaleMPerS * gammaFunction(1 + 1 / wind.shapeNumber);
}
