import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { insertAssessment } from '#server/data/assessments.repository.ts';
import { findDefaultBasis } from '#server/data/bases.repository.ts';
import type { Actor, Database } from '#server/data/database.ts';
import { askForJob } from '#server/data/outbox.ts';
import { savePersonAhead } from '#server/data/people.repository.ts';
import type { FileStore } from '#server/platform/files.ts';
import type { ImportOptions } from '#shared/contract/imports.ts';
import { importFile } from '../imports/import-file.ts';
import { demoFile } from './demo-data.ts';
import { loadCatalogue } from './load-catalogue.ts';
import { loadDampers } from './load-dampers.ts';

interface DemoUtility {
  readonly code: string;
  readonly name: string;
  readonly imports: readonly { file: string; options: ImportOptions }[];
  readonly safetyOfficers: readonly { subject: string; displayName: string; email: string }[];
}

const surveyed = (format: 'geojson' | 'csv'): ImportOptions => ({ kind: 'surveyed', format, isDryRun: false });
const branchOptions: ImportOptions = {
  kind: 'centre-line',
  format: 'geojson',
  isDryRun: false,
  assumptions: {
    typicalSpanLengthM: 180,
    deadEndFromTurnDeg: 10,
    minimumStretchLengthM: 20,
    voltageClasses: [
      {
        upToVoltageV: 66_000,
        conductorName: 'Linnet',
        conductorStandard: 'ABNT NBR 7270',
        phaseWireCount: 3,
        tensionRatedRatio: 0.1,
        structureHeightM: 14,
      },
    ],
  },
};

const utilities: readonly DemoUtility[] = [
  {
    code: 'tern',
    name: 'Tern Island Power',
    imports: [
      { file: 'tern/lines.geojson', options: surveyed('geojson') },
      { file: 'tern/branch.geojson', options: branchOptions },
    ],
    safetyOfficers: [
      { subject: 'tern-safety', displayName: 'Ruth Kealoha', email: 'ruth.kealoha@tern.example' },
      { subject: 'tern-lead', displayName: 'Mira Castellan', email: 'mira.castellan@tern.example' },
    ],
  },
  {
    code: 'skua',
    name: 'Skua Rock Electric',
    imports: [{ file: 'skua/lines.csv', options: surveyed('csv') }],
    safetyOfficers: [{ subject: 'skua-safety', displayName: 'Lena Brodie', email: 'lena.brodie@skua.example' }],
  },
];

interface Deps {
  readonly owner: Knex;
  readonly database: Database;
  readonly files: FileStore;
  readonly issuer: string;
  readonly say: (sentence: string) => void;
}

async function loadLines({ database, files, say }: Deps, actor: Actor, utility: DemoUtility): Promise<void> {
  for (const { file, options } of utility.imports) {
    const given = {
      fileName: file.replace('/', '-'),
      content: demoFile(file),
      options,
      signal: new AbortController().signal,
    };
    const run = await importFile({ database, files, onProgress: () => undefined }, actor, given);
    if (run.state !== 'done') throw new Error(`${file}: ${JSON.stringify(run.errors[0])}`);
    say(
      `  ${file}: ${run.counts?.lineCount ?? 0} lines, ${run.counts?.spanCount ?? 0} spans, ${run.counts?.spanWireCount ?? 0} span wires`,
    );
  }
}

/** The first assessment of the network waits for the worker, so that the demo opens with grades. */
async function askForAssessment(database: Database, actor: Actor): Promise<void> {
  await database.withUtility(actor, async (tx) => {
    const basis = await findDefaultBasis(tx);
    if (basis === null) throw new Error('the demo has no default basis');
    const id = randomUUID();
    await insertAssessment(tx, {
      id,
      title: 'Whole network, first run',
      basisId: basis.id,
      selection: { kind: 'whole-network' },
      cause: 'engineer',
    });
    const payload = { payloadVersion: 1 as const, utilityId: actor.utilityId, assessmentId: id };
    await askForJob(tx, { name: 'run-assessment', payload, dedupeKey: `run-assessment-${id}-first` });
  });
}

async function loadUtility(deps: Deps, utility: DemoUtility): Promise<void> {
  const utilityId = randomUUID();
  const actor = { utilityId, personId: null, requestId: null };
  await deps
    .owner('utilities')
    .insert({ id: utilityId, code: utility.code, name: utility.name, currency_code: 'EUR', default_roughness_m: 0.03 });
  deps.say(`${utility.name}:`);
  await deps.database.withUtility(actor, async (tx) => {
    for (const person of utility.safetyOfficers)
      await savePersonAhead(tx, { ...person, issuer: deps.issuer, roles: ['safety-officer'] });
    await loadCatalogue(tx, utility.code);
  });
  await loadLines(deps, actor, utility);
  if (utility.code === 'tern') await deps.database.withUtility(actor, loadDampers);
  await askForAssessment(deps.database, actor);
}

/** Loads both utilities of the demo into an empty database, lines by the same path as an upload; false when it is not empty. */
export async function loadDemo(deps: Deps): Promise<boolean> {
  if ((await deps.database.utilityIds()).length > 0) return false;
  for (const utility of utilities) await loadUtility(deps, utility);
  return true;
}
