import RedisMock from 'ioredis-mock';
import { pino } from 'pino';
import { describe, expect, it } from 'vitest';
import { cancelChannel, outboxChannel, progressChannel } from '#shared/contract/jobs.ts';
import { jobPoke } from './job-poke.ts';
import { progressFeed } from './progress-feed.ts';

const row = { kind: 'assessment', id: '0198d3c2-7a50-7000-8000-000000000001' } as const;

describe('progressFeed', () => {
  it('reads the row when a message says that it moved, and ends with the row', async () => {
    const publisher = new RedisMock();
    const states = [
      { state: 'running', doneCount: 0 },
      { state: 'running', doneCount: 5 },
      { state: 'done', doneCount: 9 },
    ];
    let reads = 0;
    const read = () => Promise.resolve(states[Math.min(reads++, states.length - 1)] ?? null);
    const seen: number[] = [];
    const feed = progressFeed(new RedisMock()).follow(row, read, new AbortController().signal);
    for await (const progress of feed) {
      seen.push(progress.doneCount);
      void publisher.publish(progressChannel(row.kind, row.id), '');
    }
    expect(seen).toEqual([0, 5, 9]);
  });

  it('goes on by polling when no message ever comes', async () => {
    const states = [{ state: 'running' }, { state: 'done' }];
    const read = () => Promise.resolve(states.shift() ?? null);
    const seen: string[] = [];
    for await (const { state } of progressFeed(new RedisMock()).follow(row, read, new AbortController().signal))
      seen.push(state);
    expect(seen).toEqual(['running', 'done']);
  });

  it('stops when the client leaves', async () => {
    const left = new AbortController();
    const seen: string[] = [];
    const feed = progressFeed(new RedisMock()).follow(row, () => Promise.resolve({ state: 'running' }), left.signal);
    for await (const { state } of feed) {
      seen.push(state);
      left.abort();
    }
    expect(seen).toEqual(['running']);
  });
});

describe('jobPoke', () => {
  it('tells the workers what waits and what is to stop, and outlives a lost Redis', async () => {
    const subscriber = new RedisMock();
    const heard: string[] = [];
    subscriber.on('message', (channel: string, message: string) => heard.push(`${channel} ${message}`));
    await subscriber.subscribe(outboxChannel, cancelChannel);
    const poke = jobPoke(new RedisMock(), pino({ level: 'silent' }));
    poke.outboxFilled();
    poke.cancelRequested('a');
    await expect.poll(() => heard).toEqual([`${outboxChannel} `, `${cancelChannel} a`]);
    const lost = jobPoke({ publish: () => Promise.reject(new Error('Redis is away')) }, pino({ level: 'silent' }));
    expect(() => lost.outboxFilled()).not.toThrow();
  });
});
