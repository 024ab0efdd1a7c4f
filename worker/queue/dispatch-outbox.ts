import { jobContracts, jobNames, type JobName } from '#shared/contract/jobs.ts';
import type { Database } from '#server/data/database.ts';
import { markDispatched, takeWaitingJobs } from '#server/data/outbox.ts';
import type { Logger } from '#server/platform/logger.ts';
import type { JobQueues } from './job-queues.ts';

const batchCount = 100;

function jobNameOf(name: string): JobName {
  const known = jobNames.find((candidate) => candidate === name);
  if (known === undefined) throw new Error(`the outbox names an unknown job: ${name}`);
  return known;
}

type IdMakers = { readonly [N in JobName]: (payload: unknown) => string };
const idMakers: IdMakers = {
  'run-assessment': (payload) => `assess-${jobContracts['run-assessment'].payload.parse(payload).assessmentId}`,
  'compute-chunks': (payload) => {
    const { assessmentId, laneIndex } = jobContracts['compute-chunks'].payload.parse(payload);
    return `lane-${assessmentId}-${laneIndex}`;
  },
  'run-import': (payload) => `import-${jobContracts['run-import'].payload.parse(payload).importId}`,
  'send-mail': (payload) => `mail-${jobContracts['send-mail'].payload.parse(payload).deliveryId}`,
};

/** Id of a job, from the row it works on: the same row never stands twice in a queue. */
export function jobIdOf(name: JobName, payload: unknown): string {
  return idMakers[name](payload);
}

async function dispatchUtility(database: Database, queues: JobQueues, utilityId: string): Promise<number> {
  return database.withUtility({ utilityId, personId: null, requestId: null }, async (tx) => {
    const waiting = await takeWaitingJobs(tx, batchCount);
    for (const { jobName, payload } of waiting) {
      const name = jobNameOf(jobName);
      await queues.add(name, payload, jobIdOf(name, payload));
    }
    if (waiting.length > 0)
      await markDispatched(
        tx,
        waiting.map(({ id }) => id),
      );
    return waiting.length;
  });
}

/**
 * Hands waiting outbox rows to the queues. A crash between the two leaves the row waiting and the job queued; the job id
 * keeps the second hand-over from doubling it.
 */
export async function dispatchOutbox(deps: { database: Database; queues: JobQueues; logger: Logger }): Promise<void> {
  for (const utilityId of await deps.database.utilityIds()) {
    let count = batchCount;
    while (count === batchCount) count = await dispatchUtility(deps.database, deps.queues, utilityId);
  }
}
