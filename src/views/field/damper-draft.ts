import type { FieldLogInput, Placement, Side, StructureWork } from '#shared/contract/placements.ts';
import { fieldLogInputSchema } from '#shared/contract/placements.ts';

export type SpanWireAtStructure = StructureWork['spanWires'][number];

/** A fitted damper while the crew fills it in; ids are made once, so that sending twice logs it once. */
export interface DamperDraft {
  readonly logId: string;
  readonly photoFileId: string;
  readonly damperTypeId: string | null;
  readonly distanceM: number | null;
  readonly note: string;
  readonly photo: File | null;
  readonly replacesPlacementId: string | null;
}

/** What is wrong with a draft, by field; empty when it can be sent. */
export type DraftFaults = Partial<Record<'damperTypeId' | 'distanceM' | 'note', string>>;

/** Standing placements of a span wire at this structure, the planned ones first, nearest to the clamp first. */
export function orderedPlacements(spanWire: SpanWireAtStructure): Placement[] {
  const rank = (placement: Placement) => (placement.state === 'planned' ? 0 : 1);
  return [...spanWire.placements].sort((one, other) => rank(one) - rank(other) || one.distanceM - other.distanceM);
}

/**
 * A new draft for a span wire at a structure. It takes over type and distance of the placement it realises; with none
 * chosen it takes the first planned one.
 */
export function newDraft(spanWire: SpanWireAtStructure, placementId: string | null, newId: () => string): DamperDraft {
  const placements = orderedPlacements(spanWire);
  const realised =
    placements.find((placement) => placement.id === placementId) ??
    placements.find((placement) => placement.state === 'planned') ??
    null;
  return {
    logId: newId(),
    photoFileId: newId(),
    damperTypeId: realised?.damperTypeId ?? null,
    distanceM: realised?.distanceM ?? null,
    note: '',
    photo: null,
    replacesPlacementId: realised?.id ?? null,
  };
}

/** Checks what the crew can put right on the spot; the service checks everything again. */
export function draftFaults(draft: DamperDraft, spanWire: SpanWireAtStructure): DraftFaults {
  const faults: DraftFaults = {};
  if (draft.damperTypeId === null) faults.damperTypeId = 'Choose the damper type that you fitted.';
  if (draft.distanceM === null) faults.distanceM = 'Enter the distance from the clamp.';
  else if (draft.distanceM <= 0) faults.distanceM = 'The distance must be more than zero.';
  else if (draft.distanceM >= spanWire.spanLengthM) faults.distanceM = 'The distance is longer than the span.';
  else if (isTaken(draft, spanWire)) faults.distanceM = 'Another damper already sits at this distance.';
  if (draft.note.length > 1000) faults.note = 'The note is too long: 1000 letters at most.';
  return faults;
}

/** Two dampers cannot share a place; closer than a centimetre is the same place. */
const samePlaceM = 0.01;

function isTaken(draft: DamperDraft, spanWire: SpanWireAtStructure): boolean {
  const { distanceM } = draft;
  if (distanceM === null) return false;
  return spanWire.placements.some(
    (placement) =>
      placement.state === 'as-built' &&
      placement.id !== draft.replacesPlacementId &&
      Math.abs(placement.distanceM - distanceM) < samePlaceM,
  );
}

/** The log as it is sent; the draft must have no faults. */
export function fieldLogInput(
  draft: DamperDraft,
  at: { readonly spanWireId: string; readonly side: Side; readonly fittedAt: string },
): FieldLogInput {
  return fieldLogInputSchema.parse({
    id: draft.logId,
    spanWireId: at.spanWireId,
    side: at.side,
    damperTypeId: draft.damperTypeId,
    distanceM: draft.distanceM,
    note: draft.note.trim(),
    fittedAt: at.fittedAt,
    replacesPlacementId: draft.replacesPlacementId,
    photoFileId: draft.photo === null ? null : draft.photoFileId,
  });
}

/** How far the fitted distance is from the planned one, m; null when nothing was planned or both are the same place. */
export function offPlanM(draft: DamperDraft, spanWire: SpanWireAtStructure): number | null {
  const planned = spanWire.placements.find((placement) => placement.id === draft.replacesPlacementId);
  if (planned === undefined || draft.distanceM === null) return null;
  const plannedM = planned.state === 'planned' ? planned.distanceM : planned.plannedDistanceM;
  const offsetM = plannedM === null ? 0 : draft.distanceM - plannedM;
  return Math.abs(offsetM) < samePlaceM / 2 ? null : offsetM;
}

/** Next distance of the stepper, m: whole centimetres, never below one step. */
export function steppedDistanceM(distanceM: number | null, stepCount: 1 | -1): number {
  const stepsPerM = 100;
  const steps = Math.round((distanceM ?? 0) * stepsPerM) + stepCount;
  return Math.max(1, steps) / stepsPerM;
}
