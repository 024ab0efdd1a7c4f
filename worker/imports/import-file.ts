import { randomUUID } from 'node:crypto';
import type { Actor, Database } from '#server/data/database.ts';
import { findImportRun, insertImportRun } from '#server/data/import-runs.repository.ts';
import type { ImportProgress } from '#server/data/line-import-runs.ts';
import { recordFile } from '#server/data/stored-files.repository.ts';
import type { FileStore } from '#server/platform/files.ts';
import type { ImportOptions, ImportRun } from '#shared/contract/imports.ts';
import { failImport, runImport } from './run-import.ts';

export interface ImportFileDeps {
  readonly database: Database;
  readonly files: FileStore;
  readonly onProgress: (progress: ImportProgress) => void;
}

interface FileToImport {
  readonly fileName: string;
  readonly content: Buffer;
  readonly options: ImportOptions;
  readonly signal: AbortSignal;
}

/**
 * Stores a file, records its import and runs it at once: the same path as an upload takes through the queue. The answer is
 * the import as anybody reads it afterwards, refused ones included.
 */
export async function importFile(deps: ImportFileDeps, actor: Actor, file: FileToImport): Promise<ImportRun> {
  const { database, files, onProgress } = deps;
  const { fileName, content, options, signal } = file;
  const importId = randomUUID();
  const fileId = randomUUID();
  await files.write(actor.utilityId, fileId, content);
  const mediaType = options.format === 'csv' ? 'text/csv' : 'application/geo+json';
  await database.withUtility(actor, async (tx) => {
    await recordFile(tx, { id: fileId, kind: 'import', mediaType, content });
    await insertImportRun(tx, { id: importId, fileId, fileName, options });
  });
  const runDeps = {
    database,
    readFile: (utilityId: string, id: string) => files.read(utilityId, id),
    publishProgress: (_importId: string, progress: ImportProgress) => onProgress(progress),
  };
  try {
    await runImport(runDeps, actor, { importId, signal });
  } catch (error) {
    await failImport(database, actor, importId);
    throw error;
  }
  const run = await database.withUtility(actor, (tx) => findImportRun(tx, importId));
  if (run === null) throw new Error('the import vanished while it ran');
  return run;
}
