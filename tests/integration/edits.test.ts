import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { assessmentSchema } from '#shared/contract/assessments.ts';
import { fieldLogSchema, placementSchema } from '#shared/contract/placements.ts';
import { problemSchema } from '#shared/contract/problem.ts';
import { sectionSchema } from '#shared/contract/sections.ts';
import { makeNetwork, type Network } from '../support/network.ts';
import { PersonSession, until } from '../support/person-session.ts';
import { startStack, ternId, type Stack } from '../support/stack.ts';

let stack: Stack;
let network: Network;
let engineer: PersonSession;
let crew: PersonSession;

beforeAll(async () => {
  stack = await startStack();
  network = await makeNetwork(stack.database, ternId);
  [engineer, crew] = [new PersonSession(stack.url), new PersonSession(stack.url)];
  await engineer.signIn('tern-engineer');
  await crew.signIn('tern-crew');
  stack.startWorker();
});
afterAll(() => stack.stop());

const section = async () => sectionSchema.parse((await engineer.get(`/sections/${network.sectionIds[0]}`)).body);
const problem = (body: unknown) => problemSchema.parse(body);

async function assessAll() {
  const created = await engineer.call('POST', '/assessments', { body: { selection: { kind: 'whole-network' } } });
  const { id } = assessmentSchema.parse(created.body);
  await until(
    async () => assessmentSchema.parse((await engineer.get(`/assessments/${id}`)).body),
    ({ state }) => state === 'done',
  );
}

describe('two people who edit one wire', () => {
  it('the second is told what the first saved, and nothing is overwritten', async () => {
    await assessAll();
    const [wire] = (await section()).wires;
    const path = `/wires/${wire?.id}`;
    const without = await engineer.call('PATCH', path, { body: { tensionN: 21_000 } });
    expect(without).toMatchObject({ status: 412, body: { code: 'version-required' } });
    const first = await engineer.call('PATCH', path, { body: { tensionN: 21_000 }, headers: { 'if-match': '"1"' } });
    expect(first.status).toBe(200);
    expect(first.headers.get('etag')).toBe('"2"');
    const second = await engineer.call('PATCH', path, { body: { tensionN: 22_000 }, headers: { 'if-match': '"1"' } });
    expect(second.status).toBe(409);
    expect(problem(second.body)).toMatchObject({
      code: 'stale-version',
      current: { tensionN: 21_000, versionNumber: 2 },
      submitted: { tensionN: 22_000 },
    });
    const after = await section();
    const touched = after.spanWires.filter(({ wireId }) => wireId === wire?.id);
    expect(touched.every(({ isStale }) => isStale)).toBe(true);
    expect(after.spanWires.filter(({ wireId }) => wireId !== wire?.id).some(({ isStale }) => isStale)).toBe(false);
  });

  it.each([
    ['above the rated strength', { tensionN: 200_000 }, '/tensionN'],
    ['negative', { tensionN: -5 }, '/tensionN'],
    ['not a number', { tensionN: '20 kN' }, '/tensionN'],
    ['a conductor that is not there', { conductorTypeId: randomUUID() }, '/conductorTypeId'],
    ['a key that nobody knows', { tension: 1 }, '/'],
  ])('a tension that is %s is refused by name', async (_what, body, pointer) => {
    const [wire] = (await section()).wires;
    const version = `"${wire?.versionNumber}"`;
    const answer = await engineer.call('PATCH', `/wires/${wire?.id}`, { body, headers: { 'if-match': version } });
    expect(answer.status).toBe(400);
    expect(problem(answer.body).errors[0]?.pointer).toBe(pointer);
    expect((await section()).wires[0]).toEqual(wire);
  });

  it.each(['NaN', 'Infinity', '-Infinity'])('%s in JSON is refused with the name of the field', async (word) => {
    const [wire] = (await section()).wires;
    const answer = await engineer.call('PATCH', `/wires/${wire?.id}`, {
      body: `{"tensionN": ${word}}`,
      headers: { 'if-match': '"1"' },
    });
    expect(answer.status).toBe(400);
    expect(problem(answer.body)).toMatchObject({ code: 'malformed-body', errors: [{ pointer: '/tensionN' }] });
  });
});

describe('a fitted damper', () => {
  const log = (more: object) => ({
    id: randomUUID(),
    side: 'from',
    damperTypeId: network.damperTypeId,
    distanceM: 1.05,
    fittedAt: new Date().toISOString(),
    ...more,
  });

  it('replaces the planned one in the history, turns the finding stale and is assessed again', async () => {
    await assessAll();
    const spanWire = (await section()).spanWires[0];
    const spanWireId = spanWire?.id ?? '';
    const planned = placementSchema.parse(
      (
        await engineer.call('POST', '/placements', {
          body: { spanWireId, side: 'from', damperTypeId: network.damperTypeId, distanceM: 1 },
        })
      ).body,
    );
    const body = log({ spanWireId, replacesPlacementId: planned.id });
    const answer = await crew.call('POST', '/field/logs', { body });
    expect(answer.status).toBe(201);
    const saved = fieldLogSchema.parse(answer.body);
    expect(saved.placement).toMatchObject({ state: 'as-built', plannedDistanceM: 1, distanceM: 1.05 });
    expect(saved.gradeBefore).toBe(spanWire?.grade);
    const again = await crew.call('POST', '/field/logs', { body });
    expect(fieldLogSchema.parse(again.body).placement.id).toBe(saved.placement.id);
    const other = await crew.call('POST', '/field/logs', { body: { ...body, distanceM: 2 } });
    expect(other.status).toBe(409);
    const ended = (await section()).placements.find(({ id }) => id === planned.id);
    expect(ended?.endedAt).not.toBeNull();
    const fresh = await until(section, ({ spanWires }) => {
      const now = spanWires.find(({ id }) => id === spanWireId);
      return now?.isStale === false && now.findingId !== spanWire?.findingId;
    });
    const now = fresh.spanWires.find(({ id }) => id === spanWireId);
    expect(now?.utilisationRatio ?? 9).toBeLessThan(spanWire?.utilisationRatio ?? 0);
    const history = z
      .object({ items: z.array(z.unknown()) })
      .parse((await engineer.get(`/span-wires/${spanWireId}/findings`)).body);
    expect(history.items.length).toBeGreaterThanOrEqual(2);
  });

  it.each([
    ['beyond the middle of the span', { distanceM: 49 }, 201],
    ['beyond fifty metres', { distanceM: 51 }, 400],
    ['at no distance', { distanceM: 0 }, 400],
    ['fitted in the future', { fittedAt: '2099-01-01T00:00:00Z' }, 400],
    ['of an unknown type', { damperTypeId: randomUUID() }, 404],
    ['on an unknown wire', { spanWireId: randomUUID() }, 404],
    ['with a photo that was not uploaded', { photoFileId: randomUUID() }, 400],
  ])('%s is answered %o', async (_what, more, status) => {
    const spanWireId = (await section()).spanWires[4]?.id;
    const answer = await crew.call('POST', '/field/logs', { body: log({ spanWireId, ...more }) });
    expect(answer.status).toBe(status);
  });

  it('cannot sit within a centimetre of another', async () => {
    const spanWireId = (await section()).spanWires[5]?.id;
    expect((await crew.call('POST', '/field/logs', { body: log({ spanWireId }) })).status).toBe(201);
    const second = await crew.call('POST', '/field/logs', { body: log({ spanWireId, distanceM: 1.054 }) });
    expect(second.status).toBe(409);
    expect(problem(second.body).errors[0]?.pointer).toBe('/distanceM');
  });

  it('takes photos that are photos, once under an id', async () => {
    const fileId = randomUUID();
    const upload = (content: Uint8Array<ArrayBuffer>) => {
      const form = new FormData();
      form.append('file', new Blob([content]), 'photo.png');
      return crew.send(`/api/v1/field/photos/${fileId}`, {
        method: 'POST',
        body: form,
        headers: { 'x-csrf-token': crew.csrfToken },
      });
    };
    // A PNG of one pixel.
    const png = Uint8Array.from(
      Buffer.from(
        'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mNk+M9QDwADhgGAWjR9awAAAABJRU5ErkJggg==',
        'base64',
      ),
    );
    expect((await upload(Uint8Array.from(Buffer.from('<script>')))).status).toBe(400);
    expect((await upload(png)).status).toBe(201);
    expect((await upload(png)).status).toBe(201);
    const read = await crew.send(`/api/v1/field/photos/${fileId}`);
    expect(read.headers.get('content-type')).toBe('image/png');
    expect(new Uint8Array(await read.arrayBuffer())).toEqual(png);
  });
});

describe('uploads of lines', () => {
  const send = (content: string | Uint8Array<ArrayBuffer>, options: object) => {
    const form = new FormData();
    form.append('options', JSON.stringify(options));
    form.append('file', new Blob([content]), 'lines.csv');
    return engineer.send('/api/v1/imports', {
      method: 'POST',
      body: form,
      headers: { 'x-csrf-token': engineer.csrfToken },
    });
  };

  it('larger than the limit are refused', async () => {
    const answer = await send(new Uint8Array(50_000_000).fill(97), { kind: 'surveyed', format: 'csv' });
    expect(answer.status).toBe(413);
    expect(problem(await answer.json()).code).toBe('too-large');
  });

  it('that are not UTF-8 are refused', async () => {
    const answer = await send(Uint8Array.from([0xff, 0xfe, 0x41]), { kind: 'surveyed', format: 'csv' });
    expect(problem(await answer.json())).toMatchObject({ code: 'unsupported-file', errors: [{ pointer: '/file' }] });
  });

  it('of centre lines need assumptions', async () => {
    const answer = await send('line_name,voltage_kv,wkt\n', { kind: 'centre-line', format: 'csv' });
    expect(problem(await answer.json()).errors[0]?.pointer).toBe('/options/assumptions');
  });
});
