import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import { z } from 'zod';

/** Where uploads are kept; a directory here, replaceable by an object store. */
export interface FileStore {
  write(utilityId: string, fileId: string, content: Buffer): Promise<void>;
  read(utilityId: string, fileId: string): Promise<Buffer>;
}

/** Files below one directory, one folder a utility. Names are ids only, so that no path can be smuggled in. */
export function openFileStore(directory: string): FileStore {
  const place = (utilityId: string, fileId: string) =>
    join(directory, z.uuid().parse(utilityId), z.uuid().parse(fileId));
  return {
    write: async (utilityId, fileId, content) => {
      const target = place(utilityId, fileId);
      await mkdir(join(directory, utilityId), { recursive: true, mode: 0o750 });
      // Written aside and renamed, so that a crash leaves no half file under the id.
      const aside = `${target}.${randomUUID()}.part`;
      await writeFile(aside, content, { mode: 0o640 });
      await rename(aside, target);
    },
    read: (utilityId, fileId) => readFile(place(utilityId, fileId)),
  };
}
