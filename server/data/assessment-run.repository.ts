import { z } from 'zod';
import { basisSpecSchema } from '#shared/contract/bases.ts';
import { assessmentStateSchema, selectionSchema } from '#shared/contract/assessments.ts';
import type { UtilityTransaction } from './database.ts';
import { frozenChunkSchema, type FrozenChunk } from './frozen-input.ts';
import { instantColumn } from './rows.ts';

const runSchema = z.object({
  id: z.uuid(),
  state: assessmentStateSchema,
  selection: selectionSchema,
  frozenAt: instantColumn.nullable(),
  cancelRequestedAt: instantColumn.nullable(),
  totalCount: z.number(),
  basisName: z.string(),
  basisVersionNumber: z.number(),
  basisSpec: basisSpecSchema,
});
export type AssessmentRun = z.infer<typeof runSchema>;

const selectRun = `select assessments.id, assessments.state, assessments.selection, assessments.frozen_at,
    assessments.cancel_requested_at, assessments.total_count, bases.name as basis_name,
    bases.version_number as basis_version_number, bases.spec as basis_spec
  from assessments join bases on bases.id = assessments.basis_id where assessments.id = :assessmentId`;

/** The row of an assessment, locked against other workers until the transaction ends. */
export function lockRun(tx: UtilityTransaction, assessmentId: string): Promise<AssessmentRun | null> {
  return tx.first(runSchema, `${selectRun} for update of assessments`, { assessmentId });
}

/**
 * The row of an assessment for freezing its input: other workers that would freeze it wait, but the row itself stays
 * free, so that a cancel request does not.
 */
export async function readRunForFreezing(tx: UtilityTransaction, assessmentId: string): Promise<AssessmentRun | null> {
  await tx.run('select pg_advisory_xact_lock(hashtextextended(:assessmentId, 1))', { assessmentId });
  return tx.first(runSchema, selectRun, { assessmentId });
}

export async function markRunning(tx: UtilityTransaction, assessmentId: string, engineVersion: string): Promise<void> {
  await tx.run(
    `update assessments set state = 'running', step = case when frozen_at is null then 'freezing-input' else 'computing' end,
       started_at = coalesce(started_at, now()), engine_version = :engineVersion where id = :assessmentId`,
    { assessmentId, engineVersion },
  );
}

/** Writes the frozen chunks in one statement a batch. */
export async function insertChunks(
  tx: UtilityTransaction,
  assessmentId: string,
  chunks: readonly { chunkIndex: number; input: FrozenChunk }[],
): Promise<void> {
  const rows = chunks.map(({ chunkIndex, input }) => ({
    chunk_index: chunkIndex,
    span_wire_count: input.items.length,
    input,
  }));
  await tx.run(
    `insert into assessment_chunks (assessment_id, chunk_index, utility_id, span_wire_count, input)
     select :assessmentId, chunk_index, :utilityId, span_wire_count, input
     from jsonb_to_recordset(:rows::jsonb) as given (chunk_index int, span_wire_count int, input jsonb)`,
    { assessmentId, utilityId: tx.actor.utilityId, rows: JSON.stringify(rows) },
  );
}

export async function markFrozen(tx: UtilityTransaction, assessmentId: string, totalCount: number): Promise<void> {
  await tx.run(
    `update assessments set frozen_at = clock_timestamp(), total_count = :totalCount, step = 'computing' where id = :assessmentId`,
    { assessmentId, totalCount },
  );
}

/**
 * Claims the next chunk that nobody has done. The row lock is the claim: it ends with the transaction, so a worker that
 * dies gives its chunk back at once.
 */
export function claimChunk(tx: UtilityTransaction, assessmentId: string) {
  return tx.first(
    z.object({ chunkIndex: z.number(), input: frozenChunkSchema }),
    `select assessment_chunks.chunk_index, assessment_chunks.input from assessment_chunks
     join assessments on assessments.id = assessment_chunks.assessment_id
     where assessment_chunks.assessment_id = :assessmentId and assessment_chunks.done_at is null
       and assessments.state = 'running' and assessments.cancel_requested_at is null
     order by assessment_chunks.chunk_index limit 1 for update of assessment_chunks skip locked`,
    { assessmentId },
  );
}

export async function markChunkDone(
  tx: UtilityTransaction,
  chunk: { assessmentId: string; chunkIndex: number; spanWireCount: number },
): Promise<void> {
  const done = await tx.run(
    'update assessment_chunks set done_at = clock_timestamp() where assessment_id = :assessmentId and chunk_index = :chunkIndex and done_at is null',
    chunk,
  );
  if (done === 1)
    await tx.run('update assessments set done_count = done_count + :spanWireCount where id = :assessmentId', chunk);
}

/** How many chunks are not done. */
export async function countOpenChunks(tx: UtilityTransaction, assessmentId: string): Promise<number> {
  const row = await tx.first(
    z.object({ count: z.number() }),
    'select count(*)::int as count from assessment_chunks where assessment_id = :assessmentId and done_at is null',
    { assessmentId },
  );
  return row?.count ?? 0;
}

/** Ends a live assessment; an ended one stays as it is. */
export async function endRun(
  tx: UtilityTransaction,
  end: { assessmentId: string; state: 'done' | 'failed' | 'cancelled'; failureDetail: string | null },
): Promise<boolean> {
  const ended = await tx.run(
    `update assessments set state = :state::assessment_state, step = 'ended', ended_at = clock_timestamp(), failure_detail = :failureDetail
     where id = :assessmentId and state in ('queued', 'running')`,
    end,
  );
  return ended === 1;
}

/** Assessments that should have a job: queued or running ones, oldest first. */
export function listLiveRuns(tx: UtilityTransaction) {
  return tx.rows(
    z.object({ id: z.uuid(), isFrozen: z.boolean(), isCancelRequested: z.boolean() }),
    `select id, frozen_at is not null as is_frozen, cancel_requested_at is not null as is_cancel_requested
     from assessments where state in ('queued', 'running') order by created_at limit 200`,
  );
}

/** Adds method notes to those an assessment names already. */
export async function setMethods(
  tx: UtilityTransaction,
  assessmentId: string,
  methods: readonly { name: string; standing: string; source: string }[],
): Promise<void> {
  await tx.run('update assessments set methods = :methods::jsonb where id = :assessmentId', {
    assessmentId,
    methods: JSON.stringify(methods),
  });
}
