import type { Grade } from '#shared/contract/grades.ts';
import { grades } from '#shared/contract/grades.ts';
import { riskSortKeys } from '#shared/contract/risk.ts';

export type RiskSortKey = (typeof riskSortKeys)[number];

/** What the risk table shows; lives in the address. */
export interface RiskFilter {
  readonly sort: RiskSortKey;
  readonly direction: 'ascending' | 'descending';
  readonly grades: readonly Grade[];
  readonly lineId: string | null;
  readonly search: string;
  readonly isStale: boolean | null;
  readonly isAssessed: boolean | null;
  /** Where the page starts; null on the first page. */
  readonly cursor: string | null;
}

export type AddressQuery = Readonly<Record<string, string | null | readonly (string | null)[] | undefined>>;

export const firstRiskFilter: RiskFilter = {
  sort: 'grade',
  direction: 'descending',
  grades: [],
  lineId: null,
  search: '',
  isStale: null,
  isAssessed: null,
  cursor: null,
};

const text = (query: AddressQuery, key: string): string | null => {
  const value = query[key];
  return typeof value === 'string' && value !== '' ? value : null;
};

const flag = (query: AddressQuery, key: string): boolean | null => {
  const value = text(query, key);
  return value === 'true' ? true : value === 'false' ? false : null;
};

/** Reads the filter from the address; anything unknown in it counts as left out. */
export function riskFilterFrom(query: AddressQuery): RiskFilter {
  const asked = text(query, 'grades')?.split(',') ?? [];
  return {
    sort: riskSortKeys.find((key) => key === text(query, 'sort')) ?? firstRiskFilter.sort,
    direction: text(query, 'direction') === 'ascending' ? 'ascending' : 'descending',
    grades: grades.filter((grade) => asked.includes(grade)),
    lineId: text(query, 'lineId'),
    search: text(query, 'search') ?? '',
    isStale: flag(query, 'isStale'),
    isAssessed: flag(query, 'isAssessed'),
    cursor: text(query, 'cursor'),
  };
}

/** The address of a filter; what is as at first is left out. */
export function riskAddress(filter: RiskFilter): Record<string, string> {
  return {
    ...(filter.sort === firstRiskFilter.sort ? {} : { sort: filter.sort }),
    ...(filter.direction === firstRiskFilter.direction ? {} : { direction: filter.direction }),
    ...(filter.grades.length === 0 ? {} : { grades: filter.grades.join(',') }),
    ...(filter.lineId === null ? {} : { lineId: filter.lineId }),
    ...(filter.search === '' ? {} : { search: filter.search }),
    ...(filter.isStale === null ? {} : { isStale: String(filter.isStale) }),
    ...(filter.isAssessed === null ? {} : { isAssessed: String(filter.isAssessed) }),
    ...(filter.cursor === null ? {} : { cursor: filter.cursor }),
  };
}

/** A changed filter starts again at its first page. */
export function changedFilter(filter: RiskFilter, change: Partial<Omit<RiskFilter, 'cursor'>>): RiskFilter {
  return { ...filter, ...change, cursor: null };
}

/** Sorting by a column: the worst first, and the other way round when it is asked again. */
export function sortedBy(filter: RiskFilter, sort: RiskSortKey): RiskFilter {
  if (filter.sort === sort) {
    return changedFilter(filter, { direction: filter.direction === 'descending' ? 'ascending' : 'descending' });
  }
  const isWorstLowest = sort === 'life' || sort === 'line';
  return changedFilter(filter, { sort, direction: isWorstLowest ? 'ascending' : 'descending' });
}
