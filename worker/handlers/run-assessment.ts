import type { JobPayload } from '#shared/contract/jobs.ts';
import { ENGINE_VERSION } from '#shared/engine/index.ts';
import {
  countOpenChunks,
  endRun,
  lockRun,
  markRunning,
  readRunForFreezing,
} from '#server/data/assessment-run.repository.ts';
import type { Actor, UtilityTransaction } from '#server/data/database.ts';
import { askForJob } from '#server/data/outbox.ts';
import { finishRun } from '../assessment/finish-run.ts';
import { laneCount } from '../assessment/lane-count.ts';
import { freezeInput, FreezingStopped } from '../assessment/freeze-input.ts';
import type { WorkerContext } from '../context.ts';

async function askForLanes(tx: UtilityTransaction, assessmentId: string, turn: string): Promise<void> {
  const chunkCount = await countOpenChunks(tx, assessmentId);
  const lanes = Math.min(laneCount, chunkCount);
  for (let laneIndex = 0; laneIndex < lanes; laneIndex += 1) {
    const payload = { payloadVersion: 1 as const, utilityId: tx.actor.utilityId, assessmentId, laneIndex };
    await askForJob(tx, { name: 'compute-chunks', payload, dedupeKey: `compute-${assessmentId}-${laneIndex}-${turn}` });
  }
}

/** Takes the assessment up; false when it has ended or is asked to stop. */
async function takeUp(tx: UtilityTransaction, assessmentId: string): Promise<boolean> {
  const run = await lockRun(tx, assessmentId);
  if (run === null || (run.state !== 'queued' && run.state !== 'running')) return false;
  if (run.cancelRequestedAt !== null) {
    await endRun(tx, { assessmentId, state: 'cancelled', failureDetail: null });
    return false;
  }
  await markRunning(tx, assessmentId, ENGINE_VERSION);
  return true;
}

async function freezeAndAsk(
  tx: UtilityTransaction,
  run: { assessmentId: string; turn: string; signal: AbortSignal },
): Promise<void> {
  const { assessmentId, turn, signal } = run;
  const found = await readRunForFreezing(tx, assessmentId);
  if (found === null || found.state !== 'running') return;
  if (found.frozenAt === null) await freezeInput(tx, found, signal);
  await askForLanes(tx, assessmentId, turn);
  // Nothing to compute, or a run whose last chunk was done just before its worker died.
  await finishRun(tx, assessmentId);
}

async function freezeUnlessStopped(
  context: WorkerContext,
  actor: Actor,
  run: { assessmentId: string; turn: string },
): Promise<void> {
  const { signal, done } = context.cancels.watch(run.assessmentId);
  try {
    await context.database.withUtility(actor, (tx) => freezeAndAsk(tx, { ...run, signal }));
  } catch (error) {
    if (!(error instanceof FreezingStopped)) throw error;
    await context.database.withUtility(actor, (tx) => finishRun(tx, run.assessmentId));
  } finally {
    done();
  }
}

/**
 * Freezes the input of an assessment and asks for the lanes that compute it. `turn` names this run of the job: a later
 * run asks for lanes again. Running it twice changes nothing.
 */
export async function runAssessment(
  context: WorkerContext,
  payload: JobPayload<'run-assessment'>,
  turn: string,
): Promise<void> {
  const { utilityId, assessmentId } = payload;
  const actor = { utilityId, personId: null, requestId: null };
  const isLive = await context.database.withUtility(actor, (tx) => takeUp(tx, assessmentId));
  context.publishProgress('assessment', assessmentId);
  if (!isLive) return;
  await freezeUnlessStopped(context, actor, { assessmentId, turn });
  context.publishProgress('assessment', assessmentId);
  context.outboxFilled();
}
