import type { SpanWireCase, VibrationBasis } from '../assessment/span-wire-assessment.ts';
import type { PlacementChoice, PlacementTask } from '../placement/placement-types.ts';
import { searchPlacements } from '../placement/search-placements.ts';
import { spanMethodNotes } from '../span/span-notes.ts';
import { caseSetup } from '../assessment/wind-sweep.ts';
import { commandHead, type CommandHead } from './command-head.ts';

/** Input of `place`: the ends of the span come from the search. */
export interface PlaceInput extends Omit<PlacementTask, 'input' | 'basis' | 'tensionsN' | 'toleranceM'> {
  readonly wire: SpanWireCase['wire'];
  readonly span: { readonly lengthM: number; readonly tensionN: number; readonly bearingRad?: number | undefined };
  readonly air: SpanWireCase['air'];
  readonly limits: Pick<VibrationBasis, 'endurance' | 'damperedStrain'>;
  /** The span's tension when left out. */
  readonly tensionsN?: readonly number[] | undefined;
  /** 0 when left out. */
  readonly toleranceM?: number | undefined;
  readonly windBand?: VibrationBasis['windBand'] | undefined;
  readonly frequencyCount?: number | undefined;
  readonly methods?: VibrationBasis['methods'] | undefined;
  readonly curves?: VibrationBasis['curves'];
}

/** @source common practice */
const defaultWindBand = { lowerMPerS: 1, upperMPerS: 7 } as const;
const defaultFrequencyCount = 150;

/**
 * Best dampers and distances for each number of dampers per end.
 *
 * @param input span wire, limits, catalogue, distances, tolerance and tensions
 * @returns choices, fewest dampers first
 * @throws EngineInputError naming the field
 * @source own model, see searchPlacements
 * @validity see searchPlacements
 * @accuracy see searchPlacements
 */
export function placeCommand(
  input: PlaceInput,
): CommandHead & { choices: readonly PlacementChoice[]; trialCount: number } {
  const { catalogue, damperLimitCount, distance } = input;
  const bare = { dampers: [] };
  const span = { ...input.span, bearingRad: input.span.bearingRad ?? 0 };
  const given: SpanWireCase = { wire: input.wire, span, air: input.air, ends: [bare, bare] };
  const basis: VibrationBasis = {
    windBand: input.windBand ?? defaultWindBand,
    frequencyCount: input.frequencyCount ?? defaultFrequencyCount,
    methods: input.methods ?? {},
    curves: input.curves,
    ...input.limits,
    fatigueCurve: 'multi-layer',
    climate: null,
  };
  const tensionsN = input.tensionsN ?? [span.tensionN];
  const toleranceM = input.toleranceM ?? 0;
  const search = searchPlacements({
    input: given,
    basis,
    catalogue,
    damperLimitCount,
    distance,
    toleranceM,
    tensionsN,
  });
  let step = search.next();
  while (step.done !== true) step = search.next();
  const { choices, trialCount, methods } = step.value;
  return { ...commandHead([...spanMethodNotes(caseSetup(given, basis)), ...methods]), choices, trialCount };
}
