import { z } from 'zod';
import { assessmentFindingSchema, type assessmentRoutes } from '#shared/contract/assessments.ts';
import { findingSchema, findingSummarySchema, type Finding } from '#shared/contract/findings.ts';
import type { QueryOf } from '#shared/contract/route.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { frozenChunkSchema, frozenCase, type FrozenCase } from './frozen-input.ts';
import { instantColumn } from './rows.ts';

const summaryColumns = `findings.id, findings.assessment_id, findings.span_wire_id, findings.outcome, findings.grade,
  findings.utilisation_ratio, findings.stress_pa, findings.limit_stress_pa, findings.frequency_hz, findings.wind_speed_m_per_s,
  findings.amplitude_m, findings.life_years, findings.reasons, findings.assessed_at`;
const spanLabel = `first_structure.name || '–' || second_structure.name as span_label`;
const placeJoins = `
  join span_wires on span_wires.id = findings.span_wire_id
  join wires on wires.id = span_wires.wire_id
  join spans on spans.id = span_wires.span_id
  join lines on lines.id = spans.line_id
  join structures as first_structure on first_structure.id = spans.from_structure_id
  join structures as second_structure on second_structure.id = spans.to_structure_id`;
const basisJoins = `
  join assessments on assessments.id = findings.assessment_id
  join bases on bases.id = assessments.basis_id`;
const dated = { assessedAt: instantColumn };

const detailRow = findingSchema
  .omit({ input: true })
  .extend({ ...dated, chunkIndex: z.number(), itemIndex: z.number() });

async function readFrozen(
  tx: UtilityTransaction,
  place: { assessmentId: string; chunkIndex: number; itemIndex: number },
): Promise<FrozenCase> {
  const chunk = await tx.first(
    z.object({ input: frozenChunkSchema }),
    'select input from assessment_chunks where assessment_id = :assessmentId and chunk_index = :chunkIndex',
    { assessmentId: place.assessmentId, chunkIndex: place.chunkIndex },
  );
  if (chunk === null) throw new Error(`the frozen input of assessment ${place.assessmentId} is missing`);
  return frozenCase(chunk.input, place.itemIndex);
}

/** A finding with the input it was computed from, or null. */
export async function readFinding(
  tx: UtilityTransaction,
  findingId: string,
): Promise<{ finding: Finding; frozen: FrozenCase } | null> {
  const row = await tx.first(
    detailRow,
    `select ${summaryColumns}, findings.chunk_index, findings.item_index, findings.warnings, ${spanLabel}, wires.name as wire_name,
       span_wires.section_id, span_wires.current_finding_id = findings.id as is_current, bases.name as basis_name,
       bases.version_number as basis_version_number, assessments.engine_version, assessments.methods
     from findings ${placeJoins} ${basisJoins} where findings.id = :findingId`,
    { findingId },
  );
  if (row === null) return null;
  const { chunkIndex, itemIndex, ...finding } = row;
  const frozen = await readFrozen(tx, { assessmentId: row.assessmentId, chunkIndex, itemIndex });
  return { finding: { ...finding, input: { ...frozen } }, frozen };
}

/** Every finding of a span wire, newest first. */
export function listSpanWireFindings(tx: UtilityTransaction, spanWireId: string, page: PageRequest) {
  const from = `findings ${basisJoins}`;
  return keysetPage(tx, page, {
    schema: findingSummarySchema.extend({ ...dated, basisName: z.string(), basisVersionNumber: z.number() }),
    columns: `${summaryColumns}, bases.name as basis_name, bases.version_number as basis_version_number`,
    from,
    where: ['findings.span_wire_id = :spanWireId', `assessments.state = 'done'`],
    bindings: { spanWireId },
    key: { expression: 'findings.assessed_at', type: 'timestamptz', direction: 'descending' },
    id: 'findings.id',
    countFrom: from,
  });
}

/** Findings of an assessment, worst first. */
export function listAssessmentFindings(
  tx: UtilityTransaction,
  assessmentId: string,
  query: QueryOf<typeof assessmentRoutes.listAssessmentFindings>,
) {
  const where = ['findings.assessment_id = :assessmentId'];
  if (query.grades !== undefined) where.push('findings.grade = any(:grades::grade[])');
  return keysetPage(tx, query, {
    schema: assessmentFindingSchema.extend(dated),
    columns: `${summaryColumns}, spans.id as span_id, span_wires.section_id, ${spanLabel}, wires.name as wire_name, lines.name as line_name`,
    from: `findings ${placeJoins}`,
    where,
    bindings: { assessmentId, grades: query.grades ?? null },
    // Grade and utilisation in one number: the grade first, the ratio inside it.
    key: {
      expression: `(array_position(enum_range(null::grade), findings.grade) * 1000 + least(coalesce(findings.utilisation_ratio, 0), 999))`,
      type: 'double precision',
      direction: 'descending',
    },
    id: 'findings.id',
    countFrom: 'findings',
  });
}
