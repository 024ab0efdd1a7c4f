import { writeAudit } from '#server/data/audit.ts';
import type { Actor, Database } from '#server/data/database.ts';
import { listConductorsForImport, storedExtentDeg, storedLineNames } from '#server/data/line-import-context.ts';
import { countLines, type LineRecord } from '#server/data/line-import-records.ts';
import {
  endImportRun,
  lockImportRun,
  noteImportProgress,
  readImportRun,
  type ImportEnding,
  type ImportProgress,
  type StoredImportRun,
} from '#server/data/line-import-runs.ts';
import { saveLines } from '#server/data/line-import.ts';
import { AppError } from '#server/platform/errors.ts';
import type { ImportError } from '#shared/contract/imports.ts';
import { checkFile } from './check-file.ts';
import { completeLine } from './complete-line.ts';
import { createConductorLookup } from './conductor-lookup.ts';
import { extentOf, isCrossed, type Extent } from './lines-extent.ts';
import { createIssueList, type IssueList } from './issue-list.ts';
import type { LineDraft } from './line-draft.ts';
import { createProgressReporter } from './progress-reporter.ts';

export interface RunImportDeps {
  readonly database: Database;
  /** Content of an uploaded file. */
  readonly readFile: (utilityId: string, fileId: string) => Promise<Uint8Array>;
  /** Tells watchers how far the import is; the row in the database is the truth. */
  readonly publishProgress: (importId: string, progress: ImportProgress) => Promise<void> | void;
}

interface Run {
  readonly deps: RunImportDeps;
  readonly actor: Actor;
  readonly stored: StoredImportRun;
  readonly issues: IssueList;
  readonly report: (progress: ImportProgress) => Promise<void>;
  readonly signal: AbortSignal;
}

interface CheckedImport {
  readonly lines: readonly LineRecord[];
  readonly leftOutCount: number;
  readonly extentDeg: Extent | null;
}

function checkAgainstStored(drafts: readonly LineDraft[], stored: ReadonlySet<string>, issues: IssueList): void {
  for (const { row, name } of drafts) {
    if (!stored.has(name)) continue;
    issues.addError({
      row,
      field: 'line name',
      value: name,
      message: `A line "${name}" is stored already; name the new one differently.`,
    });
  }
}

async function checkImport({ deps, actor, stored, issues, report, signal }: Run): Promise<CheckedImport> {
  await report({ step: 'reading', doneCount: 0, totalCount: 0 });
  const content = await deps.readFile(actor.utilityId, stored.fileId);
  await report({ step: 'checking', doneCount: 0, totalCount: 0 });
  const known = await deps.database.withUtility(actor, async (tx) => ({
    conductors: await listConductorsForImport(tx),
    extentDeg: await storedExtentDeg(tx),
  }));
  const conductors = createConductorLookup(known.conductors);
  const checked = checkFile(content, { options: stored.options, conductors, issues });
  signal.throwIfAborted();
  const extentDeg = extentOf(checked.lines);
  if (extentDeg !== null && isCrossed(extentDeg, known.extentDeg)) {
    const message =
      'Longitude and latitude are crossed: the lines lie far from everything stored, and on it when exchanged. Longitude comes first.';
    issues.addError({ row: null, field: 'geometry', message });
  }
  const names = checked.lines.map(({ name }) => name);
  const taken = await deps.database.withUtility(actor, (tx) => storedLineNames(tx, names));
  checkAgainstStored(checked.lines, taken, issues);
  const lines = issues.errorCount > 0 ? [] : checked.lines.map((line) => completeLine(line, issues));
  return { lines, leftOutCount: checked.leftOutCount, extentDeg };
}

function refusal(errors: readonly ImportError[], errorCount: number, notices: readonly ImportError[]): ImportEnding {
  return { state: 'refused', counts: null, errors, errorCount, notices, extentDeg: null };
}

/** Stores the lines and ends the import in one transaction: both happen or neither does. */
async function saveImport(run: Run, checked: CheckedImport): Promise<void> {
  const { deps, actor, stored, issues, report, signal } = run;
  const { isDryRun, defaultRoughnessM } = stored.options;
  const counts = { ...countLines(checked.lines), leftOutCount: checked.leftOutCount };
  await deps.database.withUtility(actor, async (tx) => {
    const current = await lockImportRun(tx, stored.id);
    if (isEnded(current)) return;
    if (!isDryRun) {
      await saveLines(tx, checked.lines, {
        importId: stored.id,
        defaultRoughnessM: defaultRoughnessM ?? null,
        onProgress: async (doneCount, totalCount) => {
          signal.throwIfAborted();
          await report({ step: 'saving', doneCount, totalCount });
        },
      });
      await writeAudit(tx, { action: 'import-lines', thingKind: 'import', thingId: stored.id, after: counts });
    }
    const { notices } = issues;
    await endImportRun(tx, stored.id, {
      state: 'done',
      counts,
      errors: [],
      errorCount: 0,
      notices,
      extentDeg: checked.extentDeg,
    });
  });
}

function isEnded({ state }: StoredImportRun): boolean {
  return state === 'done' || state === 'refused' || state === 'failed';
}

async function checkAndSave(run: Run): Promise<void> {
  const { deps, actor, stored, issues } = run;
  const end = (ending: ImportEnding) => deps.database.withUtility(actor, (tx) => endImportRun(tx, stored.id, ending));
  const checked = await checkImport(run);
  if (issues.errorCount > 0) {
    await end(refusal(issues.errors, issues.errorCount, issues.notices));
    return;
  }
  try {
    await saveImport(run, checked);
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'duplicate') throw error;
    // Somebody stored a line of the same name between the check and the saving.
    const message = 'A line of the same name was stored meanwhile; import the file again to see which.';
    await end(refusal([{ row: null, field: 'line name', value: null, message }], 1, issues.notices));
  }
}

/**
 * Runs one import: reads its file, checks every row, and stores everything or nothing. Running it again after it has ended
 * changes nothing; after a crash it starts over.
 *
 * @throws whatever database or file store throw; the import then stays as it is and can be run again
 */
export async function runImport(
  deps: RunImportDeps,
  actor: Actor,
  job: { readonly importId: string; readonly signal: AbortSignal },
): Promise<void> {
  const { importId, signal } = job;
  const stored = await deps.database.withUtility(actor, (tx) => readImportRun(tx, importId));
  if (isEnded(stored)) return;
  const report = createProgressReporter({
    tell: async (progress) => {
      await deps.database.withUtility(actor, (tx) => noteImportProgress(tx, importId, progress));
      await deps.publishProgress(importId, progress);
    },
  });
  await checkAndSave({ deps, actor, stored, issues: createIssueList(), report, signal });
  await deps.publishProgress(importId, { step: 'ended', doneCount: 1, totalCount: 1 });
}

/** Marks an import as failed for a reason that lies outside the file; called when no further attempt follows. */
export async function failImport(database: Database, actor: Actor, importId: string): Promise<void> {
  const message =
    'The import stopped because of a fault of the service, not of the file. Nothing was stored; try again.';
  const errors = [{ row: null, field: null, value: null, message }];
  await database.withUtility(actor, (tx) =>
    endImportRun(tx, importId, { state: 'failed', counts: null, errors, errorCount: 1, notices: [], extentDeg: null }),
  );
}
