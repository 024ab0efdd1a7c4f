import { pino, type Logger } from 'pino';
import type { Config } from './config.ts';

export type { Logger };

/** Structured log of one process. */
export function openLogger(
  config: Pick<Config, 'STILLSPAN_LOG_LEVEL'>,
  processName: 'server' | 'worker' | 'cli',
): Logger {
  return pino({
    level: config.STILLSPAN_LOG_LEVEL,
    base: { process: processName },
  });
}
