import type { IssueList } from './issue-list.ts';

/** Largest file that is read, in bytes: the upload limit of the API. */
export const importLimitBytes = 40_000_000;

const lineFeed = 0x0a;

function rowOfByte(content: Uint8Array, position: number): number {
  let row = 1;
  for (let index = 0; index < position; index += 1) if (content[index] === lineFeed) row += 1;
  return row;
}

/** Position of the first line that is not UTF-8; lines are decoded one by one, so this runs only once a file failed. */
function firstWrongByte(content: Uint8Array): number {
  const decoder = new TextDecoder('utf-8', { fatal: true });
  let start = 0;
  while (start < content.length) {
    const end = content.indexOf(lineFeed, start);
    const stop = end === -1 ? content.length : end;
    try {
      decoder.decode(content.subarray(start, stop));
    } catch {
      return start;
    }
    start = stop + 1;
  }
  return content.length;
}

/** Text of a file, or null when it is empty, too large or not UTF-8; a byte order mark is dropped. */
export function readText(content: Uint8Array, issues: IssueList): string | null {
  if (content.length > importLimitBytes) {
    issues.addError({
      row: null,
      field: 'file',
      value: `${content.length} bytes`,
      message: `The file is larger than ${importLimitBytes / 1_000_000} MB. Split it by line and import the parts one after the other.`,
    });
    return null;
  }
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(content);
    if (text.trim() !== '') return text;
    issues.addError({ row: null, field: 'file', message: 'The file is empty.' });
  } catch {
    issues.addError({
      row: rowOfByte(content, firstWrongByte(content)),
      field: 'file',
      message: 'This text line holds bytes that are not UTF-8. Save the file with the encoding UTF-8.',
    });
  }
  return null;
}
