import type { RiskSortKey } from './risk-filter.ts';

export interface RiskColumn {
  readonly key: string;
  readonly label: string;
  /** Null where the service cannot sort. */
  readonly sort: RiskSortKey | null;
  readonly isNumber: boolean;
}

const words = (key: string, label: string, sort: RiskSortKey | null = null): RiskColumn => ({
  key,
  label,
  sort,
  isNumber: false,
});
const numbers = (key: string, label: string, sort: RiskSortKey | null = null): RiskColumn => ({
  key,
  label,
  sort,
  isNumber: true,
});

/** Columns of the risk table, in their order. */
export const riskColumns: readonly RiskColumn[] = [
  words('span', 'Line, span and wire', 'line'),
  words('grade', 'Grade', 'grade'),
  words('reason', 'Why'),
  numbers('utilisation', 'Of the limit', 'utilisation'),
  numbers('stress', 'Clamp stress', 'stress'),
  numbers('limit', 'Limit'),
  numbers('wind', 'At wind'),
  numbers('frequency', 'Frequency'),
  numbers('life', 'Life', 'life'),
  numbers('span-length', 'Span', 'span-length'),
  numbers('tension', 'Tension of rated'),
  numbers('dampers', 'Dampers'),
  words('assessed-at', 'Assessed', 'assessed-at'),
];

/** Value of `aria-sort` for a column. */
export function ariaSort(
  column: RiskColumn,
  order: { readonly sort: RiskSortKey; readonly direction: 'ascending' | 'descending' },
): 'ascending' | 'descending' | 'none' | undefined {
  if (column.sort === null) return undefined;
  return column.sort === order.sort ? order.direction : 'none';
}
