import type { UtilityTransaction } from './database.ts';
import { jsonRows } from './line-import-json-rows.ts';
import { countLines, type LineRecord, type SectionRecord } from './line-import-records.ts';

/** Rows a statement takes: large enough to be quick, small enough to keep memory and progress even. */
const batchRowCount = 4000;

interface SaveOptions {
  readonly importId: string | null;
  /** Roughness where no terrain zone covers the middle of a span; null takes the utility's own. */
  readonly defaultRoughnessM: number | null;
  readonly onProgress: (doneCount: number, totalCount: number) => Promise<void>;
}

interface Step {
  readonly rows: readonly object[];
  readonly sql: string;
}

const recordset = (columns: string) => `jsonb_to_recordset(:rows::jsonb) as item(${columns})`;

const lineSql = `insert into lines (id, utility_id, name, voltage_v, is_assumed, import_run_id)
  select item.id, :utilityId::uuid, item.name, item.voltage_v, item.is_assumed, :importId::uuid
  from ${recordset('id uuid, name text, voltage_v double precision, is_assumed boolean')}`;

const structureSql = `insert into structures
    (id, utility_id, line_id, name, kind, structure_height_m, ground_elevation_m, geom, is_assumed)
  select item.id, :utilityId::uuid, item.line_id, item.name, item.kind::structure_kind, item.structure_height_m,
    item.ground_elevation_m, st_setsrid(st_makepoint(item.longitude_deg, item.latitude_deg), 4326), item.is_assumed
  from ${recordset(`id uuid, line_id uuid, name text, kind text, structure_height_m double precision,
    ground_elevation_m double precision, longitude_deg double precision, latitude_deg double precision, is_assumed boolean`)}`;

const sectionSql = `insert into sections
    (id, utility_id, line_id, name, order_index, ruling_span_m, section_length_m, geom, is_assumed)
  select item.id, :utilityId::uuid, item.line_id, item.name, item.order_index, item.ruling_span_m, item.section_length_m,
    st_geomfromtext(item.path_wkt, 4326),
    item.is_assumed
  from ${recordset(`id uuid, line_id uuid, name text, order_index int, ruling_span_m double precision,
    section_length_m double precision, path_wkt text, is_assumed boolean`)}`;

// The smallest zone that covers the middle of the span wins: a wood inside a plain counts as wood.
const spanSql = `insert into spans
    (id, utility_id, section_id, line_id, order_index, from_structure_id, to_structure_id, span_length_m, bearing_deg,
     mean_wire_height_m, roughness_m, terrain_zone_id, geom, is_assumed)
  select item.id, :utilityId::uuid, item.section_id, item.line_id, item.order_index, item.from_structure_id,
    item.to_structure_id, item.span_length_m, item.bearing_deg, item.mean_wire_height_m,
    coalesce(zone.roughness_m, :defaultRoughnessM::double precision, utilities.default_roughness_m), zone.id, path.geom,
    item.is_assumed
  from ${recordset(`id uuid, section_id uuid, line_id uuid, order_index int, from_structure_id uuid, to_structure_id uuid,
    span_length_m double precision, bearing_deg double precision, mean_wire_height_m double precision, path_wkt text, is_assumed boolean`)}
  join utilities on utilities.id = :utilityId::uuid
  cross join lateral (select st_geomfromtext(item.path_wkt, 4326) as geom) as path
  left join lateral (
    select terrain_zones.id, terrain_zones.roughness_m from terrain_zones
    where st_covers(terrain_zones.geom, st_lineinterpolatepoint(path.geom, 0.5))
    order by st_area(terrain_zones.geom), terrain_zones.id limit 1
  ) as zone on true`;

const wireSql = `insert into wires (id, utility_id, section_id, name, kind, conductor_type_id, tension_n, is_assumed)
  select item.id, :utilityId::uuid, item.section_id, item.name, item.kind::wire_kind, item.conductor_type_id,
    item.tension_n, item.is_assumed
  from ${recordset(`id uuid, section_id uuid, name text, kind text, conductor_type_id uuid, tension_n double precision,
    is_assumed boolean`)}`;

// Rows come whole, without a join: after a first import the planner does not know yet how many rows a utility has.
const spanWireSql = `insert into span_wires (id, utility_id, span_id, wire_id, section_id)
  select gen_random_uuid(), :utilityId::uuid, item.span_id, item.wire_id, item.section_id
  from ${recordset('span_id uuid, wire_id uuid, section_id uuid')}`;

type Path = (structureIds: readonly string[]) => string;

/** Paths through structures as well-known text. */
function pathsOf(lines: readonly LineRecord[]): Path {
  const places = new Map(
    lines.flatMap(({ structures }) =>
      structures.map(({ id, longitudeDeg, latitudeDeg }) => [id, `${longitudeDeg} ${latitudeDeg}`] as const),
    ),
  );
  return (structureIds) => `LINESTRING(${structureIds.flatMap((id) => places.get(id) ?? []).join(', ')})`;
}

function structureIdsOf({ spans }: SectionRecord): string[] {
  const first = spans.slice(0, 1).map(({ fromStructureId }) => fromStructureId);
  return [...first, ...spans.map(({ toStructureId }) => toStructureId)];
}

function stepsOf(lines: readonly LineRecord[]): Step[] {
  const pathThrough = pathsOf(lines);
  const sections = lines.flatMap(({ id, isAssumed, sections: own }) =>
    own.map((section) => ({ ...section, lineId: id, isAssumed })),
  );
  const wires = sections.flatMap(({ id, isAssumed, wires: own }) =>
    own.map((wire) => ({ ...wire, sectionId: id, isAssumed })),
  );
  return [
    { sql: lineSql, rows: lines.map(({ id, name, voltageV, isAssumed }) => ({ id, name, voltageV, isAssumed })) },
    {
      sql: structureSql,
      rows: lines.flatMap(({ id, isAssumed, structures }) =>
        structures.map((structure) => ({ ...structure, lineId: id, isAssumed })),
      ),
    },
    {
      sql: sectionSql,
      rows: sections.map(({ spans: _spans, wires: _wires, ...section }, index) => ({
        ...section,
        pathWkt: pathThrough(sections[index] === undefined ? [] : structureIdsOf(sections[index])),
      })),
    },
    {
      sql: spanSql,
      rows: sections.flatMap(({ id, lineId, isAssumed, spans }) =>
        spans.map((span) => ({
          ...span,
          sectionId: id,
          lineId,
          isAssumed,
          pathWkt: pathThrough([span.fromStructureId, span.toStructureId]),
        })),
      ),
    },
    { sql: wireSql, rows: wires },
    {
      sql: spanWireSql,
      rows: sections.flatMap(({ id: sectionId, spans, wires: own }) =>
        own.flatMap((wire) => spans.map((span) => ({ spanId: span.id, wireId: wire.id, sectionId }))),
      ),
    },
  ];
}

/**
 * Stores whole lines in bulk. All of it happens in the transaction that is given, so an error anywhere leaves nothing.
 *
 * @throws AppError `duplicate` when a line of the same name was stored meanwhile
 */
export async function saveLines(
  tx: UtilityTransaction,
  lines: readonly LineRecord[],
  options: SaveOptions,
): Promise<void> {
  const counts = countLines(lines);
  const totalCount = counts.structureCount + counts.spanCount + counts.spanWireCount;
  const { utilityId } = tx.actor;
  const { importId, defaultRoughnessM, onProgress } = options;
  let doneCount = 0;
  for (const { sql, rows } of stepsOf(lines)) {
    for (let start = 0; start < rows.length; start += batchRowCount) {
      const batch = rows.slice(start, start + batchRowCount);
      const savedCount = await tx.run(sql, { utilityId, importId, defaultRoughnessM, rows: jsonRows(batch) });
      if (sql === structureSql || sql === spanSql || sql === spanWireSql) doneCount += savedCount;
      await onProgress(doneCount, totalCount);
    }
  }
}
