import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { useInfiniteQuery, useMutation, useQueryClient } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { Basis, BasisSpec } from '#shared/contract/bases.ts';

export const catalogueKeys = {
  conductors: (search: string) => ['catalogue', 'conductors', search] as const,
  damperTypes: (search: string) => ['catalogue', 'damper-types', search] as const,
  climates: ['catalogue', 'climates'] as const,
  terrainZones: (search: string) => ['catalogue', 'terrain-zones', search] as const,
  bases: ['catalogue', 'bases'] as const,
};

const pageRowCount = 100;
type PageParam = { pageParam: string | null };
const pageQueryOf = (cursor: string | null, search = '') => ({
  limitCount: pageRowCount,
  ...(search === '' ? {} : { search }),
  ...(cursor === null ? {} : { cursor }),
});
const paging = {
  initialPageParam: null,
  getNextPageParam: (page: { nextCursor: string | null }) => page.nextCursor,
};

export function useConductorTypes(search: MaybeRefOrGetter<string>) {
  return useInfiniteQuery({
    queryKey: computed(() => catalogueKeys.conductors(toValue(search))),
    queryFn: ({ pageParam }: PageParam) =>
      call('listConductorTypes', { query: pageQueryOf(pageParam, toValue(search)) }),
    ...paging,
  });
}

export function useDamperTypes(search: MaybeRefOrGetter<string>) {
  return useInfiniteQuery({
    queryKey: computed(() => catalogueKeys.damperTypes(toValue(search))),
    queryFn: ({ pageParam }: PageParam) => call('listDamperTypes', { query: pageQueryOf(pageParam, toValue(search)) }),
    ...paging,
  });
}

export function useClimates() {
  return useInfiniteQuery({
    queryKey: catalogueKeys.climates,
    queryFn: ({ pageParam }: PageParam) => call('listClimates', { query: pageQueryOf(pageParam) }),
    ...paging,
  });
}

export function useTerrainZones(search: MaybeRefOrGetter<string>) {
  return useInfiniteQuery({
    queryKey: computed(() => catalogueKeys.terrainZones(toValue(search))),
    queryFn: ({ pageParam }: PageParam) => call('listTerrainZones', { query: pageQueryOf(pageParam, toValue(search)) }),
    ...paging,
  });
}

export function useBases() {
  return useInfiniteQuery({
    queryKey: catalogueKeys.bases,
    queryFn: ({ pageParam }: PageParam) => call('listBases', { query: pageQueryOf(pageParam) }),
    ...paging,
  });
}

export interface BasisVersion {
  readonly name: Basis['name'];
  readonly spec: BasisSpec;
  readonly isDefault: boolean;
  /** Made once a form, so that sending twice saves one version. */
  readonly key: string;
}

export function useSaveBasis() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ key, ...body }: BasisVersion) => call('createBasis', { body, idempotencyKey: key }),
    onSuccess: () => client.invalidateQueries({ queryKey: catalogueKeys.bases }),
  });
}
