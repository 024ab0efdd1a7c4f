import { computed } from 'vue';
import type { ComputedRef } from 'vue';
import { useRoute, useRouter } from 'vue-router';
import type { RiskFilter, RiskSortKey } from './risk-filter.ts';
import { changedFilter, riskAddress, riskFilterFrom, sortedBy } from './risk-filter.ts';

export interface RiskAddress {
  readonly filter: ComputedRef<RiskFilter>;
  readonly change: (change: Partial<Omit<RiskFilter, 'cursor'>>) => void;
  readonly sortBy: (sort: RiskSortKey) => void;
  /** Goes to a page; null is the first. A page is a step that the browser's Back undoes. */
  readonly showPage: (cursor: string | null) => void;
}

/** The filter, order and page of the risk table, kept in its address. */
export function useRiskAddress(): RiskAddress {
  const route = useRoute();
  const router = useRouter();
  const filter = computed(() => riskFilterFrom(route.query));
  return {
    filter,
    change: (change) => void router.replace({ query: riskAddress(changedFilter(filter.value, change)) }),
    sortBy: (sort) => void router.replace({ query: riskAddress(sortedBy(filter.value, sort)) }),
    showPage: (cursor) => void router.push({ query: riskAddress({ ...filter.value, cursor }) }),
  };
}
