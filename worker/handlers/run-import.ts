import type { JobPayload } from '#shared/contract/jobs.ts';
import { failImport, runImport, type RunImportDeps } from '#worker/imports/run-import.ts';

export interface RunImportContext extends RunImportDeps {
  readonly signal: AbortSignal;
  readonly requestId: string | null;
  /** True when the queue will not try again after this attempt. */
  readonly isLastAttempt: boolean;
}

/** Runs one import; the last failed attempt marks the row, so that the user is told. */
export async function handleRunImport(context: RunImportContext, payload: JobPayload<'run-import'>): Promise<void> {
  const actor = { utilityId: payload.utilityId, personId: null, requestId: context.requestId };
  try {
    await runImport(context, actor, { importId: payload.importId, signal: context.signal });
  } catch (error) {
    if (context.isLastAttempt && !context.signal.aborted) await failImport(context.database, actor, payload.importId);
    throw error;
  }
}
