import type { ImportProgress } from '#server/data/line-import-runs.ts';
import type { ImportError, ImportRun } from '#shared/contract/imports.ts';

/** One line of progress. */
export function progressLine({ step, doneCount, totalCount }: ImportProgress): string {
  return totalCount > 1 ? `${step} ${doneCount} of ${totalCount}\n` : `${step}\n`;
}

function issueLine({ row, field, value, message }: ImportError): string {
  const place = [row === null ? null : `row ${row}`, field].filter((part) => part !== null).join(', ');
  return `  ${place === '' ? 'file' : place}${value === null ? '' : ` (${value})`}: ${message}\n`;
}

function issueList(title: string, issues: readonly ImportError[], allCount: number): string {
  if (issues.length === 0) return '';
  const rest = allCount > issues.length ? `  and ${allCount - issues.length} more\n` : '';
  return `${title}\n${issues.map(issueLine).join('')}${rest}`;
}

/** What came of an import, for people: counts, or every error that was kept, then what was left out. */
export function importReport(run: ImportRun): string {
  const { counts, errors, errorCount, notices } = run;
  const summary =
    counts === null
      ? `${run.fileName} is ${run.state}: ${errorCount} errors, nothing was stored\n`
      : `${run.fileName} is ${run.options.isDryRun ? 'checked, nothing was stored' : 'imported'}: ${counts.lineCount} lines, ` +
        `${counts.sectionCount} sections, ${counts.structureCount} structures, ${counts.spanCount} spans, ` +
        `${counts.wireCount} wires, ${counts.spanWireCount} span wires; ${counts.leftOutCount} left out\n`;
  return summary + issueList('Errors', errors, errorCount) + issueList('Notices', notices, notices.length);
}
