import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { PersonSession } from '../support/person-session.ts';
import { startStack, type Stack } from '../support/stack.ts';

let stack: Stack;
beforeAll(async () => {
  stack = await startStack();
});
afterAll(() => stack.stop());

async function setFault(next: string): Promise<void> {
  const response = await fetch(`${stack.issuerUrl}/faults`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ next }),
  });
  expect(response.status).toBe(204);
}

describe('signing in', () => {
  it('brings a person to the page that was asked for, with the roles of the provider', async () => {
    const person = new PersonSession(stack.url);
    const landed = await person.signIn('tern-engineer', '/risk?grades=urgent');
    expect(landed.pathname + landed.search).toBe('/risk?grades=urgent');
    const { body } = await person.get('/session');
    expect(body).toMatchObject({
      roles: ['engineer'],
      utility: { code: 'tern' },
      person: { email: 'ines.halvorsen@tern.example' },
    });
  });

  it('sends PKCE, state and nonce', async () => {
    const response = await new PersonSession(stack.url).send('/auth/sign-in');
    const query = new URL(response.headers.get('location') ?? '').searchParams;
    expect(query.get('code_challenge_method')).toBe('S256');
    for (const key of ['code_challenge', 'state', 'nonce']) expect(query.get(key)?.length ?? 0).toBeGreaterThan(15);
  });

  it.each(['forged-signature', 'wrong-audience', 'wrong-nonce', 'wrong-issuer', 'expired'])(
    'refuses a token with %s',
    async (fault) => {
      await setFault(fault);
      const person = new PersonSession(stack.url);
      const landed = await person.signIn('tern-engineer');
      expect(landed.pathname).toBe('/signed-out');
      expect((await person.get('/session')).status).toBe(401);
      // The same person gets in when the provider behaves again.
      const again = new PersonSession(stack.url);
      await again.signIn('tern-engineer');
      expect((await again.get('/session')).status).toBe(200);
    },
  );

  it('refuses a code that was used before, and an answer with a foreign state', async () => {
    const person = new PersonSession(stack.url);
    const provider = await person.openProvider();
    let url = new URL(`${provider.href}/person`);
    let response = await person.send(url, {
      method: 'POST',
      headers: { 'content-type': 'application/x-www-form-urlencoded' },
      body: 'sub=tern-engineer',
    });
    while (!url.pathname.startsWith('/auth/callback')) {
      url = new URL(response.headers.get('location') ?? '', url);
      if (!url.pathname.startsWith('/auth/callback')) response = await person.send(url);
    }
    const thief = new PersonSession(stack.url);
    await thief.openProvider();
    expect((await thief.follow(url)).url.pathname).toBe('/signed-out');
    await person.follow(url);
    expect((await person.get('/session')).status).toBe(200);
    expect((await person.follow(url)).url.pathname).toBe('/signed-out');
  });

  it('makes a new session at sign-in, so that a session set by somebody else is worth nothing', async () => {
    const person = new PersonSession(stack.url);
    await person.openProvider();
    const before = person.cookieOf(stack.url, 'stillspan');
    await person.signIn('tern-crew');
    expect(before).toBeTruthy();
    expect(person.cookieOf(stack.url, 'stillspan')).not.toBe(before);
    const fixed = new PersonSession(stack.url);
    fixed.setCookie(stack.url, 'stillspan', before ?? '');
    expect((await fixed.get('/session')).status).toBe(401);
  });

  it('never sends a person to another site afterwards', async () => {
    const landed = await new PersonSession(stack.url).signIn('tern-crew', '//elsewhere.example/');
    expect(landed.origin).toBe(stack.url);
  });

  it('signs out here and at the provider', async () => {
    const person = new PersonSession(stack.url);
    await person.signIn('tern-manager');
    const refused = await person.send('/auth/sign-out', {
      method: 'POST',
      body: new URLSearchParams({ csrfToken: 'wrong' }),
    });
    expect(refused.status).toBe(403);
    const out = await person.send('/auth/sign-out', {
      method: 'POST',
      body: new URLSearchParams({ csrfToken: person.csrfToken }),
    });
    expect(out.headers.get('location')).toContain(`${stack.issuerUrl}/session/end`);
    expect((await person.get('/session')).status).toBe(401);
  });
});

describe('sessions and forgery', () => {
  it('ends a session after the absolute time, however busy it is', async () => {
    const person = new PersonSession(stack.url);
    await person.signIn('tern-admin');
    const { asSuperuser } = await import('#scripts/local/postgres.ts');
    const hours = stack.config.STILLSPAN_SESSION_ABSOLUTE_HOURS;
    await asSuperuser(stack.testDatabase.superuserUrl, (client) =>
      client.query(`update sign_in_sessions set sess = jsonb_set(sess::jsonb, '{passport,user,signedInAtMs}',
        to_jsonb((sess #>> '{passport,user,signedInAtMs}')::bigint - ${hours * 3_600_000 + 1000}))::json
        where sess #>> '{passport,user,personId}' is not null`),
    );
    expect((await person.get('/session')).status).toBe(401);
  });

  it('refuses changing calls without the token of the session', async () => {
    const person = new PersonSession(stack.url);
    await person.signIn('tern-engineer');
    const without = await person.send('/api/v1/assessments', {
      method: 'POST',
      body: '{}',
      headers: { 'content-type': 'application/json' },
    });
    expect(without.status).toBe(403);
    expect(await without.json()).toMatchObject({ code: 'csrf-refused' });
  });

  it('sets cookies that scripts cannot read, and a policy that lets no foreign script in', async () => {
    const response = await new PersonSession(stack.url).send('/auth/sign-in');
    expect(response.headers.getSetCookie().join()).toMatch(/HttpOnly/i);
    expect(response.headers.getSetCookie().join()).toMatch(/SameSite=Lax/i);
    expect(response.headers.get('content-security-policy')).toContain("script-src 'self';");
    expect(response.headers.get('x-powered-by')).toBeNull();
  });
});
