import type { Grade } from '#shared/contract/grades.ts';
import type { Reason } from '#shared/contract/reasons.ts';
import type { UtilityTransaction } from './database.ts';

/** A finding as the worker writes it. */
export interface NewFinding {
  readonly id: string;
  readonly spanWireId: string;
  readonly itemIndex: number;
  readonly outcome: string;
  readonly grade: Grade;
  readonly utilisationRatio: number | null;
  readonly stressPa: number | null;
  readonly limitStressPa: number | null;
  readonly frequencyHz: number | null;
  readonly windSpeedMPerS: number | null;
  readonly amplitudeM: number | null;
  readonly lifeYears: number | null;
  readonly reasons: readonly Reason[];
  readonly warnings: readonly { code: string; text: string }[];
  readonly result: object;
}

/** Writes the findings of a chunk in one statement; findings that are there already stay as they are. */
export async function insertFindings(
  tx: UtilityTransaction,
  chunk: { assessmentId: string; chunkIndex: number },
  findings: readonly NewFinding[],
): Promise<void> {
  const rows = findings.map((finding) => ({
    id: finding.id,
    span_wire_id: finding.spanWireId,
    item_index: finding.itemIndex,
    outcome: finding.outcome,
    grade: finding.grade,
    utilisation_ratio: finding.utilisationRatio,
    stress_pa: finding.stressPa,
    limit_stress_pa: finding.limitStressPa,
    frequency_hz: finding.frequencyHz,
    wind_speed_m_per_s: finding.windSpeedMPerS,
    amplitude_m: finding.amplitudeM,
    life_years: finding.lifeYears,
    reasons: finding.reasons,
    warnings: finding.warnings,
    result: finding.result,
  }));
  await tx.run(
    `insert into findings (id, utility_id, assessment_id, chunk_index, span_wire_id, item_index, outcome, grade, utilisation_ratio,
       stress_pa, limit_stress_pa, frequency_hz, wind_speed_m_per_s, amplitude_m, life_years, reasons, warnings, result)
     select id, :utilityId, :assessmentId, :chunkIndex, span_wire_id, item_index, outcome, grade, utilisation_ratio,
       stress_pa, limit_stress_pa, frequency_hz, wind_speed_m_per_s, amplitude_m, life_years, reasons, warnings, result
     from jsonb_to_recordset(:rows::jsonb) as given (id uuid, span_wire_id uuid, item_index int, outcome outcome, grade grade,
       utilisation_ratio float8, stress_pa float8, limit_stress_pa float8, frequency_hz float8, wind_speed_m_per_s float8,
       amplitude_m float8, life_years float8, reasons jsonb, warnings jsonb, result jsonb)
     on conflict (assessment_id, span_wire_id) do nothing`,
    { ...chunk, utilityId: tx.actor.utilityId, rows: JSON.stringify(rows) },
  );
}

/**
 * Makes the findings of an assessment the current ones, except where a newer assessment has been there first, or where
 * an input changed after this one was frozen (then the finding is current but stale).
 */
export async function makeCurrent(tx: UtilityTransaction, assessmentId: string): Promise<void> {
  await tx.run(
    `update span_wires set current_finding_id = findings.id, grade = findings.grade, utilisation_ratio = findings.utilisation_ratio,
       assessed_at = findings.assessed_at, is_stale = changed.is_after, stale_reason = case when changed.is_after then 'A damper was fitted since the assessment' end
     from findings
     join assessments on assessments.id = findings.assessment_id
     cross join lateral (
       select exists (
         select from field_logs join placements on placements.id = field_logs.placement_id
         where placements.span_wire_id = findings.span_wire_id and field_logs.logged_at > assessments.frozen_at
       ) as is_after
     ) as changed
     where findings.assessment_id = :assessmentId and span_wires.id = findings.span_wire_id
       and not exists (
         select from findings as later_finding join assessments as later on later.id = later_finding.assessment_id
         where later_finding.id = span_wires.current_finding_id and later.frozen_at > assessments.frozen_at
       )`,
    { assessmentId },
  );
}
