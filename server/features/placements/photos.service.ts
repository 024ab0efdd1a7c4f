import { fileTypeFromBuffer } from 'file-type';
import type { Request } from 'express';
import type { Actor } from '#server/data/database.ts';
import { findFile, recordFile } from '#server/data/stored-files.repository.ts';
import { readUpload } from '#server/http/upload.ts';
import { AppError, notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

const limitBytes = 15_000_000;
const photoTypes = new Set(['image/jpeg', 'image/png', 'image/webp']);

export const photoService = ({ database, files }: Pick<Deps, 'database' | 'files'>) => ({
  upload: async (actor: Actor, fileId: string, request: Request) => {
    const { content } = await readUpload(request, limitBytes);
    // What the bytes are decides, not what the name or header says.
    const found = await fileTypeFromBuffer(content);
    if (found === undefined || !photoTypes.has(found.mime)) {
      throw new AppError('unsupported-file', 'A photo must be JPEG, PNG or WebP.', {
        errors: [{ pointer: '/file', message: 'must be JPEG, PNG or WebP' }],
      });
    }
    const outcome = await database.withUtility(actor, (tx) =>
      recordFile(tx, { id: fileId, kind: 'photo', mediaType: found.mime, content }),
    );
    if (outcome === 'different') throw new AppError('duplicate', 'Another photo was uploaded under this id.');
    await files.write(actor.utilityId, fileId, content);
    return { id: fileId, byteCount: content.length };
  },
  read: async (actor: Actor, fileId: string) => {
    const found = await database.withUtility(actor, (tx) => findFile(tx, fileId, 'photo'));
    if (found === null) throw notFound('photo', fileId);
    return { mediaType: found.mediaType, content: await files.read(actor.utilityId, fileId) };
  },
});
