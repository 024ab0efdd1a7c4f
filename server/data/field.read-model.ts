import { z } from 'zod';
import { gradeSchema } from '#shared/contract/grades.ts';
import type { placementRoutes } from '#shared/contract/placements.ts';
import { fieldLogSchema, structureWorkSchema, type FieldLog } from '#shared/contract/placements.ts';
import type { QueryOf } from '#shared/contract/route.ts';
import { keysetPage } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { containing } from './lines.read-model.ts';
import { findPlacement, listStructurePlacements } from './placements.repository.ts';
import { instantColumn } from './rows.ts';

const structureRow = structureWorkSchema.shape.structure.extend({ positionDeg: z.array(z.number()) });
const plannedCount = `(
  select count(*)::int from placements
  join span_wires on span_wires.id = placements.span_wire_id
  join spans on spans.id = span_wires.span_id
  where placements.state = 'planned' and placements.ended_at is null
    and ((placements.side = 'from' and spans.from_structure_id = structures.id)
      or (placements.side = 'to' and spans.to_structure_id = structures.id)))`;
const structureColumns = `structures.id, structures.name, lines.name as line_name, structures.kind,
  array[st_x(structures.geom), st_y(structures.geom)] as position_deg, ${plannedCount} as planned_count`;
const structureFrom = 'structures join lines on lines.id = structures.line_id';

/** Structures by name; without a search those with planned work come first. */
export function listFieldStructures(
  tx: UtilityTransaction,
  query: QueryOf<typeof placementRoutes.listFieldStructures>,
) {
  const { search } = query;
  return keysetPage(tx, query, {
    schema: structureRow,
    columns: structureColumns,
    from: structureFrom,
    where:
      search === undefined
        ? []
        : [`(structures.name ilike :search or lines.name || ' ' || structures.name ilike :search)`],
    bindings: search === undefined ? {} : { search: containing(search) },
    key:
      search === undefined
        ? { expression: plannedCount, type: 'int', direction: 'descending' }
        : { expression: `lines.name || chr(1) || structures.name`, type: 'text', direction: 'ascending' },
    id: 'structures.id',
    countFrom: null,
  });
}

const spanWireRow = z.object({
  spanWireId: z.uuid(),
  spanId: z.uuid(),
  spanLabel: z.string(),
  sectionId: z.uuid(),
  otherStructureName: z.string(),
  spanLengthM: z.number(),
  side: z.enum(['from', 'to']),
  wireId: z.uuid(),
  wireName: z.string(),
  conductorName: z.string(),
  grade: gradeSchema.nullable(),
  isStale: z.boolean(),
});

/** One structure with the span wires that end there and their standing dampers, or null. */
export async function readStructureWork(tx: UtilityTransaction, structureId: string) {
  const structure = await tx.first(
    structureRow,
    `select ${structureColumns} from ${structureFrom} where structures.id = :structureId`,
    { structureId },
  );
  if (structure === null) return null;
  const spanWires = await tx.rows(
    spanWireRow,
    `select span_wires.id as span_wire_id, spans.id as span_id, first_structure.name || '–' || second_structure.name as span_label,
       spans.section_id, spans.span_length_m, wires.id as wire_id, wires.name as wire_name, conductor_types.name as conductor_name,
       case when spans.from_structure_id = :structureId then 'from' else 'to' end as side,
       case when spans.from_structure_id = :structureId then second_structure.name else first_structure.name end as other_structure_name,
       span_wires.grade, span_wires.is_stale
     from spans
     join structures as first_structure on first_structure.id = spans.from_structure_id
     join structures as second_structure on second_structure.id = spans.to_structure_id
     join span_wires on span_wires.span_id = spans.id
     join wires on wires.id = span_wires.wire_id
     join conductor_types on conductor_types.id = wires.conductor_type_id
     where spans.from_structure_id = :structureId or spans.to_structure_id = :structureId
     order by spans.section_id, spans.order_index, wires.kind, wires.name`,
    { structureId },
  );
  const placements = await listStructurePlacements(tx, structureId);
  return {
    structure,
    spanWires: spanWires.map((spanWire) => ({
      ...spanWire,
      placements: placements.filter(
        ({ spanWireId, side }) => spanWireId === spanWire.spanWireId && side === spanWire.side,
      ),
    })),
  };
}

const logRow = fieldLogSchema.omit({ placement: true }).extend({ placementId: z.uuid(), loggedAt: instantColumn });
const logColumns = `field_logs.id, field_logs.placement_id, field_logs.assessment_id, field_logs.grade_before, field_logs.logged_at,
  first_structure.name || '–' || second_structure.name as span_label, lines.name as line_name, spans.section_id, wires.name as wire_name`;
const logFrom = `field_logs
  join placements on placements.id = field_logs.placement_id
  join span_wires on span_wires.id = placements.span_wire_id
  join wires on wires.id = span_wires.wire_id
  join spans on spans.id = span_wires.span_id
  join lines on lines.id = spans.line_id
  join structures as first_structure on first_structure.id = spans.from_structure_id
  join structures as second_structure on second_structure.id = spans.to_structure_id`;

async function withPlacement(tx: UtilityTransaction, row: z.infer<typeof logRow>): Promise<FieldLog> {
  const { placementId, ...log } = row;
  const placement = await findPlacement(tx, placementId);
  if (placement === null) throw new Error(`field log ${log.id} has no placement`);
  return { ...log, placement };
}

export async function findFieldLog(tx: UtilityTransaction, fieldLogId: string): Promise<FieldLog | null> {
  const row = await tx.first(logRow, `select ${logColumns} from ${logFrom} where field_logs.id = :fieldLogId`, {
    fieldLogId,
  });
  return row === null ? null : withPlacement(tx, row);
}

/** Field logs, newest first. */
export async function listFieldLogs(tx: UtilityTransaction, query: QueryOf<typeof placementRoutes.listFieldLogs>) {
  const where: string[] = [];
  if (query.sectionId !== undefined) where.push('spans.section_id = :sectionId');
  if (query.structureId !== undefined)
    where.push('(spans.from_structure_id = :structureId or spans.to_structure_id = :structureId)');
  const page = await keysetPage(tx, query, {
    schema: logRow,
    columns: logColumns,
    from: logFrom,
    where,
    bindings: { sectionId: query.sectionId ?? null, structureId: query.structureId ?? null },
    key: { expression: 'field_logs.logged_at', type: 'timestamptz', direction: 'descending' },
    id: 'field_logs.id',
    countFrom: logFrom,
  });
  const items: FieldLog[] = [];
  for (const row of page.items) items.push(await withPlacement(tx, row));
  return { ...page, items };
}
