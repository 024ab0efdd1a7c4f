import { z } from 'zod';
import type { lineRoutes } from '#shared/contract/lines.ts';
import { lineSchema, spanListItemSchema } from '#shared/contract/lines.ts';
import type { QueryOf } from '#shared/contract/route.ts';
import { keysetPage } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';

/** Text for `ilike`, with its wildcards taken literally. */
export function containing(search: string): string {
  return `%${search.replace(/[\\%_]/g, (character) => `\\${character}`)}%`;
}

/** Lines by name with counts, worst grade and extent. */
export function listLines(tx: UtilityTransaction, query: QueryOf<typeof lineRoutes.listLines>) {
  return keysetPage(tx, query, {
    schema: lineSchema,
    columns: `lines.id, lines.name, lines.voltage_v, lines.is_assumed, facts.section_count, facts.span_count, facts.length_m,
      facts.grade, facts.extent_deg`,
    from: `lines join lateral (
      select count(distinct sections.id)::int as section_count, coalesce(sum(sections.section_length_m), 0) as length_m,
        (select count(*)::int from spans where spans.line_id = lines.id) as span_count,
        (select max(span_wires.grade) from span_wires join spans on spans.id = span_wires.span_id where spans.line_id = lines.id) as grade,
        array[st_xmin(st_extent(sections.geom)), st_ymin(st_extent(sections.geom)),
              st_xmax(st_extent(sections.geom)), st_ymax(st_extent(sections.geom))] as extent_deg
      from sections where sections.line_id = lines.id
    ) as facts on facts.section_count > 0`,
    where: query.search === undefined ? [] : ['lines.name ilike :search'],
    bindings: query.search === undefined ? {} : { search: containing(query.search) },
    key: { expression: 'lines.name', type: 'text', direction: 'ascending' },
    id: 'lines.id',
    countFrom: 'lines',
  });
}

function spanConditions(query: QueryOf<typeof lineRoutes.listSpans>) {
  const where: string[] = [];
  const bindings: Record<string, string | number | readonly string[]> = {};
  const add = (condition: string, more: Record<string, string | number | readonly string[]>) => {
    where.push(condition);
    Object.assign(bindings, more);
  };
  if (query.lineId !== undefined) add('spans.line_id = :lineId', { lineId: query.lineId });
  if (query.sectionId !== undefined) add('spans.section_id = :sectionId', { sectionId: query.sectionId });
  if (query.spanIds !== undefined) add('spans.id = any(:spanIds::uuid[])', { spanIds: query.spanIds });
  if (query.grades !== undefined) {
    add('(select max(span_wires.grade) from span_wires where span_wires.span_id = spans.id) = any(:grades::grade[])', {
      grades: query.grades,
    });
  }
  if (query.search !== undefined) {
    add(
      `(lines.name ilike :search or sections.name ilike :search
      or first_structure.name || '–' || second_structure.name ilike :search)`,
      { search: containing(query.search) },
    );
  }
  const [west, south, east, north] = query.bboxDeg ?? [];
  if (west !== undefined && south !== undefined && east !== undefined && north !== undefined) {
    add('spans.geom && st_makeenvelope(:west, :south, :east, :north, 4326)', { west, south, east, north });
  }
  return { where, bindings };
}

const spanFrom = `spans
  join sections on sections.id = spans.section_id
  join lines on lines.id = spans.line_id
  join structures as first_structure on first_structure.id = spans.from_structure_id
  join structures as second_structure on second_structure.id = spans.to_structure_id`;

/** Spans in the order of their lines, for picking from a list. */
export function listSpans(tx: UtilityTransaction, query: QueryOf<typeof lineRoutes.listSpans>) {
  return keysetPage(tx, query, {
    schema: spanListItemSchema.extend({ centreDeg: z.array(z.number()) }),
    columns: `spans.id, first_structure.name || '–' || second_structure.name as label, spans.section_id,
      sections.name as section_name, spans.line_id, lines.name as line_name, spans.span_length_m, spans.is_assumed,
      (select count(*)::int from span_wires where span_wires.span_id = spans.id) as span_wire_count,
      (select max(span_wires.grade) from span_wires where span_wires.span_id = spans.id) as grade,
      (select coalesce(bool_or(span_wires.is_stale), false) from span_wires where span_wires.span_id = spans.id) as is_stale,
      array[st_x(st_centroid(spans.geom)), st_y(st_centroid(spans.geom))] as centre_deg`,
    from: spanFrom,
    ...spanConditions(query),
    key: {
      expression: `lines.name || chr(1) || lpad(sections.order_index::text, 6, '0') || lpad(spans.order_index::text, 6, '0')`,
      type: 'text',
      direction: 'ascending',
    },
    id: 'spans.id',
    countFrom: spanFrom,
  });
}
