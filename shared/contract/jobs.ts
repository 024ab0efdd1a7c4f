import { z } from 'zod';
import { idSchema } from './paging.ts';

const rowPayload = <K extends string>(key: K) =>
  z.strictObject({ payloadVersion: z.literal(1), utilityId: idSchema, [key]: idSchema } as {
    payloadVersion: z.ZodLiteral<1>;
    utilityId: typeof idSchema;
  } & Record<K, typeof idSchema>);

const lanePayload = z.strictObject({
  payloadVersion: z.literal(1),
  utilityId: idSchema,
  assessmentId: idSchema,
  laneIndex: z.number().int().min(0).describe('Lanes of one assessment share its chunks; any worker may run any lane'),
});

/** Queues keep work of a kind together, so that mail does not wait behind computing. */
export const queueNames = ['computing', 'importing', 'mailing'] as const;
export type QueueName = (typeof queueNames)[number];

interface JobContract {
  readonly queue: QueueName;
  readonly payload: z.ZodType;
  readonly attemptCount: number;
  readonly backoffMs: number;
}

/** Every job: its payload (ids only, the handler reads the rows) and how often it is tried. */
export const jobContracts = {
  'run-assessment': { queue: 'computing', payload: rowPayload('assessmentId'), attemptCount: 5, backoffMs: 1000 },
  'compute-chunks': { queue: 'computing', payload: lanePayload, attemptCount: 5, backoffMs: 1000 },
  'run-import': { queue: 'importing', payload: rowPayload('importId'), attemptCount: 2, backoffMs: 1000 },
  'send-mail': { queue: 'mailing', payload: rowPayload('deliveryId'), attemptCount: 8, backoffMs: 2000 },
} as const satisfies Record<string, JobContract>;

export type JobName = keyof typeof jobContracts;
export type JobPayload<N extends JobName> = z.infer<(typeof jobContracts)[N]['payload']>;
export const jobNames = [
  'run-assessment',
  'compute-chunks',
  'run-import',
  'send-mail',
] as const satisfies readonly JobName[];

/** Redis channel that carries progress of one row; what is sent is advisory, the row is the truth. */
export function progressChannel(kind: 'assessment' | 'import', id: string): string {
  return `stillspan:progress:${kind}:${id}`;
}

/** Redis channels that hint to the workers: jobs wait in the outbox; an assessment is to stop (its id is the message). */
export const outboxChannel = 'stillspan:outbox';
export const cancelChannel = 'stillspan:cancel';
