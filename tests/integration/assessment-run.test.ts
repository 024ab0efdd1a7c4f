import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { alertSchema } from '#shared/contract/alerts.ts';
import { assessmentSchema } from '#shared/contract/assessments.ts';
import { findingSchema, findingSeriesSchema } from '#shared/contract/findings.ts';
import { riskRowSchema } from '#shared/contract/risk.ts';
import { makeNetwork, type Network } from '../support/network.ts';
import { PersonSession, until } from '../support/person-session.ts';
import { startStack, ternId, type Stack } from '../support/stack.ts';

let stack: Stack;
let network: Network;
let engineer: PersonSession;
let safety: PersonSession;

beforeAll(async () => {
  stack = await startStack();
  network = await makeNetwork(stack.database, ternId, {
    spansPerSectionCount: 5,
    wireCount: 3,
    tensionRatedRatio: 0.25,
    basis: { frequencyCount: 150 },
  });
  engineer = new PersonSession(stack.url);
  safety = new PersonSession(stack.url);
  await safety.signIn('tern-safety');
  await engineer.signIn('tern-engineer');
  stack.startWorker();
});
afterAll(() => stack.stop());

async function assess(body: object) {
  const created = await engineer.call('POST', '/assessments', { body });
  expect(created.status).toBe(202);
  const { id } = assessmentSchema.parse(created.body);
  return until(
    async () => assessmentSchema.parse((await engineer.get(`/assessments/${id}`)).body),
    ({ state }) => state === 'done' || state === 'failed',
  );
}

async function messages() {
  const response = await fetch(`${stack.mailUrl}/messages`);
  return z
    .array(z.object({ to: z.array(z.string()), subject: z.string(), text: z.string(), messageId: z.string() }))
    .parse(await response.json());
}

describe('an assessment, from picking to mail', () => {
  it('computes every span wire of the picked spans, with reasons, and makes one alert and one message each', async () => {
    const done = await assess({ selection: { kind: 'spans', spanIds: network.spanIds }, title: 'All five' });
    expect(done).toMatchObject({ state: 'done', totalCount: 15, doneCount: 15, failureDetail: null });
    expect(done.methods.length).toBeGreaterThan(3);
    const risk = z
      .object({ items: z.array(riskRowSchema), totalCount: z.number() })
      .parse((await engineer.get('/risk?limitCount=500')).body);
    expect(risk.totalCount).toBe(15);
    for (const row of risk.items) {
      expect(row.grade).toBe('urgent');
      expect(row.utilisationRatio).toBeCloseTo((row.stressPa ?? 0) / (row.limitStressPa ?? 1), 9);
      expect(row.leadingReason?.code).toBe('stress-against-limit');
    }
    const alerts = z.object({ items: z.array(alertSchema) }).parse((await safety.get('/alerts?limitCount=100')).body);
    expect(alerts.items).toHaveLength(15);
    const sent = await until(messages, (list) => list.length >= 15);
    expect(sent).toHaveLength(15);
    expect(new Set(sent.map(({ messageId }) => messageId)).size).toBe(15);
    expect(sent[0]?.to).toEqual(['ruth.kealoha@tern.example']);
    expect(sent[0]?.text).toMatch(/Bending stress at the clamp of structure \d reaches/);
    expect(sent[0]?.text).toContain(`${stack.url}/sections/${network.sectionIds[0]}?span=`);
  });

  it('keeps the input with the finding and computes the same figures from it again', async () => {
    const risk = z.object({ items: z.array(riskRowSchema) }).parse((await engineer.get('/risk?limitCount=1')).body);
    const findingId = risk.items[0]?.findingId ?? '';
    const finding = findingSchema.parse((await engineer.get(`/findings/${findingId}`)).body);
    expect(finding.isCurrent).toBe(true);
    expect(finding.input).toMatchObject({ item: { spanLengthM: 350 }, conductor: { diameterM: 0.028143 } });
    const series = findingSeriesSchema.parse((await engineer.get(`/findings/${findingId}/series`)).body);
    const worst = Math.max(...series.rows.flatMap(({ clampStressPa }) => clampStressPa.map((stress) => stress ?? 0)));
    // The finding refines its peak between the points of the sweep, so it lies a little above the highest point.
    expect(worst).toBeLessThanOrEqual((finding.stressPa ?? 0) * 1.0001);
    expect(worst).toBeGreaterThan((finding.stressPa ?? 0) * 0.97);
    expect(series.isReproduced).toBe(true);
    const { profile } = series;
    expect(profile?.positionsM.at(-1)).toBe(350);
    // Both ends are bare clamps that send everything back, so nothing flows on balance (closed form).
    expect(profile?.amplitudesM.every((amplitudeM) => amplitudeM > 0)).toBe(true);
    expect(profile?.fluxesW.every((fluxW) => Math.abs(fluxW) < 1e-6)).toBe(true);
  });

  it('makes no second alert for what is urgent already', async () => {
    await assess({ selection: { kind: 'sections', sectionIds: network.sectionIds } });
    const alerts = z.object({ items: z.array(alertSchema) }).parse((await safety.get('/alerts?limitCount=100')).body);
    expect(alerts.items).toHaveLength(15);
    expect(await messages()).toHaveLength(15);
  });

  it('lets the safety officer, and nobody else, acknowledge', async () => {
    const { items } = z.object({ items: z.array(alertSchema) }).parse((await safety.get('/alerts')).body);
    const path = `/alerts/${items[0]?.id}/acknowledge`;
    expect((await engineer.call('POST', path, { body: { note: 'no' } })).status).toBe(403);
    const answer = await safety.call('POST', path, { body: { note: 'Patrol sent' } });
    expect(alertSchema.parse(answer.body)).toMatchObject({
      state: 'acknowledged',
      note: 'Patrol sent',
      acknowledgedByName: 'Ruth Kealoha',
    });
    expect((await safety.call('POST', path, { body: {} })).status).toBe(409);
  });

  it('sends progress as events and ends the stream', async () => {
    const created = await engineer.call('POST', '/assessments', { body: { selection: { kind: 'whole-network' } } });
    const { id } = assessmentSchema.parse(created.body);
    const stream = await engineer.send(`/api/v1/assessments/${id}/events`);
    expect(stream.headers.get('content-type')).toContain('text/event-stream');
    const text = await stream.text();
    const events = [...text.matchAll(/^data: (.*)$/gm)].map(([, data]) =>
      z.object({ state: z.string(), doneCount: z.number() }).parse(JSON.parse(data ?? '')),
    );
    expect(events.at(-1)).toEqual({ state: 'done', doneCount: 15 });
  });

  it('answers the same key with the first result, and refuses it for something else', async () => {
    const headers = { 'idempotency-key': 'the-same-key-1' };
    const body = { selection: { kind: 'spans', spanIds: [network.spanIds[0]] } };
    const first = assessmentSchema.parse((await engineer.call('POST', '/assessments', { body, headers })).body);
    const second = assessmentSchema.parse((await engineer.call('POST', '/assessments', { body, headers })).body);
    expect(second.id).toBe(first.id);
    const other = await engineer.call('POST', '/assessments', {
      body: { selection: { kind: 'whole-network' } },
      headers,
    });
    expect(other).toMatchObject({ status: 409, body: { code: 'idempotency-mismatch' } });
  });

  it('refuses spans that are not there', async () => {
    const spanIds = ['0198d3c2-7a50-7000-8000-0000000000ff'];
    const answer = await engineer.call('POST', '/assessments', { body: { selection: { kind: 'spans', spanIds } } });
    expect(answer).toMatchObject({ status: 400, body: { errors: [{ pointer: '/selection' }] } });
  });
});
