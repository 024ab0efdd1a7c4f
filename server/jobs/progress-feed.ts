import { EventEmitter, once } from 'node:events';
import type { Redis } from 'ioredis';
import { progressChannel } from '#shared/contract/jobs.ts';

const pollMs = 1500;

/** Follows the progress of one row until it ends. */
export interface ProgressFeed {
  follow<P extends { state: string }>(
    row: { kind: 'assessment' | 'import'; id: string },
    read: () => Promise<P | null>,
    signal: AbortSignal,
  ): AsyncIterable<P>;
}

const endStates = new Set(['done', 'failed', 'cancelled', 'refused']);

/**
 * Messages on Redis only say that a row has moved; what is sent on is read from the row. A poll stands behind them, so
 * that progress goes on (more slowly) without Redis.
 */
export function progressFeed(subscriber: Pick<Redis, 'subscribe' | 'unsubscribe' | 'on'>): ProgressFeed {
  const moved = new EventEmitter();
  moved.setMaxListeners(0);
  subscriber.on('message', (channel: string) => moved.emit(channel));
  const nextMove = async (channel: string, signal: AbortSignal) => {
    const timeout = AbortSignal.any([signal, AbortSignal.timeout(pollMs)]);
    // The wait ends by a message, by the poll or because the client left: all three lead to the same next read.
    await once(moved, channel, { signal: timeout }).catch(() => undefined);
  };
  return {
    async *follow(row, read, signal) {
      const channel = progressChannel(row.kind, row.id);
      if (moved.listenerCount(channel) === 0) subscriber.subscribe(channel).catch(() => undefined);
      let last = '';
      while (!signal.aborted) {
        const next = nextMove(channel, signal);
        const progress = await read();
        if (progress === null) return;
        const text = JSON.stringify(progress);
        if (text !== last) yield progress;
        last = text;
        if (endStates.has(progress.state)) return;
        await next;
      }
    },
  };
}
