import { useMutation, useQuery, useQueryClient, type QueryClient } from '@tanstack/vue-query';
import { computed, toValue, type MaybeRefOrGetter } from 'vue';
import type { Grade } from '#shared/contract/grades.ts';
import type { SpanListItem } from '#shared/contract/lines.ts';
import { call } from '#src/api/call.ts';

export const mapKeys = {
  all: ['map'] as const,
  sections: ['map', 'sections'] as const,
  near: (what: 'spans' | 'structures', bboxDeg: string) => ['map', what, bboxDeg] as const,
  terrain: ['map', 'terrain'] as const,
  extent: ['map', 'extent'] as const,
  list: (search: string, grades: readonly Grade[]) => ['map', 'list', search, grades] as const,
  spanItems: ['map', 'span-item'] as const,
  spanItem: (spanId: string) => ['map', 'span-item', spanId] as const,
  bases: ['map', 'bases'] as const,
};

const longMs = 5 * 60_000;

export const useMapExtent = () =>
  useQuery({ queryKey: mapKeys.extent, queryFn: () => call('getMapExtent'), staleTime: longMs });
export const useMapTerrain = () =>
  useQuery({ queryKey: mapKeys.terrain, queryFn: () => call('getMapTerrain', { query: {} }), staleTime: longMs });
export const useMapSections = () =>
  useQuery({
    queryKey: mapKeys.sections,
    queryFn: ({ signal }) => call('getMapSections', { query: {}, signal }),
    staleTime: 30_000,
  });

/** Spans in a box; a null box is too far out for single spans. */
export function useMapSpans(bboxDeg: MaybeRefOrGetter<string | null>) {
  return useQuery({
    queryKey: computed(() => mapKeys.near('spans', toValue(bboxDeg) ?? '')),
    queryFn: ({ signal }) => call('getMapSpans', { query: { bboxDeg: toValue(bboxDeg) ?? '' }, signal }),
    enabled: computed(() => toValue(bboxDeg) !== null),
    placeholderData: (former) => former,
  });
}

export function useMapStructures(bboxDeg: MaybeRefOrGetter<string | null>) {
  return useQuery({
    queryKey: computed(() => mapKeys.near('structures', toValue(bboxDeg) ?? '')),
    queryFn: ({ signal }) => call('getMapStructures', { query: { bboxDeg: toValue(bboxDeg) ?? '' }, signal }),
    enabled: computed(() => toValue(bboxDeg) !== null),
    placeholderData: (former) => former,
  });
}

const listCount = 60;

/** Spans for the list beside the map, by text and grade. */
export function useSpanList(search: MaybeRefOrGetter<string>, grades: MaybeRefOrGetter<readonly Grade[]>) {
  return useQuery({
    queryKey: computed(() => mapKeys.list(toValue(search), toValue(grades))),
    queryFn: ({ signal }) =>
      call('listSpans', {
        query: { limitCount: listCount, ...listQueryOf(toValue(search), toValue(grades)) },
        signal,
      }),
    placeholderData: (former) => former,
  });
}

export const useBases = () =>
  useQuery({ queryKey: mapKeys.bases, queryFn: () => call('listBases', { query: { limitCount: 200 } }) });

export type SpanQuery = Readonly<{
  bboxDeg?: string;
  sectionId?: string;
  spanIds?: string;
  search?: string;
  grades?: string;
}>;
const pageCount = 2000;
/** As many as one assessment takes by name. */
export const mostPicked = 20_000;

/** Text and grades of the list as the service takes them. */
export function listQueryOf(search: string, grades: readonly Grade[]): SpanQuery {
  return {
    ...(search.trim() === '' ? {} : { search: search.trim() }),
    ...(grades.length === 0 ? {} : { grades: grades.join(',') }),
  };
}

/** Reads every span that fits, page by page, and keeps each under its id for the tray. */
export async function fetchSpans(client: QueryClient, query: SpanQuery): Promise<SpanListItem[]> {
  const items: SpanListItem[] = [];
  let cursor: string | null = null;
  do {
    const page: { items: SpanListItem[]; nextCursor: string | null } = await call('listSpans', {
      query: { ...query, limitCount: pageCount, ...(cursor === null ? {} : { cursor }) },
    });
    items.push(...page.items);
    cursor = page.nextCursor;
  } while (cursor !== null && items.length <= mostPicked);
  // Nothing observes these one by one; they must last as long as the spans are picked.
  client.setQueryDefaults(mapKeys.spanItems, { gcTime: Infinity });
  for (const item of items) client.setQueryData(mapKeys.spanItem(item.id), item);
  return items;
}

export interface AssessPicked {
  readonly basisId: string | null;
  /** Null assesses the whole network. */
  readonly spanIds: readonly string[] | null;
  readonly key: string;
}

export function useAssessPicked() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ basisId, spanIds, key }: AssessPicked) =>
      call('createAssessment', {
        body: {
          id: key,
          selection: spanIds === null ? { kind: 'whole-network' } : { kind: 'spans', spanIds: [...spanIds] },
          ...(basisId === null ? {} : { basisId }),
        },
        idempotencyKey: key,
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['assessments'] }),
  });
}
