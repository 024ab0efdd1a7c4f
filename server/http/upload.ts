import busboy from 'busboy';
import type { Request } from 'express';
import { AppError, invalidField } from '#server/platform/errors.ts';

export interface Upload {
  readonly fileName: string;
  readonly content: Buffer;
  readonly fields: Readonly<Record<string, string>>;
}

/** Reads one file and its fields of a multipart request, held in memory up to the limit; a larger file is refused. */
export function readUpload(request: Request, limitBytes: number): Promise<Upload> {
  return new Promise((resolve, reject) => {
    const fields: Record<string, string> = {};
    const parts: Buffer[] = [];
    let fileName: string | undefined;
    let isTooLarge = false;
    const tooLarge = () =>
      new AppError('too-large', `The file is larger than ${Math.round(limitBytes / 1_000_000)} MB.`);
    let parser;
    try {
      parser = busboy({
        headers: request.headers,
        limits: { files: 1, fileSize: limitBytes, fields: 10, fieldSize: 200_000 },
      });
    } catch (error) {
      reject(
        new AppError('malformed-body', 'The request must be multipart/form-data with one file.', { cause: error }),
      );
      return;
    }
    parser.on('field', (name, value) => (fields[name] = value));
    parser.on('file', (_name, stream, information) => {
      fileName = information.filename;
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.on('limit', () => (isTooLarge = true));
    });
    parser.on('error', (error) =>
      reject(new AppError('malformed-body', 'The upload broke off or is malformed.', { cause: error })),
    );
    parser.on('close', () => {
      if (isTooLarge) return reject(tooLarge());
      if (fileName === undefined) return reject(invalidField('/file', 'a file is required'));
      const content = Buffer.concat(parts);
      if (content.length === 0) return reject(invalidField('/file', 'the file is empty'));
      resolve({ fileName, content, fields });
    });
    request.on('aborted', () => reject(new AppError('malformed-body', 'The upload broke off.')));
    request.pipe(parser);
  });
}
