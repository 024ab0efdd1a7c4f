import { CsvError, parse } from 'csv-parse/sync';
import { z } from 'zod';
import type { IssueList } from './issue-list.ts';
import type { RawRow } from './raw-row.ts';
import { readWkt } from './read-wkt.ts';

/** Column that holds the geometry of a centre-line row. */
export const wktColumn = 'wkt';

const recordsSchema = z.array(z.object({ record: z.array(z.string()), info: z.object({ lines: z.number() }) }));

interface CsvRead {
  readonly rows: RawRow[];
  readonly columns: readonly string[];
}

function rawRow(row: number, columns: readonly string[], cells: readonly string[]): RawRow {
  const values = Object.fromEntries(
    columns.map((column, index): [string, string | undefined] => {
      const cell = cells[index]?.trim() ?? '';
      return [column, cell === '' ? undefined : cell];
    }),
  );
  const wkt = values[wktColumn];
  return { row, values, geometry: wkt === undefined ? null : readWkt(wkt) };
}

function separatorOf(text: string): string {
  const header = text.slice(0, text.indexOf('\n') === -1 ? undefined : text.indexOf('\n'));
  return [',', ';', '\t'].reduce((best, one) => (header.split(one).length > header.split(best).length ? one : best));
}

function reportCsvError(error: unknown, issues: IssueList): void {
  if (!(error instanceof CsvError)) throw error;
  const record = typeof error['lines'] === 'number' ? error['lines'] : null;
  issues.addError({ row: record, field: 'file', message: `The file is not a CSV table: ${error.message}` });
}

/**
 * Rows of a CSV table whose first row names the columns; commas, semicolons or tabs between the cells. Empty cells count
 * as not given. Null when the table cannot be read.
 */
export function readCsv(text: string, issues: IssueList): CsvRead | null {
  let records: z.infer<typeof recordsSchema>;
  try {
    const parsed: unknown = parse(text, {
      bom: true,
      delimiter: separatorOf(text),
      skip_empty_lines: true,
      relax_column_count: true,
      info: true,
    });
    records = recordsSchema.parse(parsed);
  } catch (error) {
    reportCsvError(error, issues);
    return null;
  }
  const [header, ...body] = records;
  const columns = (header?.record ?? []).map((name) => name.trim());
  const twice = columns.find((name, index) => columns.indexOf(name) !== index);
  if (twice !== undefined) {
    issues.addError({ row: 1, field: twice, message: 'This column stands in the header twice.' });
    return null;
  }
  const rows = body.flatMap(({ record, info }) => {
    if (record.length === columns.length) return [rawRow(info.lines, columns, record)];
    issues.addError({
      row: info.lines,
      message: `The row has ${record.length} cells, the header has ${columns.length}; a cell with the separator in it needs quotes.`,
    });
    return [];
  });
  return { rows, columns };
}
