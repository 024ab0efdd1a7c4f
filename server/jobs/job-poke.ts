import type { Redis } from 'ioredis';
import { cancelChannel, outboxChannel } from '#shared/contract/jobs.ts';
import type { Logger } from '#server/platform/logger.ts';

/** Hints to the workers that something waits; the rows are the truth, so a lost hint costs a second, not the work. */
export interface JobPoke {
  outboxFilled(): void;
  cancelRequested(assessmentId: string): void;
}

/** Sends the hints over Redis; when Redis is away they are logged and the workers find the rows by themselves. */
export function jobPoke(redis: Pick<Redis, 'publish'>, logger: Logger): JobPoke {
  const send = (channel: string, message: string) => {
    redis
      .publish(channel, message)
      .catch((error: unknown) => logger.warn({ err: error, channel }, 'hint to the workers not sent'));
  };
  return {
    outboxFilled: () => send(outboxChannel, ''),
    cancelRequested: (assessmentId) => send(cancelChannel, assessmentId),
  };
}
