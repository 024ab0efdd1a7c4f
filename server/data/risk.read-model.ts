import type { QueryOf } from '#shared/contract/route.ts';
import { riskRowSchema, type riskRoutes } from '#shared/contract/risk.ts';
import { keysetPage } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { containing } from './lines.read-model.ts';
import { instantColumn } from './rows.ts';

type RiskQuery = QueryOf<typeof riskRoutes.listRisk>;

// Within a grade the ratio decides, so both go into one sort number; rows without a finding have none and come last.
const gradeThenRatio = `(array_position(enum_range(null::grade), span_wires.grade) * 1000 + least(coalesce(span_wires.utilisation_ratio, 0), 999))`;
const sortKeys = {
  grade: { expression: gradeThenRatio, type: 'double precision', needs: [] },
  utilisation: { expression: 'span_wires.utilisation_ratio', type: 'double precision', needs: [] },
  stress: { expression: 'findings.stress_pa', type: 'double precision', needs: ['findings'] },
  life: { expression: 'findings.life_years', type: 'double precision', needs: ['findings'] },
  'span-length': { expression: 'spans.span_length_m', type: 'double precision', needs: ['spans'] },
  line: {
    expression: `lines.name || chr(1) || lpad(sections.order_index::text, 6, '0') || lpad(spans.order_index::text, 6, '0')`,
    type: 'text',
    needs: ['spans', 'lines', 'sections'],
  },
  'assessed-at': { expression: 'span_wires.assessed_at', type: 'timestamptz', needs: [] },
} as const satisfies Record<RiskQuery['sort'], { expression: string; type: string; needs: readonly TableName[] }>;

// In the order in which they can be joined.
const joins = {
  spans: 'join spans on spans.id = span_wires.span_id',
  sections: 'join sections on sections.id = span_wires.section_id',
  lines: 'join lines on lines.id = spans.line_id',
  wires: 'join wires on wires.id = span_wires.wire_id',
  conductorTypes: 'join conductor_types on conductor_types.id = wires.conductor_type_id',
  firstStructure: 'join structures as first_structure on first_structure.id = spans.from_structure_id',
  secondStructure: 'join structures as second_structure on second_structure.id = spans.to_structure_id',
  findings: 'left join findings on findings.id = span_wires.current_finding_id',
} as const;
type TableName = keyof typeof joins;

function fromOf(needs: ReadonlySet<string>): string {
  const wanted = Object.entries(joins).flatMap(([name, join]) => (needs.has(name) ? [join] : []));
  return ['span_wires', ...wanted].join('\n');
}
const from = fromOf(new Set(Object.keys(joins)));

const columns = `span_wires.id as span_wire_id, spans.id as span_id, span_wires.section_id, span_wires.current_finding_id as finding_id,
  lines.name as line_name, sections.name as section_name, first_structure.name || '–' || second_structure.name as span_label,
  wires.name as wire_name, conductor_types.name as conductor_name, spans.span_length_m, wires.tension_n, conductor_types.rated_strength_n,
  span_wires.grade, findings.outcome, span_wires.utilisation_ratio, findings.stress_pa, findings.limit_stress_pa, findings.frequency_hz,
  findings.wind_speed_m_per_s, findings.life_years, findings.reasons -> 0 as leading_reason, span_wires.is_stale,
  (spans.is_assumed or wires.is_assumed) as is_assumed, span_wires.assessed_at,
  (select count(*)::int from placements where placements.span_wire_id = span_wires.id and placements.state = 'as-built'
     and placements.ended_at is null) as damper_count`;

const searchNeeds = [
  'spans',
  'lines',
  'sections',
  'wires',
  'conductorTypes',
  'firstStructure',
  'secondStructure',
] as const;

interface Conditions {
  readonly where: string[];
  readonly bindings: Record<string, string | boolean | readonly string[]>;
  readonly needs: Set<TableName>;
}

function conditions(query: RiskQuery): Conditions {
  const found: Conditions = { where: [], bindings: {}, needs: new Set(sortKeys[query.sort].needs) };
  const add = (
    name: string,
    value: string | boolean | readonly string[] | undefined,
    [condition, ...needs]: readonly [string, ...TableName[]],
  ) => {
    if (value === undefined) return;
    found.where.push(condition);
    found.bindings[name] = value;
    for (const table of needs) found.needs.add(table);
  };
  add('grades', query.grades, ['span_wires.grade = any(:grades::grade[])']);
  add('lineId', query.lineId, ['spans.line_id = :lineId', 'spans']);
  add('sectionId', query.sectionId, ['span_wires.section_id = :sectionId']);
  add('isStale', query.isStale, ['span_wires.is_stale = :isStale']);
  add('isAssessed', query.isAssessed, ['(span_wires.grade is not null) = :isAssessed']);
  add('search', query.search === undefined ? undefined : containing(query.search), [
    `(lines.name ilike :search or sections.name ilike :search or conductor_types.name ilike :search
        or first_structure.name || '–' || second_structure.name ilike :search)`,
    ...searchNeeds,
  ]);
  return found;
}

/** One page of the risk table: the page is picked with as few tables as its order and filter need. */
export function listRisk(tx: UtilityTransaction, query: RiskQuery) {
  const { where, bindings, needs } = conditions(query);
  const { expression, type } = sortKeys[query.sort];
  const pickFrom = fromOf(needs);
  return keysetPage(tx, query, {
    schema: riskRowSchema.extend({ assessedAt: instantColumn.nullable() }),
    columns,
    from,
    pickFrom,
    where,
    bindings,
    key: { expression, type, direction: query.direction },
    id: 'span_wires.id',
    countFrom: pickFrom,
  });
}
