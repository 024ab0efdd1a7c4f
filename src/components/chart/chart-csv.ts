import type { ChartModel } from './chart-model.ts';
import { chartTable } from './chart-table.ts';

/** A cell as RFC 4180 wants it: quoted when it holds a separator, a quote or a line break. */
function csvCell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** The numbers behind a chart as comma-separated values (RFC 4180), unrounded, empty where there is no number. */
export function chartCsv(model: ChartModel): string {
  const table = chartTable(model, (value) => String(value), '');
  return [table.heads, ...table.rows].map((cells) => `${cells.map(csvCell).join(',')}\r\n`).join('');
}
