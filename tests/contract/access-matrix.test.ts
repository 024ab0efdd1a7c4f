import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RouteDefinition } from '#shared/contract/route.ts';
import { problemSchema } from '#shared/contract/problem.ts';
import { roles, type Role } from '#shared/contract/roles.ts';
import { apiRoutes } from '#shared/contract/routes.ts';
import { makeNetwork, type Network } from '../support/network.ts';
import { PersonSession } from '../support/person-session.ts';
import { skuaId, startStack, ternId, type Stack } from '../support/stack.ts';

const subjects: Record<Role, string> = {
  engineer: 'tern-engineer',
  crew: 'tern-crew',
  manager: 'tern-manager',
  'safety-officer': 'tern-safety',
  admin: 'tern-admin',
};
const routes: [string, RouteDefinition][] = Object.entries(apiRoutes);

let stack: Stack;
let own: Network;
let other: Network;
const people = new Map<string, PersonSession>();

async function signedIn(sub: string): Promise<PersonSession> {
  const known = people.get(sub);
  if (known !== undefined) return known;
  const person = new PersonSession(stack.url);
  await person.signIn(sub);
  people.set(sub, person);
  return person;
}

beforeAll(async () => {
  stack = await startStack();
  own = await makeNetwork(stack.database, ternId);
  other = await makeNetwork(stack.database, skuaId, { firstLatitudeDeg: -39 });
}, 120_000);
afterAll(() => stack.stop());

/** An id that exists for a path parameter where the network has one, else a fresh one. */
function idFor(parameter: string, network: Network): string {
  const known: Record<string, string | undefined> = {
    sectionId: network.sectionIds[0],
    structureId: network.structureIds[0],
    wireId: network.wireIds[0],
  };
  return known[parameter] ?? randomUUID();
}

function pathOf(definition: RouteDefinition, network: Network): string {
  return definition.path.replace(/:(\w+)/g, (_match, parameter: string) => idFor(parameter, network));
}

function send(person: PersonSession, definition: RouteDefinition, network: Network) {
  const method = definition.method.toUpperCase();
  // A body no route takes: a person who is let in is told what is wrong with it, others never get that far.
  const body = method === 'GET' ? {} : { body: { nonsense: true } };
  return person.call(method, pathOf(definition, network), { ...body, headers: { 'if-match': '"1"' } });
}

const isOpenTo = (definition: RouteDefinition, role: Role) =>
  definition.access === 'signed-in' || (typeof definition.access !== 'string' && definition.access.includes(role));

describe('every route', () => {
  it('says who may call it, and names the refusals it can give', () => {
    for (const [name, definition] of routes) {
      expect(definition.access, name).not.toBe('public');
      expect(definition.problems, name).toContain('not-signed-in');
      if (definition.access !== 'signed-in') expect(definition.problems, name).toContain('not-allowed');
      if (definition.needsVersion === true) expect(definition.problems, name).toContain('stale-version');
      if (definition.method !== 'get') expect(definition.problems, name).toContain('csrf-refused');
    }
  });

  it.each(routes)('%s is closed to people who are not signed in', async (_name, definition) => {
    const answer = await send(new PersonSession(stack.url), definition, own);
    expect(answer.status).toBe(401);
    expect(problemSchema.parse(answer.body).code).toBe('not-signed-in');
  });

  describe.each(roles)('for a %s', (role) => {
    it.each(routes)('%s is open or closed as declared', async (_name, definition) => {
      // Event streams stay open; their guard is the same code, and the assessment test reads one.
      const answer = await send(await signedIn(subjects[role]), definition, own);
      if (isOpenTo(definition, role)) {
        expect(answer.status).not.toBe(403);
        expect(answer.status).toBeLessThan(500);
      } else {
        expect(answer.status).toBe(403);
        expect(problemSchema.parse(answer.body).code).toBe('not-allowed');
      }
    });
  });
});

describe('between utilities', () => {
  const withId = routes.filter(([, definition]) => /:(sectionId|structureId|wireId)/.test(definition.path));
  it.each(withId)('%s does not find what belongs to another utility', async (_name, definition) => {
    const stranger = await signedIn('skua-engineer');
    const body = definition.method === 'patch' ? { body: { tensionN: 20_000 } } : {};
    const ask = (network: Network) =>
      stranger.call(definition.method.toUpperCase(), pathOf(definition, network), {
        ...body,
        headers: { 'if-match': '"1"' },
      });
    expect((await ask(own)).status).toBe(404);
    expect((await ask(other)).status).toBe(200);
  });

  it('lists show only what is one’s own', async () => {
    const stranger = await signedIn('skua-engineer');
    const admin = await signedIn('tern-admin');
    for (const path of [
      '/lines',
      '/spans',
      '/risk',
      '/catalogue/conductors',
      '/catalogue/damper-types',
      '/catalogue/bases',
    ]) {
      const seen = JSON.stringify((await stranger.get(path)).body);
      for (const id of [own.lineId, own.conductorTypeId, own.damperTypeId, own.basisId, ...own.spanIds])
        expect(seen).not.toContain(id);
    }
    expect(JSON.stringify((await stranger.get('/map/sections')).body)).not.toContain(own.sectionIds[0]);
    expect(JSON.stringify((await admin.get('/people')).body)).not.toContain('skua.example');
  });

  it('cannot assess or plan on another utility’s spans', async () => {
    const stranger = await signedIn('skua-engineer');
    const assessment = await stranger.call('POST', '/assessments', {
      body: { selection: { kind: 'spans', spanIds: own.spanIds } },
    });
    expect(assessment.status).toBe(400);
    const basis = await stranger.call('POST', '/assessments', {
      body: { basisId: own.basisId, selection: { kind: 'whole-network' } },
    });
    expect(basis.status).toBe(400);
  });
});

describe('answers', () => {
  it.each(routes.filter(([, { method, answers }]) => method === 'get' && answers === undefined))(
    '%s fits the contract',
    async (_name, definition) => {
      const role =
        definition.access === 'signed-in' ? 'engineer' : roles.find((candidate) => isOpenTo(definition, candidate));
      const answer = await (await signedIn(subjects[role ?? 'engineer'])).get(pathOf(definition, own));
      if (answer.status !== 200) {
        expect(problemSchema.parse(answer.body).code).toBe('not-found');
        return;
      }
      expect(definition.response?.safeParse(answer.body).error).toBeUndefined();
    },
  );

  it('are described by an OpenAPI document with every route', async () => {
    const response = await fetch(`${stack.url}/api/v1/openapi.json`);
    const document = JSON.stringify(await response.json());
    for (const [name] of routes) expect(document).toContain(`"operationId":"${name}"`);
    expect((await fetch(`${stack.url}/api/v1/`)).headers.get('content-type')).toContain('text/html');
  });
});
