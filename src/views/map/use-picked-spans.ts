import { useQueryClient } from '@tanstack/vue-query';
import { computed, shallowRef, watch } from 'vue';
import type { SpanListItem } from '#shared/contract/lines.ts';
import { worstGrade, type Grade } from '#shared/contract/grades.ts';
import { useSelectionStore } from '#src/stores/selection.ts';
import { localProblem } from '#src/api/api-problem.ts';
import { fetchSpans, listQueryOf, mapKeys, mostPicked, type SpanQuery } from './queries.ts';

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

const tooMany = localProblem(
  'invalid-input',
  'Too many spans to pick',
  `Nothing was added: at most ${mostPicked} spans can be picked. Pick fewer, or assess the whole network.`,
);

/** Reads spans, counts the times that something came, and keeps what went wrong. */
function useReading() {
  const problem = shallowRef<Error | null>(null);
  const fetchedCount = shallowRef(0);
  async function read(fetchItems: () => Promise<SpanListItem[]>): Promise<SpanListItem[]> {
    problem.value = null;
    try {
      const found = await fetchItems();
      fetchedCount.value += 1;
      return found;
    } catch (error) {
      problem.value = error instanceof Error ? error : new Error(String(error));
      return [];
    }
  }
  return { problem, fetchedCount, read };
}

/** The picked spans with their facts; facts of spans picked in another way are fetched. */
export function usePickedSpans() {
  const client = useQueryClient();
  const selection = useSelectionStore();
  const { problem, fetchedCount, read } = useReading();

  const items = computed(() => {
    void fetchedCount.value;
    return selection.spanIds.flatMap((id) => {
      const item = client.getQueryData<SpanListItem>(mapKeys.spanItem(id));
      return item === undefined ? [] : [item];
    });
  });

  async function fetchMissing(): Promise<void> {
    const missing = selection.spanIds.filter((id) => client.getQueryData(mapKeys.spanItem(id)) === undefined);
    for (let first = 0; first < missing.length; first += idsPerRequest) {
      const spanIds = missing.slice(first, first + idsPerRequest).join(',');
      await read(() => fetchSpans(client, { spanIds }));
    }
  }
  watch(
    () => selection.spanIds,
    () => void fetchMissing(),
    { immediate: true },
  );

  const add = async (query: SpanQuery) => {
    const found = await read(() => fetchSpans(client, query));
    const ids = new Set([...selection.spanIds, ...found.map(({ id }) => id)]);
    if (ids.size > mostPicked) {
      problem.value = tooMany;
      return [];
    }
    selection.add([...ids]);
    return found;
  };
  return {
    items,
    problem,
    sectionIds: computed(() => new Set(items.value.map(({ sectionId }) => sectionId))),
    addSection: (sectionId: string) => add({ sectionId }),
    /** With a filter on, only what it shows is picked. */
    addBox: (bboxDeg: string, grades: readonly Grade[]) => add({ bboxDeg, ...listQueryOf('', grades) }),
    addMatching: (search: string, grades: readonly Grade[]) => add(listQueryOf(search, grades)),
    totals: computed(() => totalsOf(items.value, selection.spanIds.length)),
    /** After an assessment the facts are asked for again. */
    refresh: async () => {
      client.removeQueries({ queryKey: mapKeys.spanItems });
      await fetchMissing();
    },
  };
}
