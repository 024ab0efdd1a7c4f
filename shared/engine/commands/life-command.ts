import { fatigueDamage, lifeOfDamage, type FatigueBin } from '../assessment/fatigue-life.ts';
import type { FatigueLife, SpanWireCase } from '../assessment/span-wire-assessment.ts';
import { stressPlaces } from '../assessment/stress-places.ts';
import { caseSetup, windSweep } from '../assessment/wind-sweep.ts';
import type { WindClimate } from '../climate/wind-climate.ts';
import { safeBorderLines } from '../life/fatigue-curve.ts';
import { recorderLife, type RecorderDamage, type RecorderMatrix } from '../life/recorder-life.ts';
import type { PartialMethodChoice } from '../methods/method-choice.ts';
import { methodEntry, methodNote } from '../methods/method-registry.ts';
import type { UserCurves } from '../methods/user-curves.ts';
import { spanMethodNotes, spanWarnings } from '../span/span-notes.ts';
import { assertTension, assertWireProperties, type WireProperties } from '../span/wire-properties.ts';
import { commandHead, type CommandHead } from './command-head.ts';

/** Life computed from the wind climate of a span wire. */
export interface ClimateLifeInput extends SpanWireCase {
  readonly from: 'climate';
  readonly climate: WindClimate;
  readonly fatigueCurve: keyof typeof safeBorderLines;
  readonly windBand?: { readonly lowerMPerS: number; readonly upperMPerS: number } | undefined;
  readonly frequencyCount?: number | undefined;
  readonly methods?: PartialMethodChoice | undefined;
  readonly curves?: UserCurves | undefined;
}

/** Life computed from what a recorder counted at a clamp. */
export interface RecorderLifeInput {
  readonly from: 'recorder';
  readonly wire: WireProperties;
  readonly tensionN: number;
  readonly recorder: RecorderMatrix;
  readonly fatigueCurve: keyof typeof safeBorderLines;
}

/** Input of `life`. */
export type LifeInput = ClimateLifeInput | RecorderLifeInput;

/** Answer of `life`: the life, where the damage is largest, and what adds to it. */
export interface LifeOutput extends CommandHead {
  readonly life: FatigueLife;
  readonly damagePerYearRatio: number;
  readonly maxStressPa: number;
  readonly endIndex: 0 | 1 | null;
  readonly damperIndex: number | null;
  readonly bins: readonly (FatigueBin | RecorderDamage)[];
}

/** @source common practice */
const defaultWindBand = { lowerMPerS: 1, upperMPerS: 7 } as const;
const defaultFrequencyCount = 150;

function climateLife(input: ClimateLifeInput): LifeOutput {
  const basis = {
    windBand: input.windBand ?? defaultWindBand,
    frequencyCount: input.frequencyCount ?? defaultFrequencyCount,
    methods: input.methods ?? {},
    curves: input.curves,
    // No limit is asked for; the places are ranked by damage.
    endurance: { stressPa: 1, source: '' },
    damperedStrain: null,
    fatigueCurve: input.fatigueCurve,
    climate: input.climate,
  };
  const setup = caseSetup(input, basis);
  const sweep = windSweep(setup, basis);
  const places = stressPlaces(setup, basis, sweep);
  const at = { climate: input.climate, fatigueCurve: input.fatigueCurve, bearingRad: input.span.bearingRad };
  const damage = fatigueDamage(setup, { sweep, places }, at);
  const names = [methodEntry('life', setup.methods.lifeName), methodEntry('fixed', 'wind-climate-weibull')];
  return {
    ...commandHead([...spanMethodNotes(setup), ...names.map(methodNote)], spanWarnings(setup, sweep)),
    life: lifeOfDamage(damage.damagePerYearRatio),
    damagePerYearRatio: damage.damagePerYearRatio,
    maxStressPa: damage.bins.reduce((most, bin) => Math.max(most, bin.stressPa), 0),
    endIndex: damage.place?.endIndex ?? null,
    damperIndex: damage.place?.damperIndex ?? null,
    bins: damage.bins,
  };
}

function lifeOfRecorder(input: RecorderLifeInput): LifeOutput {
  const { wire, tensionN } = input;
  assertWireProperties(wire, 'wire');
  assertTension(tensionN, { path: 'tensionN', ratedStrengthN: wire.ratedStrengthN });
  const clamp = {
    tensionN,
    bendingStiffnessNm2: wire.bendingStiffnessMinNm2,
    outerStrandDiameterM: wire.outerStrandDiameterM,
  };
  const curve = safeBorderLines[input.fatigueCurve];
  const found = recorderLife(input.recorder, { wire: clamp, modulusPa: wire.outerStrandModulusPa }, curve);
  const notes = [methodEntry('fixed', 'strain-poffenberger-swart'), methodEntry('fixed', 'life-recorder')];
  return {
    ...commandHead(notes.map(methodNote)),
    life: lifeOfDamage(found.damagePerYearRatio),
    damagePerYearRatio: found.damagePerYearRatio,
    maxStressPa: found.maxStressPa,
    endIndex: null,
    damperIndex: null,
    bins: found.cells,
  };
}

/**
 * Fatigue life of a span wire from its wind climate, or of a clamp from a recorder's counts.
 *
 * @param input `from` tells which
 * @returns life, yearly damage and what adds to it
 * @throws EngineInputError naming the field
 * @source common practice, see fatigueDamage and recorderLife
 * @validity see there
 * @accuracy see there
 */
export function lifeCommand(input: LifeInput): LifeOutput {
  return input.from === 'climate' ? climateLife(input) : lifeOfRecorder(input);
}
