import type { FindingSeries } from '#shared/contract/findings.ts';

type Row = FindingSeries['rows'][number];

export interface RowRange {
  readonly first: Row;
  readonly last: Row;
  /** The rows beside the range, where curves take up again; the range's own ends at the edge of the series. */
  readonly before: Row;
  readonly after: Row;
}

/** Runs of rows for which something holds, e.g. those without damper data. */
export function rangesWhere(rows: readonly Row[], holds: (row: Row) => boolean): RowRange[] {
  const ranges: RowRange[] = [];
  let first: Row | null = null;
  rows.forEach((row, index) => {
    if (!holds(row)) return;
    const previous = rows[index - 1];
    const next = rows[index + 1];
    if (previous === undefined || !holds(previous)) first = row;
    if (first === null || (next !== undefined && holds(next))) return;
    const before = rows[rows.indexOf(first) - 1] ?? first;
    ranges.push({ first, last: row, before, after: next ?? row });
  });
  return ranges;
}
