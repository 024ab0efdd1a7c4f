import type { ImportOptions } from '#shared/contract/imports.ts';
import { centreLineDrafts } from './centre-line-drafts.ts';
import { centreLineFields, readCentreLines } from './read-centre-lines.ts';
import type { ConductorLookup } from './conductor-lookup.ts';
import type { IssueList } from './issue-list.ts';
import type { LineDraft } from './line-draft.ts';
import type { RawRow } from './raw-row.ts';
import { readCsv, wktColumn } from './read-csv.ts';
import { readGeojson } from './read-geojson.ts';
import { readText } from './read-text.ts';
import { surveyedLines } from './surveyed-lines.ts';
import { checkTableOrder, readSurveyedRows, surveyedColumns } from './read-surveyed-rows.ts';

interface CheckedFile {
  readonly lines: readonly LineDraft[];
  readonly leftOutCount: number;
}

const nothing: CheckedFile = { lines: [], leftOutCount: 0 };

function neededColumns(options: ImportOptions): readonly string[] {
  if (options.kind === 'surveyed') return surveyedColumns;
  const { lineName, voltageKV } = centreLineFields(options);
  return [lineName, voltageKV, wktColumn];
}

function readRows(text: string, options: ImportOptions, issues: IssueList): RawRow[] | null {
  if (options.format === 'geojson') return readGeojson(text, issues);
  const read = readCsv(text, issues);
  if (read === null) return null;
  const missing = neededColumns(options).filter((column) => !read.columns.includes(column));
  for (const column of missing) {
    const message = `The column "${column}" is missing; the header has: ${read.columns.join(', ')}.`;
    issues.addError({ row: 1, field: column, message });
  }
  return missing.length > 0 ? null : read.rows;
}

function checkSurveyed(rows: readonly RawRow[], context: CheckContext): CheckedFile {
  const { options, conductors, issues } = context;
  const isTable = options.format === 'csv';
  const surveyed = readSurveyedRows(rows, isTable ? 'record' : 'kind', issues);
  if (isTable) checkTableOrder(surveyed, issues);
  return { lines: surveyedLines(surveyed, conductors, issues), leftOutCount: 0 };
}

function checkCentreLines(rows: readonly RawRow[], { options, conductors, issues }: CheckContext): CheckedFile {
  const { assumptions } = options;
  if (assumptions === undefined) {
    const message = 'A centre-line file needs assumptions: typical span, and conductor, tension and height by voltage.';
    issues.addError({ row: null, field: 'assumptions', message });
    return nothing;
  }
  const { lines, leftOutCount } = readCentreLines(rows, centreLineFields(options), issues);
  const made = centreLineDrafts(lines, { assumptions, conductors }, issues);
  return { lines: made.drafts, leftOutCount: leftOutCount + made.leftOutCount };
}

interface CheckContext {
  readonly options: ImportOptions;
  readonly conductors: ConductorLookup;
  readonly issues: IssueList;
}

/** Reads a file and checks every row of it; what is wrong goes to the issues, and only a file without errors counts. */
export function checkFile(content: Uint8Array, context: CheckContext): CheckedFile {
  const { options, issues } = context;
  const text = readText(content, issues);
  const rows = text === null ? null : readRows(text, options, issues);
  if (rows === null) return nothing;
  const checked = options.kind === 'surveyed' ? checkSurveyed(rows, context) : checkCentreLines(rows, context);
  if (checked.lines.length === 0 && issues.errorCount === 0) {
    issues.addError({
      row: null,
      field: 'file',
      message: 'The file holds no line that can be imported; the notices say what was left out.',
    });
  }
  return checked;
}
