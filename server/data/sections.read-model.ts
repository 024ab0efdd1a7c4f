import { z } from 'zod';
import { worstGrade } from '#shared/contract/grades.ts';
import {
  sectionSpanSchema,
  sectionStructureSchema,
  spanWireSchema,
  wireSchema,
  type Section,
} from '#shared/contract/sections.ts';
import { turbulenceIntensity } from '#shared/engine/index.ts';
import type { UtilityTransaction } from './database.ts';
import { listSectionPlacements } from './placements.repository.ts';
import { instantColumn } from './rows.ts';
import { listSectionWires } from './wires.repository.ts';

const headSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  lineId: z.uuid(),
  lineName: z.string(),
  rulingSpanM: z.number(),
  lengthM: z.number(),
  isAssumed: z.boolean(),
  assessedAt: instantColumn.nullable(),
});
const spanRow = sectionSpanSchema.omit({ turbulenceIntensityRatio: true }).extend({ meanWireHeightM: z.number() });

async function readHead(tx: UtilityTransaction, sectionId: string) {
  return tx.first(
    headSchema,
    `select sections.id, sections.name, sections.line_id, lines.name as line_name, sections.ruling_span_m,
       sections.section_length_m as length_m, sections.is_assumed,
       (select max(assessed_at) from span_wires where section_id = sections.id) as assessed_at
     from sections join lines on lines.id = sections.line_id where sections.id = :sectionId`,
    { sectionId },
  );
}

async function readSpans(tx: UtilityTransaction, sectionId: string) {
  const rows = await tx.rows(
    spanRow,
    `select spans.id, first_structure.name || '–' || second_structure.name as label, spans.from_structure_id,
       spans.to_structure_id, spans.order_index, spans.span_length_m, spans.bearing_deg, spans.roughness_m,
       spans.mean_wire_height_m, terrain_zones.name as terrain_zone_name, spans.is_assumed
     from spans
     join structures as first_structure on first_structure.id = spans.from_structure_id
     join structures as second_structure on second_structure.id = spans.to_structure_id
     left join terrain_zones on terrain_zones.id = spans.terrain_zone_id
     where spans.section_id = :sectionId order by spans.order_index`,
    { sectionId },
  );
  return rows.map(({ meanWireHeightM, ...span }) => ({
    ...span,
    turbulenceIntensityRatio: turbulenceIntensity({ heightM: meanWireHeightM, roughnessM: span.roughnessM }),
  }));
}

async function readStructures(tx: UtilityTransaction, sectionId: string) {
  return tx.rows(
    sectionStructureSchema.extend({ positionDeg: z.array(z.number()) }),
    `with ordered as (
       select spans.order_index, spans.from_structure_id, spans.to_structure_id,
         coalesce(sum(spans.span_length_m) over (order by spans.order_index rows between unbounded preceding and 1 preceding), 0) as before_m,
         spans.span_length_m
       from spans where spans.section_id = :sectionId
     ), placed as (
       select from_structure_id as id, before_m as chainage_m from ordered
       union select to_structure_id, before_m + span_length_m from ordered
     )
     select distinct on (structures.id) structures.id, structures.name, structures.kind, structures.ground_elevation_m,
       structures.structure_height_m, structures.is_assumed, placed.chainage_m,
       array[st_x(structures.geom), st_y(structures.geom)] as position_deg
     from placed join structures on structures.id = placed.id order by structures.id, placed.chainage_m`,
    { sectionId },
  );
}

function readSpanWires(tx: UtilityTransaction, sectionId: string) {
  return tx.rows(
    spanWireSchema,
    `select id, span_id, wire_id, grade, is_stale, stale_reason, current_finding_id as finding_id, utilisation_ratio
     from span_wires where section_id = :sectionId`,
    { sectionId },
  );
}

/** A section with everything its page shows, or null. */
export async function readSection(tx: UtilityTransaction, sectionId: string): Promise<Section | null> {
  const head = await readHead(tx, sectionId);
  if (head === null) return null;
  const structures = await readStructures(tx, sectionId);
  const spanWires = await readSpanWires(tx, sectionId);
  return {
    ...head,
    grade: worstGrade(spanWires.map(({ grade }) => grade)),
    isStale: spanWires.some(({ isStale }) => isStale),
    structures: structures.sort((a, b) => a.chainageM - b.chainageM),
    spans: await readSpans(tx, sectionId),
    wires: z.array(wireSchema).parse(await listSectionWires(tx, sectionId)),
    spanWires,
    placements: await listSectionPlacements(tx, sectionId),
  };
}
