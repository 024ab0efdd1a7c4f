import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { Actor, Database, UtilityTransaction } from '#server/data/database.ts';
import { openDatabase } from '#server/data/database.ts';
import { findImportRun, insertImportRun } from '#server/data/import-runs.repository.ts';
import { openAsOwner } from '#server/data/migrate.ts';
import { recordFile } from '#server/data/stored-files.repository.ts';
import { openFileStore, type FileStore } from '#server/platform/files.ts';
import { importOptionsSchema } from '#shared/contract/imports.ts';
import { loadDemo } from '#worker/demo/load-demo.ts';
import { importFile } from '#worker/imports/import-file.ts';
import { runImport } from '#worker/imports/run-import.ts';
import { islandFiles } from '../../seeds/island/island-files.ts';
import { systemActor } from '../support/network.ts';
import {
  createTestDatabase,
  sharedServices,
  startTestServices,
  type TestDatabase,
  type TestServices,
} from '../support/services.ts';

const importId = '00000000-0000-4000-8000-0000000000d1';
const fileId = '00000000-0000-4000-8000-0000000000d2';
const surveyed = { kind: 'surveyed', format: 'csv' };

let services: TestServices;
let testDatabase: TestDatabase;
let database: Database;
let files: FileStore;
let directory: string;
let tern: Actor;
let skua: Actor;

const projectFile = (path: string) => readFileSync(new URL(`../../${path}`, import.meta.url));
const demo = () => {
  const owner = openAsOwner(testDatabase.ownerUrl);
  const deps = { owner, database, files, issuer: 'http://127.0.0.1:9', say: () => undefined };
  return loadDemo(deps).finally(() => owner.destroy());
};
async function actorOf(code: string): Promise<Actor> {
  const id = await database.utilityIdOfCode(code);
  if (id === null) throw new Error(`the demo made no utility ${code}`);
  return systemActor(id);
}

beforeAll(async () => {
  services = sharedServices() ?? (await startTestServices());
  testDatabase = await createTestDatabase(services);
  database = openDatabase(testDatabase.appUrl);
  directory = mkdtempSync(join(tmpdir(), 'stillspan-import-'));
  files = openFileStore(directory);
  expect(await demo()).toBe(true);
  [tern, skua] = [await actorOf('tern'), await actorOf('skua')];
});
afterAll(async () => {
  await database.close();
  await testDatabase.drop();
  await services.stop();
  rmSync(directory, { recursive: true, force: true });
});

const countsSchema = z.object({
  lineCount: z.number(),
  structureCount: z.number(),
  sectionCount: z.number(),
  spanCount: z.number(),
  wireCount: z.number(),
  spanWireCount: z.number(),
});
const readCounts = (tx: UtilityTransaction) =>
  tx.first(
    countsSchema,
    `select (select count(*)::int from lines) as line_count, (select count(*)::int from structures) as structure_count,
       (select count(*)::int from sections) as section_count, (select count(*)::int from spans) as span_count,
       (select count(*)::int from wires) as wire_count, (select count(*)::int from span_wires) as span_wire_count`,
  );
const stored = (actor: Actor) => database.withUtility(actor, readCounts);

function importContent(actor: Actor, content: string | Buffer, options: object) {
  const deps = { database, files, onProgress: () => undefined };
  const file = { fileName: 'trial', content: Buffer.from(content), options: importOptionsSchema.parse(options) };
  return importFile(deps, actor, { ...file, signal: new AbortController().signal });
}

const header =
  'record,line_name,name,order,longitude_deg,latitude_deg,structure_kind,structure_height_m,from_structure,to_structure,wire_kind,conductor,conductor_standard,tension_n';
const table = (lineName: string, tensionN = 28_000) =>
  [
    header,
    `structure,${lineName},1,1,-21.000,-38.500,dead-end,18,,,,,,`,
    `structure,${lineName},2,2,-20.996,-38.500,suspension,20,,,,,,`,
    `structure,${lineName},3,3,-20.992,-38.501,dead-end,18,,,,,,`,
    `wire,${lineName},A,,,,,,1,3,phase,Drake,ABNT NBR 7270,${tensionN}`,
  ].join('\n');

describe('the demo', () => {
  it('is loaded through the import path, and only once', async () => {
    const before = await stored(tern);
    expect(before?.lineCount).toBe(13);
    expect(before?.spanCount).toBeGreaterThan(500);
    expect(await demo()).toBe(false);
    expect(await stored(tern)).toEqual(before);
  });

  it('is the same on every run of its generator', () => {
    for (const [path, content] of islandFiles()) expect(projectFile(path).toString('utf8'), path).toBe(content);
  });

  it('gives spans the roughness of the smallest zone over their middle', async () => {
    const zones = await database.withUtility(tern, (tx) =>
      tx.rows(
        z.object({ name: z.string(), isOwnRoughness: z.boolean(), isSmallest: z.boolean() }),
        `select zone.name, bool_and(spans.roughness_m = zone.roughness_m) as is_own_roughness,
           bool_and(not exists (select from terrain_zones as other
             where st_area(other.geom) < st_area(zone.geom)
               and st_covers(other.geom, st_lineinterpolatepoint(spans.geom, 0.5)))) as is_smallest
         from spans join terrain_zones as zone on zone.id = spans.terrain_zone_id group by zone.name`,
      ),
    );
    expect(zones.length).toBeGreaterThan(3);
    expect(zones.every(({ isOwnRoughness, isSmallest }) => isOwnRoughness && isSmallest)).toBe(true);
  });
});

describe('sample files', () => {
  const assumptions = {
    voltageClasses: [
      {
        upToVoltageV: 66_000,
        conductorName: 'Linnet',
        conductorStandard: 'ABNT NBR 7270',
        phaseWireCount: 3,
        tensionRatedRatio: 0.15,
        structureHeightM: 14,
      },
    ],
  };
  it.each([
    ['surveyed-lines.geojson', { kind: 'surveyed', format: 'geojson' }, false],
    ['centre-lines.csv', { kind: 'centre-line', format: 'csv', assumptions }, true],
  ])('%s is accepted', async (name, options, isAssumed) => {
    const run = await importContent(tern, projectFile(`public/samples/${name}`), options);
    expect(run.errors).toEqual([]);
    expect(run).toMatchObject({ state: 'done', step: 'ended' });
    const marks = await database.withUtility(tern, (tx) =>
      tx.rows(
        z.object({ isAssumed: z.boolean() }),
        `select distinct flag.is_assumed from lines join structures on structures.line_id = lines.id
           join sections on sections.line_id = lines.id join wires on wires.section_id = sections.id
           join spans on spans.section_id = sections.id
           cross join lateral (values (lines.is_assumed), (structures.is_assumed), (sections.is_assumed),
             (wires.is_assumed), (spans.is_assumed)) as flag(is_assumed)
         where lines.import_run_id = :id`,
        { id: run.id },
      ),
    );
    expect(marks).toEqual([{ isAssumed }]);
  });
});

describe('nothing is half-imported', () => {
  it('when one row of many is wrong: all of them are named, none is stored', async () => {
    const before = await stored(tern);
    const good = table('Trial good').split('\n');
    const bad = table('Trial bad', 500_000).split('\n').slice(1);
    const run = await importContent(tern, [...good, ...bad].join('\n'), surveyed);
    expect(run).toMatchObject({ state: 'refused', errorCount: 1, counts: null });
    expect(run.errors[0]).toMatchObject({ row: 9, field: 'tension_n', value: '500000' });
    expect(await stored(tern)).toEqual(before);
  });

  it('when a line of the name is stored already', async () => {
    expect(await importContent(tern, table('Trial twice'), surveyed)).toMatchObject({ state: 'done' });
    const before = await stored(tern);
    const run = await importContent(tern, table('Trial twice'), surveyed);
    expect(run).toMatchObject({ state: 'refused', errors: [{ row: 2, field: 'line name', value: 'Trial twice' }] });
    expect(await stored(tern)).toEqual(before);
  });

  it('when longitude and latitude are exchanged but both on earth', async () => {
    const before = await stored(tern);
    const crossed = table('Trial crossed').replaceAll(/(-2\d\.\d+),(-38\.\d+)/g, '$2,$1');
    const run = await importContent(tern, crossed, surveyed);
    expect(run).toMatchObject({ state: 'refused', errors: [{ message: expect.stringContaining('crossed') }] });
    expect(await stored(tern)).toEqual(before);
  });

  it('on a dry run, which counts', async () => {
    const before = await stored(tern);
    const run = await importContent(tern, table('Trial dry'), { ...surveyed, isDryRun: true });
    expect(run).toMatchObject({ state: 'done', counts: { lineCount: 1, spanCount: 2, spanWireCount: 2 } });
    expect(await stored(tern)).toEqual(before);
  });

  it('when the worker stops in the middle; the next run does it once, and a third changes nothing', async () => {
    const content = Buffer.from(table('Trial stopped'));
    await files.write(tern.utilityId, fileId, content);
    await database.withUtility(tern, async (tx) => {
      await recordFile(tx, { id: fileId, kind: 'import', mediaType: 'text/csv', content });
      await insertImportRun(tx, {
        id: importId,
        fileId,
        fileName: 'stopped.csv',
        options: importOptionsSchema.parse(surveyed),
      });
    });
    const before = await stored(tern);
    const stopping = new AbortController();
    const deps = { database, readFile: files.read };
    const stopWhileSaving = (_id: string, { step }: { step: string }) => {
      if (step === 'saving') stopping.abort(new Error('the worker stops'));
    };
    const stopped = runImport({ ...deps, publishProgress: stopWhileSaving }, tern, {
      importId,
      signal: stopping.signal,
    });
    await expect(stopped).rejects.toThrow('the worker stops');
    expect(await stored(tern)).toEqual(before);
    const again = () =>
      runImport({ ...deps, publishProgress: () => undefined }, tern, {
        importId,
        signal: new AbortController().signal,
      });
    await Promise.all([again(), again()]);
    await again();
    const after = await stored(tern);
    expect(after?.lineCount).toBe((before?.lineCount ?? 0) + 1);
    expect(after?.spanWireCount).toBe((before?.spanWireCount ?? 0) + 2);
    expect(await database.withUtility(tern, (tx) => findImportRun(tx, importId))).toMatchObject({ state: 'done' });
  });
});

describe('separation', () => {
  it('another utility sees neither the lines nor the import, and cannot run it', async () => {
    expect((await stored(skua))?.lineCount).toBe(2);
    expect(await database.withUtility(skua, (tx) => findImportRun(tx, importId))).toBeNull();
    const run = runImport({ database, readFile: files.read, publishProgress: () => undefined }, skua, {
      importId,
      signal: new AbortController().signal,
    });
    await expect(run).rejects.toMatchObject({ code: 'not-found' });
  });

  it('two utilities may have lines of one name', async () => {
    expect(await importContent(skua, table('Trial twice'), surveyed)).toMatchObject({ state: 'done' });
  });
});
