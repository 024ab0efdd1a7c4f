import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { insertConductorTypes } from '#server/data/catalogue-import.ts';
import { openDatabase } from '#server/data/database.ts';
import { openFileStore } from '#server/platform/files.ts';
import { importOptionsSchema } from '#shared/contract/imports.ts';
import { importFile } from '#worker/imports/import-file.ts';
import { createIssueList } from '#worker/imports/issue-list.ts';
import { readConductors } from '#worker/imports/read-conductors.ts';
import { asSuperuser } from '#scripts/local/postgres.ts';
import { systemActor } from '../support/network.ts';
import { createTestDatabase, sharedServices, startTestServices } from '../support/services.ts';

/*
 * Import of a centre-line layer of the size of a national grid: 230 lines, 11 000 km, about 31 000 spans and 95 000 span
 * wires, stored and ready to assess. Budget: 60 s and 1 GB.
 */
const lineCount = 230;
const legsPerLineCount = 30;
const legLengthDeg = 0.0145;
const timeBudgetS = 60;
const memoryBudgetBytes = 1e9;
const utilityId = '00000000-0000-4000-8000-0000000000e1';

/** Zigzag lines side by side; every leg about 1.6 km, some turns sharp enough for a dead-end. */
function centreLines(): Buffer {
  const features = Array.from({ length: lineCount }, (_, line) => {
    const coordinates = Array.from({ length: legsPerLineCount + 1 }, (__, point) => {
      const aside = Math.sin(point * (1 + (line % 5))) * 0.003;
      return [-30 + line * 0.02 + aside, -40 + point * legLengthDeg];
    });
    const properties = { line_name: `Line ${line + 1}`, voltage_kv: line % 2 === 0 ? 220 : 110 };
    return { type: 'Feature', properties, geometry: { type: 'MultiLineString', coordinates: [coordinates] } };
  });
  return Buffer.from(JSON.stringify({ type: 'FeatureCollection', features }));
}

const options = importOptionsSchema.parse({
  kind: 'centre-line',
  format: 'geojson',
  assumptions: {
    voltageClasses: [
      {
        upToVoltageV: 220_000,
        conductorName: 'Drake',
        conductorStandard: 'ABNT NBR 7270',
        phaseWireCount: 3,
        tensionRatedRatio: 0.2,
        structureHeightM: 24,
      },
    ],
  },
});

const services = sharedServices() ?? (await startTestServices());
const testDatabase = await createTestDatabase(services);
const database = openDatabase(testDatabase.appUrl);
const directory = mkdtempSync(join(tmpdir(), 'stillspan-import-bench-'));
try {
  await asSuperuser(testDatabase.superuserUrl, (client) =>
    client.query(`insert into utilities (id, code, name, currency_code, default_roughness_m)
      values ('${utilityId}', 'bench', 'Bench', 'NZD', 0.03)`),
  );
  const actor = systemActor(utilityId);
  const table = readFileSync(new URL('../../seeds/data/conductors.csv', import.meta.url), 'utf8');
  const conductors = readConductors(table, new Map(), createIssueList());
  await database.withUtility(actor, (tx) => insertConductorTypes(tx, conductors));
  let peakBytes = 0;
  const reached: string[] = [];
  const startedMs = performance.now();
  const sinceStartS = () => (performance.now() - startedMs) / 1000;
  const deps = {
    database,
    files: openFileStore(directory),
    onProgress: ({ step }: { step: string }) => {
      peakBytes = Math.max(peakBytes, process.memoryUsage().rss);
      if (!reached.some((line) => line.startsWith(step))) reached.push(`${step} from ${sinceStartS().toFixed(1)} s`);
    },
  };
  const file = { fileName: 'bench.geojson', content: centreLines(), options, signal: new AbortController().signal };
  const run = await importFile(deps, actor, file);
  const tookS = sinceStartS();
  if (run.counts === null) throw new Error(JSON.stringify(run.errors[0]));
  process.stdout.write(
    `import: ${run.counts.spanCount} spans and ${run.counts.spanWireCount} span wires in ${tookS.toFixed(1)} s ` +
      `(budget ${timeBudgetS} s), ${Math.round(peakBytes / 1e6)} MB at most (budget 1000 MB); ${reached.join(', ')}\n`,
  );
  if (tookS > 2 * timeBudgetS || peakBytes > 2 * memoryBudgetBytes) process.exitCode = 1;
} finally {
  await database.close();
  await testDatabase.drop();
  await services.stop();
  rmSync(directory, { recursive: true, force: true });
}
