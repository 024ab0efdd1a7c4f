import { createServer, type IncomingHttpHeaders, type Server, type ServerResponse } from 'node:http';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Problem } from '#shared/contract/problem.ts';
import type { Session } from '#shared/contract/session.ts';
import { ApiProblem } from './api-problem.ts';
import { addressOf, call, connectSession } from './call.ts';

const id = '3f1c9b9e-6f0b-4c53-9a55-0d4f0f6a1c11';
const session: Session = {
  person: { id, displayName: 'Ada Line', email: 'ada@example.org' },
  utility: { id, code: 'north', name: 'North Grid', currencyCode: 'EUR' },
  roles: ['engineer'],
  csrfToken: 'a-token',
  idleTimeoutMs: 1_800_000,
  tileUrl: null,
};
const problem = (code: Problem['code'], status: number): Problem => ({
  type: `/problems/${code}`,
  title: 'Refused',
  status,
  detail: 'Because of a test.',
  instance: '/api/v1/session',
  code,
  requestId: 'r-1',
  errors: [],
});

interface Seen {
  readonly method: string | undefined;
  readonly url: string | undefined;
  readonly headers: IncomingHttpHeaders;
}

let server: Server;
let seen: Seen[] = [];
let answer: (response: ServerResponse) => void;

function json(status: number, body: unknown): (response: ServerResponse) => void {
  return (response) => {
    response.writeHead(status, { 'content-type': 'application/json' });
    response.end(JSON.stringify(body));
  };
}

async function problemOf(promise: Promise<unknown>): Promise<Problem> {
  const error: unknown = await promise.then(
    () => null,
    (thrown: unknown) => thrown,
  );
  if (!(error instanceof ApiProblem)) throw new Error('expected an ApiProblem', { cause: error });
  return error.problem;
}

beforeEach(async () => {
  seen = [];
  server = createServer((request, response) => {
    seen.push({ method: request.method, url: request.url, headers: request.headers });
    request.resume();
    request.on('end', () => answer(response));
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  window.location.href = `http://127.0.0.1:${address.port}/`;
});
afterEach(async () => {
  connectSession({ csrfToken: () => '', onSignedOut: () => undefined });
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
});

describe('call', () => {
  it('parses what the contract promises', async () => {
    answer = json(200, session);
    expect(await call('getSession')).toEqual(session);
    expect(seen[0]).toMatchObject({ method: 'GET', url: '/api/v1/session' });
    expect(seen[0]?.headers['x-csrf-token']).toBeUndefined();
  });

  it('refuses an answer that breaks the contract', async () => {
    answer = json(200, { ...session, roles: ['wizard'] });
    await expect(call('getSession')).rejects.toThrow(/roles/);
  });

  it('turns a problem document into an ApiProblem', async () => {
    answer = json(403, problem('not-allowed', 403));
    expect(await problemOf(call('getSession'))).toMatchObject({ code: 'not-allowed', requestId: 'r-1' });
  });

  it('says when the session has ended, and only then', async () => {
    const onSignedOut = vi.fn();
    connectSession({ csrfToken: () => 'a-token', onSignedOut });
    answer = json(403, problem('not-allowed', 403));
    await problemOf(call('getSession'));
    expect(onSignedOut).not.toHaveBeenCalled();
    answer = json(401, problem('not-signed-in', 401));
    await problemOf(call('getSession'));
    expect(onSignedOut).toHaveBeenCalledOnce();
  });

  it('speaks plainly when the answer is no problem document', async () => {
    answer = (response) => response.writeHead(502).end('<h1>Bad gateway</h1>');
    expect((await problemOf(call('getSession'))).detail).toContain('502');
  });

  it('speaks plainly when nobody answers', async () => {
    await new Promise((resolve) => server.close(resolve));
    expect((await problemOf(call('getSession'))).code).toBe('upstream-failed');
  });
});

describe('addressOf', () => {
  it('fills parameters in, escaped', () => {
    expect(addressOf('getSection', { params: { sectionId: 'a/b' } })).toBe('/api/v1/sections/a%2Fb');
  });

  it('leaves empty questions out and joins lists', () => {
    expect(addressOf('getSession', { query: { grades: ['act', 'urgent'], line: undefined, text: '' } })).toBe(
      '/api/v1/session?grades=act%2Curgent',
    );
  });
});
