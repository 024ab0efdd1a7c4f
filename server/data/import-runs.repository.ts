import { z } from 'zod';
import { importProgressSchema, importRunSchema, type ImportOptions, type ImportRun } from '#shared/contract/imports.ts';
import { keysetPage, type PageRequest } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

const rowSchema = importRunSchema.extend({
  createdAt: instantColumn,
  endedAt: instantColumn.nullable(),
  extentDeg: z.array(z.number()).nullable(),
});
const columns = `import_runs.id, import_runs.file_name, import_runs.options, import_runs.state, import_runs.step, import_runs.done_count,
  import_runs.total_count, import_runs.counts, import_runs.errors, import_runs.error_count, import_runs.notices, import_runs.extent_deg,
  people.display_name as created_by_name, import_runs.created_at, import_runs.ended_at`;
const from = 'import_runs left join people on people.id = import_runs.created_by_person_id';

export function findImportRun(tx: UtilityTransaction, importId: string): Promise<ImportRun | null> {
  return tx.first(rowSchema, `select ${columns} from ${from} where import_runs.id = :importId`, { importId });
}

export function listImportRuns(tx: UtilityTransaction, page: PageRequest) {
  return keysetPage(tx, page, {
    schema: rowSchema,
    columns,
    from,
    where: [],
    bindings: {},
    key: { expression: 'import_runs.created_at', type: 'timestamptz', direction: 'descending' },
    id: 'import_runs.id',
    countFrom: 'import_runs',
  });
}

export function findImportProgress(tx: UtilityTransaction, importId: string) {
  return tx.first(
    importProgressSchema,
    'select id, state, step, done_count, total_count from import_runs where id = :importId',
    { importId },
  );
}

/** Records an upload that waits to be imported. */
export async function insertImportRun(
  tx: UtilityTransaction,
  run: { id: string; fileId: string; fileName: string; options: ImportOptions },
): Promise<void> {
  await tx.run(
    `insert into import_runs (id, utility_id, file_id, file_name, options, created_by_person_id)
     values (:id, :utilityId, :fileId, :fileName, :options::jsonb, :personId)`,
    { ...run, ...tx.actor, options: JSON.stringify(run.options) },
  );
}

/** Ids of imports that should have a job. */
export async function listLiveImports(tx: UtilityTransaction): Promise<string[]> {
  const rows = await tx.rows(
    z.object({ id: z.uuid() }),
    `select id from import_runs where state in ('queued', 'running') order by created_at limit 200`,
  );
  return rows.map(({ id }) => id);
}
