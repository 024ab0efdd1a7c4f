import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { keepPreviousData, useQuery } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { RiskFilter } from './risk-filter.ts';

export const riskKeys = {
  page: (filter: RiskFilter) => ['risk', filter] as const,
  lines: ['lines', 'names'] as const,
};

export const riskPageRowCount = 100;

export function useRiskPage(filter: MaybeRefOrGetter<RiskFilter>) {
  return useQuery({
    queryKey: computed(() => riskKeys.page(toValue(filter))),
    queryFn: () => {
      const { sort, direction, grades, lineId, search, isStale, isAssessed, cursor } = toValue(filter);
      return call('listRisk', {
        query: {
          limitCount: riskPageRowCount,
          sort,
          direction,
          ...(grades.length === 0 ? {} : { grades: grades.join(',') }),
          ...(lineId === null ? {} : { lineId }),
          ...(search === '' ? {} : { search }),
          ...(isStale === null ? {} : { isStale: isStale ? 'true' : 'false' }),
          ...(isAssessed === null ? {} : { isAssessed: isAssessed ? 'true' : 'false' }),
          ...(cursor === null ? {} : { cursor }),
        },
      });
    },
    placeholderData: keepPreviousData,
  });
}

const linesMostCount = 500;

export function useLineNames() {
  return useQuery({
    queryKey: riskKeys.lines,
    queryFn: () => call('listLines', { query: { limitCount: linesMostCount } }),
  });
}
