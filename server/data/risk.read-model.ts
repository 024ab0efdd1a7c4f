import type { z } from 'zod';
import type { QueryOf } from '#shared/contract/route.ts';
import { riskRowSchema, type riskRoutes } from '#shared/contract/risk.ts';
import { keysetPage, type KeysetList } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { containing } from './lines.read-model.ts';
import { instantColumn } from './rows.ts';

type RiskQuery = QueryOf<typeof riskRoutes.listRisk>;

// Within a grade the ratio decides, so both go into one sort number; rows without a finding have none and come last.
const gradeThenRatio = `(array_position(enum_range(null::grade), span_wires.grade) * 1000 + least(coalesce(span_wires.utilisation_ratio, 0), 999))`;
const sortKeys = {
  grade: { expression: gradeThenRatio, type: 'double precision' },
  utilisation: { expression: 'span_wires.utilisation_ratio', type: 'double precision' },
  stress: { expression: 'findings.stress_pa', type: 'double precision' },
  life: { expression: 'findings.life_years', type: 'double precision' },
  'span-length': { expression: 'spans.span_length_m', type: 'double precision' },
  line: {
    expression: `lines.name || chr(1) || lpad(sections.order_index::text, 6, '0') || lpad(spans.order_index::text, 6, '0')`,
    type: 'text',
  },
  'assessed-at': { expression: 'span_wires.assessed_at', type: 'timestamptz' },
} as const satisfies Record<RiskQuery['sort'], { expression: string; type: string }>;

const from = `span_wires
  join spans on spans.id = span_wires.span_id
  join sections on sections.id = span_wires.section_id
  join lines on lines.id = spans.line_id
  join wires on wires.id = span_wires.wire_id
  join conductor_types on conductor_types.id = wires.conductor_type_id
  join structures as first_structure on first_structure.id = spans.from_structure_id
  join structures as second_structure on second_structure.id = spans.to_structure_id
  left join findings on findings.id = span_wires.current_finding_id`;

const columns = `span_wires.id as span_wire_id, spans.id as span_id, span_wires.section_id, span_wires.current_finding_id as finding_id,
  lines.name as line_name, sections.name as section_name, first_structure.name || '–' || second_structure.name as span_label,
  wires.name as wire_name, conductor_types.name as conductor_name, spans.span_length_m, wires.tension_n, conductor_types.rated_strength_n,
  span_wires.grade, findings.outcome, span_wires.utilisation_ratio, findings.stress_pa, findings.limit_stress_pa, findings.frequency_hz,
  findings.wind_speed_m_per_s, findings.life_years, findings.reasons -> 0 as leading_reason, span_wires.is_stale,
  (spans.is_assumed or wires.is_assumed) as is_assumed, span_wires.assessed_at,
  (select count(*)::int from placements where placements.span_wire_id = span_wires.id and placements.state = 'as-built'
     and placements.ended_at is null) as damper_count`;

function conditions(query: RiskQuery): Pick<KeysetList<z.ZodType>, 'where' | 'bindings'> {
  const where: string[] = [];
  const bindings: Record<string, string | boolean | readonly string[]> = {};
  const add = (condition: string, name: string, value: string | boolean | readonly string[] | undefined) => {
    if (value === undefined) return;
    where.push(condition);
    bindings[name] = value;
  };
  add('span_wires.grade = any(:grades::grade[])', 'grades', query.grades);
  add('spans.line_id = :lineId', 'lineId', query.lineId);
  add('span_wires.section_id = :sectionId', 'sectionId', query.sectionId);
  add('span_wires.is_stale = :isStale', 'isStale', query.isStale);
  add('(span_wires.grade is not null) = :isAssessed', 'isAssessed', query.isAssessed);
  add(
    `(lines.name ilike :search or sections.name ilike :search or conductor_types.name ilike :search
      or first_structure.name || '–' || second_structure.name ilike :search)`,
    'search',
    query.search === undefined ? undefined : containing(query.search),
  );
  return { where, bindings };
}

/** One page of the risk table. */
export function listRisk(tx: UtilityTransaction, query: RiskQuery) {
  return keysetPage(tx, query, {
    schema: riskRowSchema.extend({ assessedAt: instantColumn.nullable() }),
    columns,
    from,
    ...conditions(query),
    key: { ...sortKeys[query.sort], direction: query.direction },
    id: 'span_wires.id',
    countFrom: from,
  });
}
