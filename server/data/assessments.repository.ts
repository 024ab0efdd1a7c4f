import { z } from 'zod';
import {
  assessmentSchema,
  type Assessment,
  type AssessmentState,
  type Selection,
} from '#shared/contract/assessments.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

const rowSchema = assessmentSchema.extend({
  createdAt: instantColumn,
  startedAt: instantColumn.nullable(),
  endedAt: instantColumn.nullable(),
});

const columns = `assessments.id, assessments.title, assessments.state, assessments.step, assessments.done_count, assessments.total_count,
  assessments.basis_id, bases.name as basis_name, bases.version_number as basis_version_number, assessments.cause,
  assessments.engine_version, assessments.methods, people.display_name as created_by_name, assessments.created_at,
  assessments.started_at, assessments.ended_at, assessments.failure_detail,
  (select json_build_object(
     'calm', count(*) filter (where grade = 'calm'), 'notice', count(*) filter (where grade = 'notice'),
     'act', count(*) filter (where grade = 'act'), 'urgent', count(*) filter (where grade = 'urgent'))
   from findings where findings.assessment_id = assessments.id) as grade_counts`;
const from = `assessments
  join bases on bases.id = assessments.basis_id
  left join people on people.id = assessments.created_by_person_id`;

export function findAssessment(tx: UtilityTransaction, assessmentId: string): Promise<Assessment | null> {
  return tx.first(rowSchema, `select ${columns} from ${from} where assessments.id = :assessmentId`, { assessmentId });
}

export function listAssessments(
  tx: UtilityTransaction,
  page: PageRequest & { states?: AssessmentState[] | undefined },
) {
  return keysetPage(tx, page, {
    schema: rowSchema,
    columns,
    from,
    where: page.states === undefined ? [] : ['assessments.state = any(:states::assessment_state[])'],
    bindings: page.states === undefined ? {} : { states: page.states },
    key: { expression: 'assessments.created_at', type: 'timestamptz', direction: 'descending' },
    id: 'assessments.id',
    countFrom: from,
  });
}

export interface NewAssessment {
  readonly id: string;
  readonly title: string;
  readonly basisId: string;
  readonly selection: Selection;
  readonly cause: 'engineer' | 'field-log';
}

export async function insertAssessment(tx: UtilityTransaction, assessment: NewAssessment): Promise<void> {
  await tx.run(
    `insert into assessments (id, utility_id, title, basis_id, selection, cause, created_by_person_id)
     values (:id, :utilityId, :title, :basisId, :selection::jsonb, :cause, :personId)`,
    { ...assessment, ...tx.actor, selection: JSON.stringify(assessment.selection) },
  );
}

/** Which of the picked things exist for this utility: how many rows the selection names and how many were found. */
export async function countSelection(
  tx: UtilityTransaction,
  selection: Selection,
): Promise<{ namedCount: number; foundCount: number }> {
  if (selection.kind === 'whole-network') return { namedCount: 0, foundCount: 0 };
  const [table, ids] =
    selection.kind === 'spans'
      ? (['spans', selection.spanIds] as const)
      : selection.kind === 'sections'
        ? (['sections', selection.sectionIds] as const)
        : (['lines', selection.lineIds] as const);
  const named = [...new Set(ids)];
  const row = await tx.first(
    z.object({ count: z.number() }),
    `select count(*)::int as count from ${table} where id = any(:named::uuid[])`,
    { named },
  );
  return { namedCount: named.length, foundCount: row?.count ?? 0 };
}

/**
 * Asks a live assessment to stop. A queued one ends at once; a running one ends when the worker sees the request.
 * False when it has ended already.
 */
export async function requestCancel(tx: UtilityTransaction, assessmentId: string): Promise<boolean> {
  const touched = await tx.run(
    `update assessments set cancel_requested_at = now(),
       state = case when state = 'queued' then 'cancelled' else state end,
       step = case when state = 'queued' then 'ended' else step end,
       ended_at = case when state = 'queued' then now() else ended_at end
     where id = :assessmentId and state in ('queued', 'running')`,
    { assessmentId },
  );
  return touched === 1;
}

/** Puts a failed or cancelled assessment back in the queue; finished chunks stay finished. Returns how often it was retried. */
export async function requeueAssessment(tx: UtilityTransaction, assessmentId: string): Promise<boolean> {
  const touched = await tx.run(
    `update assessments set state = 'queued', step = 'waiting', ended_at = null, cancel_requested_at = null, failure_detail = null
     where id = :assessmentId and state in ('failed', 'cancelled')`,
    { assessmentId },
  );
  return touched === 1;
}

const progressSchema = assessmentSchema.pick({ id: true, state: true, step: true, doneCount: true, totalCount: true });
export function findProgress(tx: UtilityTransaction, assessmentId: string) {
  return tx.first(
    progressSchema,
    'select id, state, step, done_count, total_count from assessments where id = :assessmentId',
    { assessmentId },
  );
}
