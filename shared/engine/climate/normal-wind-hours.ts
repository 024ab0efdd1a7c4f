import { assertWindClimate, type WindClimate } from './wind-climate.ts';

/** A year. @source closed form: 365.25 days */
export const hoursPerYearCount = 8766;

/** Below this share of the wind speed a sector counts as blowing along the span. */
const alongSpanRatio = 1e-9;

/**
 * Hours per year with the wind component normal to a span inside each bin of wind speed.
 *
 * @param climate    direction sectors with share, Weibull scale and shape
 * @param bearingRad bearing of the span, scalar [rad]
 * @param edgesMPerS edges of the bins, [n + 1] [m/s], rising, ≥ 0
 * @returns hours per year, [n]
 * @throws EngineInputError naming the sector
 * @source common practice: V|sin θ|, θ between the wind of the sector's middle and the span, excites it
 * @validity at least eight sectors, so that a sector's middle stands for its width
 * @accuracy that of the climate
 */
export function normalWindHours(climate: WindClimate, bearingRad: number, edgesMPerS: Float64Array): Float64Array {
  assertWindClimate(climate);
  const hours = new Float64Array(Math.max(edgesMPerS.length - 1, 0));
  for (const { directionRad, shareRatio, weibullScaleMPerS, weibullShapeNumber } of climate.sectors) {
    const normalRatio = Math.abs(Math.sin(directionRad - bearingRad));
    if (normalRatio < alongSpanRatio || shareRatio === 0) continue;
    const scale = weibullScaleMPerS * normalRatio;
    let before = Math.exp(-(((edgesMPerS[0] ?? 0) / scale) ** weibullShapeNumber));
    for (let bin = 0; bin < hours.length; bin += 1) {
      const after = Math.exp(-(((edgesMPerS[bin + 1] as number) / scale) ** weibullShapeNumber));
      hours[bin] = (hours[bin] as number) + hoursPerYearCount * shareRatio * (before - after);
      before = after;
    }
  }
  return hours;
}
