import { pino, type Logger } from 'pino';
import type { Config } from './config.ts';

export type { Logger };

/** Structured log of one process; cookies, tokens and addresses of people never enter it. */
export function openLogger(
  config: Pick<Config, 'STILLSPAN_LOG_LEVEL'>,
  processName: 'server' | 'worker' | 'cli',
): Logger {
  return pino({
    level: config.STILLSPAN_LOG_LEVEL,
    base: { process: processName },
    redact: ['req.headers.cookie', 'req.headers.authorization', 'req.headers["x-csrf-token"]'],
  });
}
