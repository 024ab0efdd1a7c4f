import type { WindClimate } from '../climate/wind-climate.ts';
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

/** Damage of one place in one bin of wind speed. */
export interface FatigueBin {
  readonly windSpeedMPerS: number;
  readonly frequencyHz: number;
  readonly hoursPerYearCount: number;
  readonly cyclesPerYearCount: number;
  readonly stressPa: number;
  readonly damagePerYearRatio: number;
}

/** Damage of the worst place of a span wire, bin by bin. */
export interface FatigueDamage {
  readonly place: StressPlace | null;
  readonly bins: readonly FatigueBin[];
  readonly damagePerYearRatio: number;
}

/** Life of a yearly damage. */
export function lifeOfDamage(damagePerYearRatio: number): FatigueLife {
  if (damagePerYearRatio * unlimitedYears < 1) return { outcome: 'unlimited' };
  return { outcome: 'finite', years: 1 / damagePerYearRatio, damagePerYearRatio };
}

/**
 * Yearly fatigue damage of the worst place of a span wire over a wind climate, by Miner's sum over wind-speed bins.
 *
 * @param setup checked span
 * @param swept balance at the frequencies of the wind grid, with the places that bend
 * @param at.climate direction sectors, at.fatigueCurve line, at.bearingRad of the span
 * @returns the worst place, its bins and its damage per year
 * @throws EngineInputError naming the climate's sector
 * @source common practice: n = f·t per bin, damage Σ n/N
 * @validity see the life method in the registry; frequencies without damper data add no damage
 * @accuracy that of climate and fatigue line; a factor of several
 */
export function fatigueDamage(
  setup: SpanSetup,
  { sweep, places }: { readonly sweep: SpanSweep; readonly places: readonly StressPlace[] },
  at: {
    readonly climate: WindClimate;
    readonly fatigueCurve: keyof typeof safeBorderLines;
    readonly bearingRad: number;
  },
): FatigueDamage {
  const hours = normalWindHours(at.climate, at.bearingRad, binEdges(sweep.windSpeedsMPerS));
  const curve = safeBorderLines[at.fatigueCurve];
  const damageOf = setup.methods.lifeName === 'life-rayleigh' ? rayleighDamage(curve) : steadyDamage(curve);
  const factor = stressPerCurvature(setup);
  const binsOf = ({ curvaturesPerM2, amplitudesM }: StressPlace) =>
    Array.from(hours, (hoursPerYearCount, index): FatigueBin => {
      const frequencyHz = sweep.frequenciesHz[index] as number;
      const stressPa = factor * (curvaturesPerM2[index] as number) * (amplitudesM[index] as number);
      const cyclesPerYearCount = hoursPerYearCount * secondsPerHour * frequencyHz;
      const damagePerYearRatio = cyclesPerYearCount > 0 ? cyclesPerYearCount * damageOf(stressPa) : 0;
      const windSpeedMPerS = sweep.windSpeedsMPerS[index] as number;
      return { windSpeedMPerS, frequencyHz, hoursPerYearCount, cyclesPerYearCount, stressPa, damagePerYearRatio };
    });
  let worst: FatigueDamage = { place: null, bins: [], damagePerYearRatio: 0 };
  for (const place of places) {
    const bins = binsOf(place);
    const damagePerYearRatio = bins.reduce((sum, bin) => sum + bin.damagePerYearRatio, 0);
    if (worst.place === null || damagePerYearRatio > worst.damagePerYearRatio)
      worst = { place, bins, damagePerYearRatio };
  }
  return worst;
}

/**
 * Fatigue life of a span wire under a basis: years, unlimited, or no climate.
 *
 * @param setup checked span
 * @param swept balance at the frequencies of the wind grid, with the places that bend
 * @param at.basis climate, fatigue line and life method; at.bearingRad of the span
 * @returns life
 * @throws EngineInputError naming the climate's sector
 * @source common practice, see fatigueDamage
 * @validity see fatigueDamage
 * @accuracy see fatigueDamage
 */
export function fatigueLife(
  setup: SpanSetup,
  swept: { readonly sweep: SpanSweep; readonly places: readonly StressPlace[] },
  { basis, bearingRad }: { readonly basis: VibrationBasis; readonly bearingRad: number },
): FatigueLife {
  const { climate, fatigueCurve } = basis;
  if (climate === null) return { outcome: 'no-climate' };
  return lifeOfDamage(fatigueDamage(setup, swept, { climate, fatigueCurve, bearingRad }).damagePerYearRatio);
}
