import { z } from 'zod';
import { importOptionsSchema, importStates, type ImportError, type ImportRun } from '#shared/contract/imports.ts';
import { notFound } from '#server/platform/errors.ts';
import type { UtilityTransaction } from './database.ts';

const storedRunSchema = z.object({
  id: z.uuid(),
  fileId: z.uuid(),
  options: importOptionsSchema,
  state: z.enum(importStates),
});
export type StoredImportRun = z.infer<typeof storedRunSchema>;

/** The import as it was asked for. */
export async function readImportRun(tx: UtilityTransaction, importId: string): Promise<StoredImportRun> {
  const run = await tx.first(
    storedRunSchema,
    'select id, file_id, options, state from import_runs where id = :importId',
    { importId },
  );
  if (run === null) throw notFound('import', importId);
  return run;
}

/** Holds off a second run of the same import until this transaction ends. */
export async function lockImportRun(tx: UtilityTransaction, importId: string): Promise<StoredImportRun> {
  await tx.run('select pg_advisory_xact_lock(hashtextextended(:importId, 0))', { importId });
  return readImportRun(tx, importId);
}

export type ImportProgress = Pick<ImportRun, 'step' | 'doneCount' | 'totalCount'>;

/** Notes how far an import is; an import that has ended stays as it is. */
export async function noteImportProgress(
  tx: UtilityTransaction,
  importId: string,
  progress: ImportProgress,
): Promise<void> {
  await tx.run(
    `update import_runs set state = 'running', step = :step, done_count = :doneCount, total_count = :totalCount
     where id = :importId and ended_at is null`,
    { importId, ...progress },
  );
}

export interface ImportEnding {
  readonly state: 'done' | 'refused' | 'failed';
  readonly counts: ImportRun['counts'];
  readonly errors: readonly ImportError[];
  readonly errorCount: number;
  readonly notices: readonly ImportError[];
  readonly extentDeg: readonly number[] | null;
}

/** Ends an import with what came of it; one that has ended stays as it is. Returns whether this call ended it. */
export async function endImportRun(tx: UtilityTransaction, importId: string, ending: ImportEnding): Promise<boolean> {
  const { state, counts, errors, errorCount, notices, extentDeg } = ending;
  const endedCount = await tx.run(
    `update import_runs set state = :state::import_state, step = 'ended', counts = :counts::jsonb,
       errors = :errors::jsonb, error_count = :errorCount, notices = :notices::jsonb,
       extent_deg = :extentDeg::double precision[], ended_at = now(),
       done_count = case when :state = 'done' then total_count else done_count end
     where id = :importId and ended_at is null`,
    {
      importId,
      state,
      errorCount,
      counts: counts === null ? null : JSON.stringify(counts),
      errors: JSON.stringify(errors),
      notices: JSON.stringify(notices),
      extentDeg: extentDeg === null ? null : [...extentDeg],
    },
  );
  return endedCount > 0;
}
