import { setTimeout as pause } from 'node:timers/promises';
import { assessSpanWire, createEndResponseCache } from '#shared/engine/index.ts';
import { insertAssessment } from '#server/data/assessments.repository.ts';
import { findProgress } from '#server/data/assessments.repository.ts';
import { engineBasisOf, engineCaseOf } from '#server/data/engine-case.ts';
import { frozenCase, frozenChunkSchema } from '#server/data/frozen-input.ts';
import { askForJob } from '#server/data/outbox.ts';
import { asSuperuser } from '#scripts/local/postgres.ts';
import { makeNetwork, systemActor } from '../support/network.ts';
import { startStack, ternId, type Stack } from '../support/stack.ts';

/*
 * What the worker adds to the bare engine: the same 5 000 span wires through queue, database and grading, and then from
 * the same frozen input in a plain loop, in one process. The ratio is what counts; the aim is 1.25.
 */
const sectionCount = 50;
const spansPerSectionCount = 25;
const wireCount = 4;
const assessmentId = '00000000-0000-4000-8000-0000000000c1';

async function throughTheWorker(stack: Stack): Promise<number> {
  const actor = systemActor(ternId);
  const network = await makeNetwork(stack.database, ternId, {
    sectionCount,
    spansPerSectionCount,
    wireCount,
    basis: { frequencyCount: 150 },
  });
  await stack.database.withUtility(actor, async (tx) => {
    await insertAssessment(tx, {
      id: assessmentId,
      title: 'bench',
      basisId: network.basisId,
      selection: { kind: 'whole-network' },
      cause: 'engineer',
    });
    const payload = { payloadVersion: 1 as const, utilityId: ternId, assessmentId };
    await askForJob(tx, { name: 'run-assessment', payload, dedupeKey: 'bench' });
  });
  stack.startWorker();
  for (;;) {
    const progress = await stack.database.withUtility(actor, (tx) => findProgress(tx, assessmentId));
    if (progress?.state === 'done') break;
    await pause(100);
  }
  const [row] = await asSuperuser(stack.testDatabase.superuserUrl, async (client) => {
    const found = await client.query<{ total: number; freezing: number; computing: number; finishing: number }>(
      `select extract(epoch from ended_at - started_at)::float8 as total, extract(epoch from frozen_at - started_at)::float8 as freezing,
         extract(epoch from computed.at - frozen_at)::float8 as computing, extract(epoch from ended_at - computed.at)::float8 as finishing
       from assessments, (select max(done_at) as at from assessment_chunks where assessment_id = $1) as computed where id = $1`,
      [assessmentId],
    );
    return found.rows;
  });
  if (row === undefined) throw new Error('the assessment vanished');
  const phases = ['freezing', 'computing', 'finishing'] as const;
  process.stdout.write(`${phases.map((phase) => `${phase} ${row[phase].toFixed(2)} s`).join(', ')}\n`);
  return row.total;
}

async function bareEngine(stack: Stack): Promise<number> {
  const inputs = await asSuperuser(stack.testDatabase.superuserUrl, async (client) => {
    const found = await client.query<{ input: unknown }>(
      'select input from assessment_chunks where assessment_id = $1 order by chunk_index',
      [assessmentId],
    );
    return found.rows.map(({ input }) => frozenChunkSchema.parse(input));
  });
  const startedMs = performance.now();
  for (const chunk of inputs) {
    const cache = createEndResponseCache();
    for (let index = 0; index < chunk.items.length; index += 1) {
      const frozen = frozenCase(chunk, index);
      assessSpanWire(engineCaseOf(frozen), engineBasisOf(frozen), cache);
    }
  }
  return (performance.now() - startedMs) / 1000;
}

const stack = await startStack();
try {
  const workerSeconds = await throughTheWorker(stack);
  const engineSeconds = await bareEngine(stack);
  const count = sectionCount * spansPerSectionCount * wireCount;
  const print = (sentence: string) => process.stdout.write(`${sentence}\n`);
  print(`${count} span wires, 150 frequencies, two bare ends`);
  print(`worker ${workerSeconds.toFixed(2)} s, ${((workerSeconds / count) * 1000).toFixed(3)} ms a span wire`);
  print(`engine ${engineSeconds.toFixed(2)} s, ${((engineSeconds / count) * 1000).toFixed(3)} ms a span wire`);
  print(`ratio worker to engine ${(workerSeconds / engineSeconds).toFixed(2)} (aim 1.25)`);
} finally {
  await stack.stop();
}
