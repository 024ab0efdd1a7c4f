import { randomUUID } from 'node:crypto';
import type { Request } from 'express';
import { importOptionsSchema, type ImportOptions, type ImportRun } from '#shared/contract/imports.ts';
import { writeAudit } from '#server/data/audit.ts';
import type { Actor } from '#server/data/database.ts';
import { findImportRun, insertImportRun } from '#server/data/import-runs.repository.ts';
import { askForJob } from '#server/data/outbox.ts';
import { recordFile } from '#server/data/stored-files.repository.ts';
import { fieldErrors } from '#server/http/parse.ts';
import { readUpload, type Upload } from '#server/http/upload.ts';
import { AppError, invalidField, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

const limitBytes = 40_000_000;

function optionsOf(upload: Upload): ImportOptions {
  let given: unknown;
  try {
    given = JSON.parse(upload.fields['options'] ?? '');
  } catch (error) {
    throw new AppError('invalid-input', 'The part "options" must be JSON.', {
      cause: error,
      errors: [{ pointer: '/options', message: 'must be JSON' }],
    });
  }
  const parsed = importOptionsSchema.safeParse(given);
  if (!parsed.success) {
    const errors = fieldErrors(parsed.error, given, '/options');
    throw new AppError('invalid-input', errors.map(({ pointer, message }) => `${pointer}: ${message}`).join('; '), {
      errors,
    });
  }
  if (parsed.data.kind === 'centre-line' && parsed.data.assumptions === undefined) {
    throw invalidField(
      '/options/assumptions',
      'is required for a centre-line file: spans, wires and tensions must be assumed by somebody',
    );
  }
  return parsed.data;
}

/** Files must be text in UTF-8; anything else is refused before it is stored. */
function requireText(content: Buffer): void {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(content);
  } catch (error) {
    throw new AppError('unsupported-file', 'The file is not UTF-8 text. Save it as UTF-8 and upload it again.', {
      cause: error,
      errors: [{ pointer: '/file', message: 'must be UTF-8 text' }],
    });
  }
}

export const importService = ({ database, files, jobs }: Pick<Deps, 'database' | 'files' | 'jobs'>) => ({
  get: async (actor: Actor, importId: string): Promise<ImportRun> => {
    const found = await database.withUtility(actor, (tx) => findImportRun(tx, importId));
    if (found === null) throw notFound('import', importId);
    return found;
  },
  create: async (actor: Actor, request: Request): Promise<ImportRun> => {
    const upload = await readUpload(request, limitBytes);
    const options = optionsOf(upload);
    requireText(upload.content);
    const importId = randomUUID();
    const fileId = randomUUID();
    await files.write(actor.utilityId, fileId, upload.content);
    const created = await database.withUtility(actor, async (tx) => {
      const mediaType = options.format === 'csv' ? 'text/csv' : 'application/geo+json';
      await recordFile(tx, { id: fileId, kind: 'import', mediaType, content: upload.content });
      await insertImportRun(tx, { id: importId, fileId, fileName: upload.fileName.slice(0, 255) || 'upload', options });
      const payload = { payloadVersion: 1 as const, utilityId: actor.utilityId, importId };
      await askForJob(tx, { name: 'run-import', payload, dedupeKey: `run-import-${importId}` });
      await writeAudit(tx, {
        action: 'upload',
        thingKind: 'import',
        thingId: importId,
        after: { fileName: upload.fileName, options },
      });
      const run = await findImportRun(tx, importId);
      if (run === null) throw notFound('import', importId);
      return run;
    });
    jobs.outboxFilled();
    return created;
  },
});
