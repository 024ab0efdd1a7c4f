import { z } from 'zod';
import type { JobName, JobPayload } from '#shared/contract/jobs.ts';
import type { UtilityTransaction } from './database.ts';

/** A job as it waits in the outbox; it exists exactly when the change that asked for it was committed. */
export const outboxRowSchema = z.object({
  id: z.coerce.string(),
  jobName: z.string(),
  payload: z.unknown(),
  dedupeKey: z.string(),
});
export type OutboxRow = z.infer<typeof outboxRowSchema>;

/** Asks for a job in the transaction of the change; the same dedupe key asks once only. */
export async function askForJob<N extends JobName>(
  tx: UtilityTransaction,
  job: { name: N; payload: JobPayload<N>; dedupeKey: string },
): Promise<void> {
  await tx.run(
    `insert into outbox (utility_id, job_name, payload, dedupe_key)
     values (:utilityId, :name, :payload::jsonb, :dedupeKey) on conflict (utility_id, dedupe_key) do nothing`,
    { utilityId: tx.actor.utilityId, name: job.name, payload: JSON.stringify(job.payload), dedupeKey: job.dedupeKey },
  );
}

/** Takes waiting rows for dispatch; locked, so that two dispatchers never take the same row. */
export async function takeWaitingJobs(tx: UtilityTransaction, limitCount: number): Promise<OutboxRow[]> {
  return tx.rows(
    outboxRowSchema,
    `select id, job_name, payload, dedupe_key from outbox where dispatched_at is null
     order by id limit :limitCount for update skip locked`,
    { limitCount },
  );
}

/** Marks rows as handed to the queue. */
export async function markDispatched(tx: UtilityTransaction, ids: readonly string[]): Promise<void> {
  await tx.run('update outbox set dispatched_at = now() where id = any(:ids::bigint[])', { ids });
}
