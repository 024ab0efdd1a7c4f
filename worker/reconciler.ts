import { listLiveRuns } from '#server/data/assessment-run.repository.ts';
import type { Actor, Database } from '#server/data/database.ts';
import { listWaitingDeliveries } from '#server/data/deliveries.repository.ts';
import { listLiveImports } from '#server/data/import-runs.repository.ts';
import type { Logger } from '#server/platform/logger.ts';
import { laneCount } from './assessment/lane-count.ts';
import { jobIdOf } from './queue/dispatch-outbox.ts';
import type { JobQueues } from './queue/job-queues.ts';

interface Deps {
  readonly database: Database;
  readonly queues: JobQueues;
  readonly logger: Logger;
}

async function hasJob(queues: JobQueues, utilityId: string, assessmentId: string): Promise<boolean> {
  const base = { payloadVersion: 1 as const, utilityId, assessmentId };
  if (await queues.isLive('run-assessment', jobIdOf('run-assessment', base))) return true;
  for (let laneIndex = 0; laneIndex < laneCount; laneIndex += 1) {
    if (await queues.isLive('compute-chunks', jobIdOf('compute-chunks', { ...base, laneIndex }))) return true;
  }
  return false;
}

async function requeueRuns(deps: Deps, actor: Actor): Promise<void> {
  const { utilityId } = actor;
  for (const { id } of await deps.database.withUtility(actor, listLiveRuns)) {
    if (await hasJob(deps.queues, utilityId, id)) continue;
    const payload = { payloadVersion: 1 as const, utilityId, assessmentId: id };
    await deps.queues.add('run-assessment', payload, jobIdOf('run-assessment', payload));
    deps.logger.warn({ assessmentId: id, utilityId }, 'assessment without a job queued again');
  }
}

async function requeueImports(deps: Deps, actor: Actor): Promise<void> {
  for (const importId of await deps.database.withUtility(actor, listLiveImports)) {
    const payload = { payloadVersion: 1 as const, utilityId: actor.utilityId, importId };
    if (await deps.queues.isLive('run-import', jobIdOf('run-import', payload))) continue;
    await deps.queues.add('run-import', payload, jobIdOf('run-import', payload));
    deps.logger.warn({ importId, utilityId: actor.utilityId }, 'import without a job queued again');
  }
}

async function requeueMail(deps: Deps, actor: Actor): Promise<void> {
  for (const deliveryId of await deps.database.withUtility(actor, listWaitingDeliveries)) {
    const payload = { payloadVersion: 1 as const, utilityId: actor.utilityId, deliveryId };
    if (await deps.queues.isLive('send-mail', jobIdOf('send-mail', payload))) continue;
    await deps.queues.add('send-mail', payload, jobIdOf('send-mail', payload));
  }
}

/**
 * Gives every row that should have a job one again: after a Redis that lost its data, or a job that vanished. Rows
 * still in the outbox are the dispatcher's; adding their job here too is harmless, the job id is the same.
 */
export async function reconcile(deps: Deps): Promise<void> {
  for (const utilityId of await deps.database.utilityIds()) {
    const actor = { utilityId, personId: null, requestId: null };
    await requeueRuns(deps, actor);
    await requeueImports(deps, actor);
    await requeueMail(deps, actor);
  }
}
