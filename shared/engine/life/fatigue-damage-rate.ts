import { gaussLegendre } from '../numerics/gauss-legendre.ts';
import { fatigueCycles, type FatigueCurve } from './fatigue-curve.ts';

/** Damage of one cycle at a steady stress, or of one cycle on average. */
export type DamagePerCycle = (stressPa: number) => number;

/** The steady amplitude is taken as this percentile of the Rayleigh distribution. @source own model */
const steadyPercentileRatio = 0.99;
/** Rayleigh amplitudes beyond this many standard deviations are left out: their share is 2e−11. */
const rayleighLimitNumber = 7;
const rayleighRule = gaussLegendre(24);

/** Damage of a cycle at its own stress. */
export function steadyDamage(curve: FatigueCurve): DamagePerCycle {
  return (stressPa) => (stressPa > 0 ? 1 / fatigueCycles(curve, stressPa) : 0);
}

/**
 * Mean damage of a cycle when amplitudes follow Rayleigh's distribution and the steady amplitude is its 99th percentile.
 *
 * @param curve fatigue line
 * @returns damage per cycle against the steady stress [Pa], zero to peak
 * @source own model: narrow-band motion
 * @validity long spans in natural wind
 * @accuracy 1e-4 of the integral where the line bends, else better
 */
export function rayleighDamage(curve: FatigueCurve): DamagePerCycle {
  const deviation = 1 / Math.sqrt(-2 * Math.log(1 - steadyPercentileRatio));
  const parts = Array.from(rayleighRule.nodes, (node, index) => {
    const t = rayleighLimitNumber * node;
    const weight = rayleighLimitNumber * (rayleighRule.weights[index] as number) * t * Math.exp((-t * t) / 2);
    return { stressRatio: t * deviation, weight };
  });
  return (stressPa) => {
    if (stressPa <= 0) return 0;
    return parts.reduce((sum, part) => sum + part.weight / fatigueCycles(curve, stressPa * part.stressRatio), 0);
  };
}
