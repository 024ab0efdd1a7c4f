import { spawn, type ChildProcess } from 'node:child_process';
import { Redis } from 'ioredis';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { assessmentSchema } from '#shared/contract/assessments.ts';
import { asSuperuser } from '#scripts/local/postgres.ts';
import { projectDirectory } from '#scripts/setup.mjs';
import { makeNetwork, type Network } from '../support/network.ts';
import { PersonSession, until } from '../support/person-session.ts';
import { startStack, ternId, type Stack } from '../support/stack.ts';

let stack: Stack;
let network: Network;
let engineer: PersonSession;
const workers: ChildProcess[] = [];
/** The last database of Redis, so that emptying it touches no other test. */
const redisNumber = 15;

beforeAll(async () => {
  stack = await startStack();
  network = await makeNetwork(stack.database, ternId, {
    sectionCount: 25,
    spansPerSectionCount: 20,
    wireCount: 3,
    basis: { frequencyCount: 150, digestFromCount: 2 },
  });
  engineer = new PersonSession(stack.url);
  await engineer.signIn('tern-engineer');
  await new PersonSession(stack.url).signIn('tern-safety');
});
afterAll(async () => {
  for (const worker of workers) worker.kill('SIGKILL');
  await stack.stop();
});

/** A worker as a process of its own, so that it can be ended without warning. */
function startWorkerProcess(): ChildProcess {
  const { config } = stack;
  const given = Object.fromEntries(
    Object.entries(config).flatMap(([key, value]) => (value === undefined ? [] : [[key, String(value)]])),
  );
  const worker = spawn(process.execPath, ['--import', 'tsx', 'worker/main.ts'], {
    cwd: projectDirectory,
    env: { ...process.env, ...given, REDIS_URL: `${stack.redisUrl}/${redisNumber}`, STILLSPAN_LOG_LEVEL: 'error' },
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  workers.push(worker);
  return worker;
}

async function start(): Promise<string> {
  const body = { selection: { kind: 'lines', lineIds: [network.lineId] } };
  return assessmentSchema.parse((await engineer.call('POST', '/assessments', { body })).body).id;
}
const read = async (id: string) => assessmentSchema.parse((await engineer.get(`/assessments/${id}`)).body);

async function countsOf(assessmentId: string) {
  const result = await asSuperuser(stack.testDatabase.superuserUrl, (client) =>
    client.query(
      'select count(*)::int as all, count(distinct span_wire_id)::int as distinct from findings where assessment_id = $1',
      [assessmentId],
    ),
  );
  return z.object({ all: z.number(), distinct: z.number() }).parse(result.rows[0]);
}

async function messageCount(): Promise<number> {
  return z.array(z.unknown()).parse(await (await fetch(`${stack.mailUrl}/messages`)).json()).length;
}

const spanWireCount = 25 * 20 * 3;

describe('nothing is lost and nothing doubled', () => {
  it('when the worker is killed and Redis loses everything in the middle of an assessment', async () => {
    const first = startWorkerProcess();
    const id = await start();
    await until(
      () => read(id),
      ({ doneCount }) => doneCount > 0,
    );
    first.kill('SIGKILL');
    const redis = new Redis(`${stack.redisUrl}/${redisNumber}`);
    await redis.flushdb();
    redis.disconnect();
    const interrupted = await read(id);
    expect(interrupted.state).toBe('running');
    expect(interrupted.doneCount).toBeLessThan(spanWireCount);
    startWorkerProcess();
    const done = await until(
      () => read(id),
      ({ state }) => state === 'done',
      60_000,
    );
    expect(done.doneCount).toBe(spanWireCount);
    expect(await countsOf(id)).toEqual({ all: spanWireCount, distinct: spanWireCount });
    // All became Urgent at once, so the officer has one message that lists them; never a second.
    await until(messageCount, (count) => count >= 1);
    expect(await messageCount()).toBe(1);
  });

  it('when it is cancelled and taken up again: done chunks stay done, cancelling takes less than a second', async () => {
    const id = await start();
    const before = await until(
      () => read(id),
      ({ doneCount }) => doneCount > 0,
    );
    expect(before.state).toBe('running');
    const askedAt = Date.now();
    expect((await engineer.call('POST', `/assessments/${id}/cancel`)).status).toBe(200);
    const cancelled = await until(
      () => read(id),
      ({ state }) => state === 'cancelled',
      5000,
    );
    expect(Date.now() - askedAt).toBeLessThan(1000);
    expect(cancelled.doneCount).toBeLessThan(spanWireCount);
    expect((await engineer.call('POST', `/assessments/${id}/cancel`)).status).toBe(409);
    expect((await engineer.call('POST', `/assessments/${id}/retry`)).status).toBe(202);
    const done = await until(
      () => read(id),
      ({ state }) => state === 'done',
      60_000,
    );
    expect(done.doneCount).toBe(spanWireCount);
    expect(await countsOf(id)).toEqual({ all: spanWireCount, distinct: spanWireCount });
    expect(await messageCount()).toBe(1);
  });
});
