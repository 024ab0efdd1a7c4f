import { createHash } from 'node:crypto';
import { z } from 'zod';
import type { UtilityTransaction } from './database.ts';

export interface NewFile {
  readonly id: string;
  readonly kind: 'photo' | 'import';
  readonly mediaType: string;
  readonly content: Buffer;
}

/** Records a stored file with its digest. The same id with the same content again changes nothing. */
export async function recordFile(tx: UtilityTransaction, file: NewFile): Promise<'recorded' | 'same' | 'different'> {
  const sha256 = createHash('sha256').update(file.content).digest('hex');
  const inserted = await tx.run(
    `insert into stored_files (id, utility_id, kind, media_type, byte_count, content_sha256, created_by_person_id)
     values (:id, :utilityId, :kind::stored_file_kind, :mediaType, :byteCount, :sha256, :personId) on conflict (id) do nothing`,
    { id: file.id, kind: file.kind, mediaType: file.mediaType, byteCount: file.content.length, sha256, ...tx.actor },
  );
  if (inserted === 1) return 'recorded';
  const former = await tx.first(
    z.object({ contentSha256: z.string() }),
    'select content_sha256 from stored_files where id = :id',
    { id: file.id },
  );
  return former?.contentSha256 === sha256 ? 'same' : 'different';
}

export function findFile(tx: UtilityTransaction, fileId: string, kind: NewFile['kind']) {
  return tx.first(
    z.object({ mediaType: z.string() }),
    'select media_type from stored_files where id = :fileId and kind = :kind::stored_file_kind',
    {
      fileId,
      kind,
    },
  );
}
