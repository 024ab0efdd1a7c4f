import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { z } from 'zod';
import { openDatabase } from '#server/data/database.ts';
import { loadConfig } from '#server/platform/config.ts';
import { openFileStore } from '#server/platform/files.ts';
import { importFile } from '#worker/imports/import-file.ts';
import { importLimitBytes } from '#worker/imports/read-text.ts';
import { importUsage, parseImportArguments, UsageError, type ImportArguments } from './import-arguments.ts';
import { importReport, progressLine } from './import-report.ts';

function readJson(path: string): object {
  try {
    return z.record(z.string(), z.unknown()).parse(JSON.parse(readFileSync(path, 'utf8')));
  } catch (error) {
    throw new UsageError(`--assumptions ${path}: ${error instanceof Error ? error.message : 'cannot be read'}`);
  }
}

function readContent(path: string): Buffer {
  try {
    return readFileSync(path);
  } catch (error) {
    throw new UsageError(error instanceof Error ? error.message : `${path} cannot be read`);
  }
}

async function run({ path, utilityCode, options }: ImportArguments): Promise<number> {
  const content = readContent(path);
  if (content.length === 0 || content.length > importLimitBytes) {
    throw new UsageError(`${path} has ${content.length} bytes; allowed: 1 to ${importLimitBytes}`);
  }
  const config = loadConfig();
  const database = openDatabase(config.DATABASE_URL);
  try {
    const utilityId = await database.utilityIdOfCode(utilityCode);
    if (utilityId === null) throw new UsageError(`--utility ${utilityCode}: there is no utility of this code`);
    const deps = {
      database,
      files: openFileStore(config.STILLSPAN_FILES_DIR),
      onProgress: (progress: Parameters<typeof progressLine>[0]) => void process.stderr.write(progressLine(progress)),
    };
    const actor = { utilityId, personId: null, requestId: null };
    const signal = new AbortController().signal;
    const ended = await importFile(deps, actor, { fileName: basename(path), content, options, signal });
    process.stdout.write(importReport(ended));
    return ended.state === 'done' ? 0 : 2;
  } finally {
    await database.close();
  }
}

try {
  process.exitCode = await run(parseImportArguments(process.argv.slice(2), readJson));
} catch (error) {
  const message = error instanceof Error ? error.message : String(error);
  process.stderr.write(`import: ${message}\n${error instanceof UsageError ? `\n${importUsage}` : ''}`);
  process.exitCode = 1;
}
