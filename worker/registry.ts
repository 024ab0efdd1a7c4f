import { jobContracts, type JobName, type JobPayload } from '#shared/contract/jobs.ts';
import type { WorkerContext } from './context.ts';
import { computeChunks } from './handlers/compute-chunks.ts';
import { runAssessment } from './handlers/run-assessment.ts';
import { handleRunImport } from './handlers/run-import.ts';
import { sendMail } from './handlers/send-mail.ts';

/** One attempt at a job. */
export interface Attempt {
  /** Names this attempt; what a handler asks for in turn carries it, so that a later attempt asks again. */
  readonly turn: string;
  readonly isLast: boolean;
  readonly signal: AbortSignal;
}

type Handler<N extends JobName> = (context: WorkerContext, payload: JobPayload<N>, attempt: Attempt) => Promise<void>;
type Registry = { readonly [N in JobName]: Handler<N> };

/** The one map from job name to handler; a job without a handler does not compile. */
const registry: Registry = {
  'run-assessment': (context, payload, { turn }) => runAssessment(context, payload, turn),
  'compute-chunks': computeChunks,
  'run-import': (context, payload, { isLast, signal }) =>
    handleRunImport(
      {
        database: context.database,
        readFile: context.files.read,
        publishProgress: (importId) => context.publishProgress('import', importId),
        signal,
        requestId: null,
        isLastAttempt: isLast,
      },
      payload,
    ),
  'send-mail': (context, payload, { isLast }) => sendMail(context, payload, isLast),
};

/** Raised when a payload does not fit its contract; trying again would not help. */
export class InvalidPayload extends Error {
  override readonly name = 'InvalidPayload';
}

async function runNamed<N extends JobName>(
  context: WorkerContext,
  job: { name: N; data: unknown },
  attempt: Attempt,
): Promise<void> {
  const parsed = jobContracts[job.name].payload.safeParse(job.data);
  if (!parsed.success) throw new InvalidPayload(`${job.name}: ${parsed.error.message}`);
  const handler: Handler<N> = registry[job.name];
  // The schema is the one of this name; the compiler cannot follow the pair through the generic.
  await handler(context, parsed.data as JobPayload<N>, attempt);
}

export function isJobName(name: string): name is JobName {
  return Object.hasOwn(registry, name);
}

/** Runs a job by name. */
export async function runJob(
  context: WorkerContext,
  job: { name: string; data: unknown },
  attempt: Attempt,
): Promise<void> {
  if (!isJobName(job.name)) throw new InvalidPayload(`no handler for the job ${job.name}`);
  await runNamed(context, { name: job.name, data: job.data }, attempt);
}
