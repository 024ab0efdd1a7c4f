import { z } from 'zod';
import { gradeSchema } from '#shared/contract/grades.ts';
import { lineStringSchema, multiPolygonSchema, pointSchema } from '#shared/contract/map.ts';
import type { UtilityTransaction } from './database.ts';

const state = { grade: gradeSchema.nullable(), isStale: z.boolean(), isAssumed: z.boolean() };
const maximumFeatureCount = 8000;

export type Box = readonly number[] | undefined;

function boxCondition(column: string, box: Box): { condition: string; bindings: Record<string, number> } {
  const [west, south, east, north] = box ?? [];
  if (west === undefined || south === undefined || east === undefined || north === undefined) {
    return { condition: 'true', bindings: {} };
  }
  return {
    condition: `${column} && st_makeenvelope(:west, :south, :east, :north, 4326)`,
    bindings: { west, south, east, north },
  };
}

function featureOf<R extends { readonly id: string; readonly geometry: unknown }>(row: R) {
  const { id, geometry, ...properties } = row;
  // Taken from the row, not from the pattern, so that the geometry keeps its type.
  return { type: 'Feature' as const, id, geometry: row['geometry'] as R['geometry'], properties };
}

function collection<R extends { readonly id: string; readonly geometry: unknown }>(rows: readonly R[]) {
  const shown = rows.slice(0, maximumFeatureCount);
  return {
    type: 'FeatureCollection' as const,
    features: shown.map(featureOf),
    isTruncated: rows.length > maximumFeatureCount,
  };
}

const worstOf = (where: string) => `
  (select max(span_wires.grade) from span_wires where ${where}) as grade,
  (select coalesce(bool_or(span_wires.is_stale), false) from span_wires where ${where}) as is_stale`;

/** Box of all structures, or null. */
export async function readExtent(tx: UtilityTransaction): Promise<{ extentDeg: number[] | null }> {
  const row = await tx.first(
    z.object({
      west: z.number().nullable(),
      south: z.number().nullable(),
      east: z.number().nullable(),
      north: z.number().nullable(),
    }),
    `select st_xmin(box) as west, st_ymin(box) as south, st_xmax(box) as east, st_ymax(box) as north
     from (select st_extent(geom) as box from sections) as all_sections`,
  );
  if (row === null || row.west === null || row.south === null || row.east === null || row.north === null)
    return { extentDeg: null };
  return { extentDeg: [row.west, row.south, row.east, row.north] };
}

/** Sections with their worst grade. */
export async function readMapSections(tx: UtilityTransaction, box: Box) {
  const { condition, bindings } = boxCondition('sections.geom', box);
  const rows = await tx.rows(
    z.object({
      id: z.uuid(),
      geometry: lineStringSchema,
      ...state,
      name: z.string(),
      lineId: z.uuid(),
      lineName: z.string(),
      spanCount: z.number(),
    }),
    `select sections.id, st_asgeojson(sections.geom, 6)::json as geometry, worst.grade, coalesce(worst.is_stale, false) as is_stale,
       sections.is_assumed, sections.name, sections.line_id, lines.name as line_name, counted.span_count
     from sections
     join lines on lines.id = sections.line_id
     left join (
       select section_id, max(grade) as grade, bool_or(is_stale) as is_stale from span_wires group by section_id
     ) as worst on worst.section_id = sections.id
     join (select section_id, count(*)::int as span_count from spans group by section_id) as counted on counted.section_id = sections.id
     where ${condition} order by sections.id limit ${maximumFeatureCount + 1}`,
    bindings,
  );
  return collection(rows);
}

/** Spans in a box with grade and the dampers to draw at their sides. */
export async function readMapSpans(tx: UtilityTransaction, box: Box) {
  const { condition, bindings } = boxCondition('spans.geom', box);
  const rows = await tx.rows(
    z.object({
      id: z.uuid(),
      geometry: lineStringSchema,
      ...state,
      label: z.string(),
      sectionId: z.uuid(),
      lineName: z.string(),
      spanLengthM: z.number(),
      dampers: z.array(z.object({ side: z.enum(['from', 'to']), isAsBuilt: z.boolean() })),
    }),
    `select spans.id, st_asgeojson(spans.geom, 6)::json as geometry, ${worstOf('span_wires.span_id = spans.id')},
       spans.is_assumed, first_structure.name || '–' || second_structure.name as label, spans.section_id,
       lines.name as line_name, spans.span_length_m,
       coalesce((
         select json_agg(distinct jsonb_build_object('side', placements.side, 'isAsBuilt', placements.state = 'as-built'))
         from placements join span_wires on span_wires.id = placements.span_wire_id
         where span_wires.span_id = spans.id and placements.ended_at is null
       ), '[]') as dampers
     from spans
     join lines on lines.id = spans.line_id
     join structures as first_structure on first_structure.id = spans.from_structure_id
     join structures as second_structure on second_structure.id = spans.to_structure_id
     where ${condition} order by spans.id limit ${maximumFeatureCount + 1}`,
    bindings,
  );
  return collection(rows);
}

/** Structures in a box. */
export async function readMapStructures(tx: UtilityTransaction, box: Box) {
  const { condition, bindings } = boxCondition('structures.geom', box);
  const rows = await tx.rows(
    z.object({
      id: z.uuid(),
      geometry: pointSchema,
      name: z.string(),
      kind: z.enum(['dead-end', 'suspension']),
      lineId: z.uuid(),
      isAssumed: z.boolean(),
    }),
    `select id, st_asgeojson(geom, 6)::json as geometry, name, kind, line_id, is_assumed
     from structures where ${condition} order by id limit ${maximumFeatureCount + 1}`,
    bindings,
  );
  return collection(rows);
}

/** Terrain zones in a box. */
export async function readMapTerrain(tx: UtilityTransaction, box: Box) {
  const { condition, bindings } = boxCondition('terrain_zones.geom', box);
  const rows = await tx.rows(
    z.object({ id: z.uuid(), geometry: multiPolygonSchema, name: z.string(), roughnessM: z.number() }),
    `select id, st_asgeojson(geom, 6)::json as geometry, name, roughness_m
     from terrain_zones where ${condition} order by st_area(geom) desc, id limit ${maximumFeatureCount + 1}`,
    bindings,
  );
  return collection(rows);
}
