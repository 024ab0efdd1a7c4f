import { Queue, type JobsOptions } from 'bullmq';
import type { Redis } from 'ioredis';
import { jobContracts, queueNames, type JobName, type QueueName } from '#shared/contract/jobs.ts';

/** Prefix of the keys in Redis; tests that share one Redis set their own. */
export const defaultPrefix = 'stillspan';

export interface JobQueues {
  /** Adds a job; an id that is in the queue already is not added again. */
  add(name: JobName, payload: unknown, jobId: string): Promise<void>;
  /** True when a job with the id waits, runs or is to be tried again. */
  isLive(name: JobName, jobId: string): Promise<boolean>;
  close(): Promise<void>;
}

function optionsOf(name: JobName, jobId: string): JobsOptions {
  const { attemptCount, backoffMs } = jobContracts[name];
  return {
    jobId,
    attempts: attemptCount,
    backoff: { type: 'exponential', delay: backoffMs, jitter: 0.3 },
    removeOnComplete: true,
    removeOnFail: { count: 500 },
  };
}

/** Opens the producing side of every queue. */
export function openJobQueues(connection: Redis, prefix: string): JobQueues {
  const queues = new Map<QueueName, Queue>(queueNames.map((name) => [name, new Queue(name, { connection, prefix })]));
  const queueOf = (name: JobName): Queue => {
    const queue = queues.get(jobContracts[name].queue);
    if (queue === undefined) throw new Error(`no queue for ${name}`);
    return queue;
  };
  const liveStates = new Set(['waiting', 'active', 'delayed', 'prioritized', 'waiting-children']);
  return {
    add: async (name, payload, jobId) => {
      const queue = queueOf(name);
      const former = await queue.getJob(jobId);
      // A failed job keeps its id; without this the id could never be queued again.
      if (former !== undefined && !liveStates.has(await former.getState())) await former.remove();
      await queue.add(name, payload, optionsOf(name, jobId));
    },
    isLive: async (name, jobId) => {
      const job = await queueOf(name).getJob(jobId);
      return job !== undefined && liveStates.has(await job.getState());
    },
    close: async () => {
      await Promise.all([...queues.values()].map((queue) => queue.close()));
    },
  };
}
