import { normalWindHours } from '../climate/normal-wind-hours.ts';
import { safeBorderLines } from '../life/fatigue-curve.ts';
import { rayleighDamage, steadyDamage } from '../life/fatigue-damage-rate.ts';
import type { SpanSetup } from '../span/span-setup.ts';
import type { SpanSweep } from '../span/sweep-span.ts';
import type { FatigueLife, VibrationBasis } from './span-wire-assessment.ts';
import { stressPerCurvature, type StressPlace } from './stress-places.ts';

const secondsPerHour = 3600;
/** A life beyond this says no more than "no end in sight". @source own model */
const unlimitedYears = 100_000;

/** Edges between the wind speeds of a sweep; the outer two are the ends of the band. */
function binEdges(speedsMPerS: Float64Array): Float64Array {
  const count = speedsMPerS.length;
  const edges = new Float64Array(count + 1);
  for (let index = 0; index <= count; index += 1) {
    const before = speedsMPerS[Math.max(index - 1, 0)] as number;
    edges[index] = (before + (speedsMPerS[Math.min(index, count - 1)] as number)) / 2;
  }
  return edges;
}

/**
 * Fatigue life of the worst place of a span wire over the wind climate, by Miner's sum over wind-speed bins.
 *
 * @param setup checked span
 * @param sweep balance at the frequencies of the wind grid, with the places that bend
 * @param basis climate, fatigue line, life method; bearingRad of the span
 * @returns years and damage per year, unlimited, or no climate
 * @throws EngineInputError naming the climate's sector
 * @source common practice: n = f·t per bin, damage Σ n/N, life 1/D
 * @validity see the life method in the registry; frequencies without damper data add no damage
 * @accuracy that of climate and fatigue line; a factor of several
 */
export function fatigueLife(
  setup: SpanSetup,
  { sweep, places }: { readonly sweep: SpanSweep; readonly places: readonly StressPlace[] },
  { basis, bearingRad }: { readonly basis: VibrationBasis; readonly bearingRad: number },
): FatigueLife {
  if (basis.climate === null) return { outcome: 'no-climate' };
  const hours = normalWindHours(basis.climate, bearingRad, binEdges(sweep.windSpeedsMPerS));
  const curve = safeBorderLines[basis.fatigueCurve];
  const damageOf = setup.methods.lifeName === 'life-rayleigh' ? rayleighDamage(curve) : steadyDamage(curve);
  const factor = stressPerCurvature(setup);
  let damagePerYearRatio = 0;
  for (const { curvaturesPerM2, amplitudesM } of places) {
    let damage = 0;
    for (let index = 0; index < hours.length; index += 1) {
      const stressPa = factor * (curvaturesPerM2[index] as number) * (amplitudesM[index] as number);
      const cycles = (hours[index] as number) * secondsPerHour * (sweep.frequenciesHz[index] as number);
      if (cycles > 0) damage += cycles * damageOf(stressPa);
    }
    damagePerYearRatio = Math.max(damagePerYearRatio, damage);
  }
  if (damagePerYearRatio * unlimitedYears < 1) return { outcome: 'unlimited' };
  return { outcome: 'finite', years: 1 / damagePerYearRatio, damagePerYearRatio };
}
