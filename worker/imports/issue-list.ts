import type { ImportError } from '#shared/contract/imports.ts';

/** So many errors and notices of one file are kept; the rest is only counted. */
export const keptIssueCount = 500;
const shownValueCount = 120;

interface Issue {
  /** Row of a CSV file (the header is 1) or feature of a GeoJSON file (from 1); null speaks of the whole file. */
  readonly row: number | null;
  readonly field?: string;
  readonly value?: unknown;
  readonly message: string;
}

/** Errors and notices found in one file, in the order they were found. */
export interface IssueList {
  addError(issue: Issue): void;
  addNotice(issue: Issue): void;
  readonly errors: readonly ImportError[];
  readonly notices: readonly ImportError[];
  /** All errors, those beyond the kept ones included. */
  readonly errorCount: number;
}

/** Control characters and halves of characters show as a replacement sign; the database stores neither. */
function storable(text: string): string {
  return text.replace(/[\p{Cc}\p{Cs}]/gu, '\uFFFD');
}

function shownValue(value: unknown): string | null {
  if (value === undefined || value === null) return null;
  const text = typeof value === 'string' ? value : typeof value === 'number' ? String(value) : JSON.stringify(value);
  return storable(text.length > shownValueCount ? `${text.slice(0, shownValueCount)}…` : text);
}

export function createIssueList(): IssueList {
  const errors: ImportError[] = [];
  const notices: ImportError[] = [];
  let errorCount = 0;
  const keep = (list: ImportError[], { row, field, value, message }: Issue) => {
    if (list.length < keptIssueCount)
      list.push({
        row,
        field: field === undefined ? null : storable(field),
        value: shownValue(value),
        message: storable(message),
      });
  };
  return {
    errors,
    notices,
    get errorCount() {
      return errorCount;
    },
    addError(issue) {
      errorCount += 1;
      keep(errors, issue);
    },
    addNotice(issue) {
      keep(notices, issue);
    },
  };
}
