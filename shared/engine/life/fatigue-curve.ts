/** A fatigue line in two branches, stress σ = level·N^exponent on each, zero to peak. */
export interface FatigueCurve {
  readonly lowLevelPa: number;
  readonly lowExponentNumber: number;
  readonly highLevelPa: number;
  readonly highExponentNumber: number;
  readonly breakCount: number;
}

/**
 * Safe border lines by kind of conductor.
 * @source from memory: CIGRE (Electra 63, 1979; TB 332), not read; the pairing of the break points is the self-consistent one
 */
export const safeBorderLines = {
  'multi-layer': {
    lowLevelPa: 450e6,
    lowExponentNumber: -0.2,
    highLevelPa: 263e6,
    highExponentNumber: -0.168,
    breakCount: 2e7,
  },
  'single-layer': {
    lowLevelPa: 730e6,
    lowExponentNumber: -0.2,
    highLevelPa: 430e6,
    highExponentNumber: -0.168,
    breakCount: 1.56e7,
  },
} as const satisfies Record<string, FatigueCurve>;

/**
 * Stress that the fatigue line allows for a number of cycles.
 *
 * @param curve      line
 * @param cycleCount N, scalar, > 0
 * @returns σ, scalar [Pa], zero to peak
 * @source closed form on the line's constants
 * @validity 1e5 to 1e9 cycles
 * @accuracy rounding
 */
export function fatigueStress(curve: FatigueCurve, cycleCount: number): number {
  return cycleCount < curve.breakCount
    ? curve.lowLevelPa * cycleCount ** curve.lowExponentNumber
    : curve.highLevelPa * cycleCount ** curve.highExponentNumber;
}

/**
 * Cycles that the fatigue line allows at a stress: the first branch where it gives less than the break, else the second.
 *
 * @param curve    line
 * @param stressPa σ, scalar [Pa], > 0, zero to peak
 * @returns N, scalar [number]
 * @source closed form on the line's constants
 * @validity 1e5 to 1e9 cycles; carried on beyond, without an endurance limit
 * @accuracy rounding
 */
export function fatigueCycles(curve: FatigueCurve, stressPa: number): number {
  const low = (stressPa / curve.lowLevelPa) ** (1 / curve.lowExponentNumber);
  return low < curve.breakCount ? low : (stressPa / curve.highLevelPa) ** (1 / curve.highExponentNumber);
}

/**
 * Cycles at which both branches give the same stress.
 *
 * @param curve line
 * @returns N, scalar [number]
 * @source closed form: (a₂/a₁)^(1/(b₁ − b₂))
 * @validity branches with different exponents
 * @accuracy rounding
 */
export function fatigueCrossing(curve: FatigueCurve): number {
  return (curve.highLevelPa / curve.lowLevelPa) ** (1 / (curve.lowExponentNumber - curve.highExponentNumber));
}
