import { z } from 'zod';
import { placementSchema, type Placement, type Side } from '#shared/contract/placements.ts';
import { AppError } from '#server/platform/errors.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

const rowSchema = placementSchema.extend({ startedAt: instantColumn, endedAt: instantColumn.nullable() });

const select = `select placements.id, placements.span_wire_id, span_wires.span_id, span_wires.wire_id, placements.side,
    placements.damper_type_id, damper_types.name as damper_type_name, placements.distance_m, placements.planned_distance_m,
    placements.state, placements.started_at, placements.ended_at, people.display_name as logged_by_name,
    placements.photo_file_id, placements.note, placements.version_number
  from placements
  join span_wires on span_wires.id = placements.span_wire_id
  join damper_types on damper_types.id = placements.damper_type_id
  left join people on people.id = placements.logged_by_person_id`;

export async function findPlacement(tx: UtilityTransaction, placementId: string): Promise<Placement | null> {
  return tx.first(rowSchema, `${select} where placements.id = :placementId`, { placementId });
}

/** Placements of all span wires of a section, newest first, ended ones too. */
export async function listSectionPlacements(tx: UtilityTransaction, sectionId: string): Promise<Placement[]> {
  return tx.rows(
    rowSchema,
    `${select} where span_wires.section_id = :sectionId order by placements.started_at desc, placements.id`,
    { sectionId },
  );
}

/** Standing placements at one structure, of every span wire that ends there. */
export async function listStructurePlacements(tx: UtilityTransaction, structureId: string): Promise<Placement[]> {
  return tx.rows(
    rowSchema,
    `${select} join spans on spans.id = span_wires.span_id
     where placements.ended_at is null
       and ((placements.side = 'from' and spans.from_structure_id = :structureId)
         or (placements.side = 'to' and spans.to_structure_id = :structureId))
     order by placements.distance_m, placements.id`,
    { structureId },
  );
}

export interface NewPlacement {
  readonly id: string;
  readonly spanWireId: string;
  readonly side: Side;
  readonly damperTypeId: string;
  readonly distanceM: number;
  readonly plannedDistanceM: number | null;
  readonly state: 'planned' | 'as-built';
  readonly replacesPlacementId: string | null;
  readonly startedAt: string;
  readonly photoFileId: string | null;
  readonly note: string;
}

/** Adds a placement; the database refuses two clamps within a centimetre and ids that are taken. */
export async function insertPlacement(tx: UtilityTransaction, placement: NewPlacement): Promise<void> {
  await tx.run(
    `insert into placements (id, utility_id, span_wire_id, side, damper_type_id, distance_m, planned_distance_m, state,
       replaces_placement_id, started_at, logged_by_person_id, photo_file_id, note)
     values (:id, :utilityId, :spanWireId, :side::span_side, :damperTypeId, :distanceM, :plannedDistanceM,
       :state::placement_state, :replacesPlacementId, :startedAt::timestamptz, :personId, :photoFileId, :note)`,
    { ...placement, utilityId: tx.actor.utilityId, personId: tx.actor.personId },
  );
}

/** Ends a standing placement; the history keeps it. A version that was not seen is refused. */
export async function endPlacement(
  tx: UtilityTransaction,
  placement: { readonly id: string; readonly endedAt: string; readonly versionNumber?: number },
): Promise<void> {
  const expected = placement.versionNumber ?? null;
  const ended = await tx.run(
    `update placements set ended_at = greatest(:endedAt::timestamptz, started_at), version_number = version_number + 1
     where id = :id and ended_at is null and (:expected::int is null or version_number = :expected::int)`,
    { id: placement.id, endedAt: placement.endedAt, expected },
  );
  if (ended === 1) return;
  const current = await findPlacement(tx, placement.id);
  if (current === null) throw new AppError('not-found', `There is no placement with the id ${placement.id}.`);
  if (current.endedAt !== null) throw new AppError('wrong-state', 'This placement has ended already.', { current });
  throw new AppError('stale-version', 'Somebody changed this placement since you read it.', { current });
}

const boundsSchema = z.object({ spanLengthM: z.number(), sectionId: z.uuid(), spanId: z.uuid() });

/** Span of a span wire, or null when there is no such span wire. */
export async function findSpanWireBounds(tx: UtilityTransaction, spanWireId: string) {
  return tx.first(
    boundsSchema,
    `select spans.span_length_m, span_wires.section_id, spans.id as span_id
     from span_wires join spans on spans.id = span_wires.span_id where span_wires.id = :spanWireId`,
    { spanWireId },
  );
}

/** True when a standing placement of the state sits within a centimetre of the distance. */
export async function isDistanceTaken(
  tx: UtilityTransaction,
  place: Pick<NewPlacement, 'spanWireId' | 'side' | 'state' | 'distanceM'>,
): Promise<boolean> {
  const taken = await tx.first(
    z.object({ id: z.uuid() }),
    `select id from placements where ended_at is null and span_wire_id = :spanWireId and side = :side::span_side
       and state = :state::placement_state and abs(distance_m - :distanceM) < 0.01 limit 1`,
    { spanWireId: place.spanWireId, side: place.side, state: place.state, distanceM: place.distanceM },
  );
  return taken !== null;
}
