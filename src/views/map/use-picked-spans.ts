import { useQueryClient } from '@tanstack/vue-query';
import { computed, shallowRef, watch } from 'vue';
import type { SpanListItem } from '#shared/contract/lines.ts';
import { worstGrade } from '#shared/contract/grades.ts';
import { useSelectionStore } from '#src/stores/selection.ts';
import { fetchSpans, mapKeys } from './queries.ts';

const idsPerRequest = 90;

function totalsOf(items: readonly SpanListItem[], spanCount: number) {
  return {
    spanCount,
    spanWireCount: items.reduce((sum, { spanWireCount }) => sum + spanWireCount, 0),
    lengthM: items.reduce((sum, { spanLengthM }) => sum + spanLengthM, 0),
    worst: worstGrade(items.map(({ grade }) => grade)),
    isAssumed: items.some(({ isAssumed }) => isAssumed),
  };
}

/** The picked spans with their facts; facts of spans picked in another way are fetched. */
export function usePickedSpans() {
  const client = useQueryClient();
  const selection = useSelectionStore();
  const problem = shallowRef<Error | null>(null);
  const fetchedCount = shallowRef(0);

  const items = computed(() => {
    void fetchedCount.value;
    return selection.spanIds.flatMap((id) => {
      const item = client.getQueryData<SpanListItem>(mapKeys.spanItem(id));
      return item === undefined ? [] : [item];
    });
  });

  async function pick(read: () => Promise<SpanListItem[]>): Promise<SpanListItem[]> {
    problem.value = null;
    try {
      const found = await read();
      fetchedCount.value += 1;
      return found;
    } catch (error) {
      problem.value = error instanceof Error ? error : new Error(String(error));
      return [];
    }
  }

  async function fetchMissing(): Promise<void> {
    const missing = selection.spanIds.filter((id) => client.getQueryData(mapKeys.spanItem(id)) === undefined);
    for (let first = 0; first < missing.length; first += idsPerRequest) {
      const spanIds = missing.slice(first, first + idsPerRequest).join(',');
      await pick(() => fetchSpans(client, { spanIds }));
    }
  }
  watch(
    () => selection.spanIds,
    () => void fetchMissing(),
    { immediate: true },
  );

  const add = async (query: Parameters<typeof fetchSpans>[1]) => {
    const found = await pick(() => fetchSpans(client, query));
    selection.add(found.map(({ id }) => id));
    return found;
  };
  return {
    items,
    problem,
    addSection: (sectionId: string) => add({ sectionId }),
    addBox: (bboxDeg: string) => add({ bboxDeg }),
    totals: computed(() => totalsOf(items.value, selection.spanIds.length)),
    /** After an assessment the facts are asked for again. */
    refresh: async () => {
      client.removeQueries({ queryKey: ['map', 'span-item'] });
      await fetchMissing();
    },
  };
}
