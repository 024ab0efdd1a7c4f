import { randomUUID } from 'node:crypto';
import { UnrecoverableError, Worker, type Job } from 'bullmq';
import type { Redis } from 'ioredis';
import { outboxChannel, progressChannel, queueNames, type QueueName } from '#shared/contract/jobs.ts';
import { endRun } from '#server/data/assessment-run.repository.ts';
import { openWaitingRedis } from '#server/platform/redis.ts';
import { cancelWatch } from './assessment/cancel-watch.ts';
import type { WorkerContext } from './context.ts';
import { dispatchOutbox } from './queue/dispatch-outbox.ts';
import { defaultPrefix, openJobQueues } from './queue/job-queues.ts';
import { repeating } from './queue/repeating.ts';
import { reconcile } from './reconciler.ts';
import { InvalidPayload, runJob } from './registry.ts';

type Given = Pick<WorkerContext, 'config' | 'database' | 'files' | 'logger' | 'mailer'>;

const dispatchEveryMs = 1000;
const reconcileEveryMs = 5000;
const progressEveryMs = 500;
const lockMs = 15_000;

/** Publishes at most twice a second for one row, the last move always. */
function throttledProgress(redis: Redis): WorkerContext['publishProgress'] {
  const waiting = new Map<string, NodeJS.Timeout>();
  return (kind, id) => {
    const channel = progressChannel(kind, id);
    if (waiting.has(channel)) return;
    const publish = () => {
      waiting.delete(channel);
      redis.publish(channel, '').catch(() => undefined);
    };
    waiting.set(channel, setTimeout(publish, progressEveryMs));
  };
}

async function attemptJob(context: WorkerContext, job: Job, stopped: AbortSignal): Promise<void> {
  const isLast = job.attemptsMade + 1 >= (job.opts.attempts ?? 1);
  try {
    await runJob(context, job, { turn: randomUUID(), isLast, signal: stopped });
  } catch (error) {
    if (error instanceof InvalidPayload) throw new UnrecoverableError(error.message);
    if (isLast) await failAssessmentOf(context, job, error);
    throw error;
  }
}

/** The last failure of an assessment's job ends the assessment and says why; done chunks stay for a retry. */
async function failAssessmentOf(context: WorkerContext, job: Job, error: unknown): Promise<void> {
  const data: unknown = job.data;
  const read = (key: string): unknown =>
    typeof data === 'object' && data !== null ? Reflect.get(data, key) : undefined;
  const [assessmentId, utilityId] = [read('assessmentId'), read('utilityId')];
  if (typeof assessmentId !== 'string' || typeof utilityId !== 'string') return;
  const failureDetail = error instanceof Error ? error.message.slice(0, 500) : 'unknown failure';
  const actor = { utilityId, personId: null, requestId: null };
  await context.database.withUtility(actor, (tx) => endRun(tx, { assessmentId, state: 'failed', failureDetail }));
  context.publishProgress('assessment', assessmentId);
}

function openWorkers(
  context: WorkerContext,
  connections: readonly Redis[],
  options: { prefix: string; stopped: AbortSignal },
): Worker[] {
  const concurrencyOf = (name: QueueName) =>
    name === 'mailing' ? 4 : name === 'importing' ? 1 : context.config.STILLSPAN_WORKER_CONCURRENCY;
  return queueNames.map((name, index) => {
    const worker = new Worker(name, (job) => attemptJob(context, job, options.stopped), {
      // One connection a queue: a worker blocks on its own.
      connection: connections[index] ?? failNoConnection(name),
      prefix: options.prefix,
      concurrency: concurrencyOf(name),
      lockDuration: lockMs,
      stalledInterval: lockMs / 2,
      maxStalledCount: 100,
    });
    worker.on('error', (error) => context.logger.warn({ err: error, queue: name }, 'queue connection'));
    worker.on('failed', (job, error) =>
      context.logger.error({ err: error, job: job?.name, jobId: job?.id }, 'job failed'),
    );
    return worker;
  });
}

function failNoConnection(name: QueueName): never {
  throw new Error(`no Redis connection for the queue ${name}`);
}

export interface RunningWorker {
  stop(): Promise<void>;
}

/** Starts dispatcher, reconciler and the handlers of every queue. */
export function startWorker(given: Given, redisUrl: string, prefix = defaultPrefix): RunningWorker {
  const { logger, database } = given;
  const redis = openWaitingRedis(redisUrl);
  const subscriber = openWaitingRedis(redisUrl);
  for (const connection of [redis, subscriber])
    connection.on('error', (error) => logger.warn({ err: error }, 'Redis connection'));
  const stopped = new AbortController();
  const queues = openJobQueues(redis, prefix);
  const dispatcher = repeating('outbox dispatch', dispatchEveryMs, {
    logger,
    run: () => dispatchOutbox({ database, queues, logger }),
  });
  const reconciler = repeating('reconciling', reconcileEveryMs, {
    logger,
    run: () => reconcile({ database, queues, logger }),
  });
  subscriber.on('message', (channel) => {
    if (channel === outboxChannel) dispatcher.now();
  });
  subscriber.subscribe(outboxChannel).catch((error: unknown) => logger.warn({ err: error }, 'cannot hear hints'));
  const context: WorkerContext = {
    ...given,
    cancels: cancelWatch(subscriber),
    publishProgress: throttledProgress(redis),
    outboxFilled: dispatcher.now,
  };
  const connections = queueNames.map(() => openWaitingRedis(redisUrl));
  const workers = openWorkers(context, connections, { prefix, stopped: stopped.signal });
  return {
    stop: async () => {
      await Promise.all([dispatcher.stop(), reconciler.stop()]);
      stopped.abort();
      await Promise.all(workers.map((worker) => worker.close()));
      await queues.close();
      for (const connection of connections) connection.disconnect();
      redis.disconnect();
      subscriber.disconnect();
    },
  };
}
