import { fatigueCycles, type FatigueCurve } from './fatigue-curve.ts';

/** Cycles in a year at a stress. */
export interface StressBin {
  readonly stressPa: number;
  readonly cyclesPerYearCount: number;
}

/**
 * Damage of a year by Miner's sum, Σ n/N.
 *
 * @param curve fatigue line
 * @param bins  stresses [Pa] zero to peak, ≥ 0, and cycles per year, ≥ 0
 * @returns damage per year, scalar [ratio]; life in years is its inverse
 * @source common practice: Palmgren and Miner; failure at a sum of 1
 * @validity independent of the order of loads
 * @accuracy sums at failure of 0.3 to 3 are reported
 */
export function minerDamage(curve: FatigueCurve, bins: readonly StressBin[]): number {
  return bins.reduce(
    (sum, bin) => (bin.stressPa > 0 ? sum + bin.cyclesPerYearCount / fatigueCycles(curve, bin.stressPa) : sum),
    0,
  );
}
