import type { JobPayload } from '#shared/contract/jobs.ts';
import { claimChunk, markChunkDone, setMethods } from '#server/data/assessment-run.repository.ts';
import type { Actor } from '#server/data/database.ts';
import { insertFindings } from '#server/data/findings.repository.ts';
import { assessChunk } from '../assessment/assess-chunk.ts';
import { finishRun } from '../assessment/finish-run.ts';
import type { WorkerContext } from '../context.ts';

async function computeNextChunk(
  context: WorkerContext,
  actor: Actor,
  lane: { assessmentId: string; signal: AbortSignal },
): Promise<boolean> {
  const { assessmentId, signal } = lane;
  return context.database.withUtility(actor, async (tx) => {
    const claimed = await claimChunk(tx, assessmentId);
    if (claimed === null) return false;
    const computed = await assessChunk(claimed.input, signal);
    if (computed === null) return false;
    const { chunkIndex, input } = claimed;
    await insertFindings(tx, { assessmentId, chunkIndex }, computed.findings);
    if (chunkIndex === 0) await setMethods(tx, assessmentId, computed.methods);
    await markChunkDone(tx, { assessmentId, chunkIndex, spanWireCount: input.items.length });
    return true;
  });
}

/** Computes chunks of an assessment until none is left, then ends it if it is complete. */
export async function computeChunks(context: WorkerContext, payload: JobPayload<'compute-chunks'>): Promise<void> {
  const { utilityId, assessmentId } = payload;
  const actor = { utilityId, personId: null, requestId: null };
  const { signal, done } = context.cancels.watch(assessmentId);
  try {
    while (await computeNextChunk(context, actor, { assessmentId, signal }))
      context.publishProgress('assessment', assessmentId);
    await context.database.withUtility(actor, (tx) => finishRun(tx, assessmentId));
  } finally {
    done();
  }
  context.publishProgress('assessment', assessmentId);
  context.outboxFilled();
}
