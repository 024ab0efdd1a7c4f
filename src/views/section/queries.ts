import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { keepPreviousData, useInfiniteQuery, useMutation, useQuery, useQueryClient } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { Placement, Side } from '#shared/contract/placements.ts';
import type { Wire } from '#shared/contract/sections.ts';

/** Keys of what the section page shows. */
export const sectionKeys = {
  all: ['sections'] as const,
  one: (sectionId: string) => ['sections', sectionId] as const,
  finding: (findingId: string | null) => ['findings', findingId] as const,
  series: (findingId: string | null, frequencyHz: number | null) =>
    ['findings', findingId, 'series', frequencyHz] as const,
  history: (spanWireId: string) => ['findings', 'of', spanWireId] as const,
  damperTypes: ['damper-types'] as const,
};

export function useSection(sectionId: MaybeRefOrGetter<string>) {
  return useQuery({
    queryKey: computed(() => sectionKeys.one(toValue(sectionId))),
    queryFn: () => call('getSection', { params: { sectionId: toValue(sectionId) } }),
  });
}

const idOf = (id: MaybeRefOrGetter<string | null>): string => {
  const value = toValue(id);
  if (value === null) throw new Error('A query ran without the id that enables it.');
  return value;
};

export function useFinding(findingId: MaybeRefOrGetter<string | null>) {
  return useQuery({
    queryKey: computed(() => sectionKeys.finding(toValue(findingId))),
    queryFn: () => call('getFinding', { params: { findingId: idOf(findingId) } }),
    enabled: () => toValue(findingId) !== null,
    // A finding never changes; only whether it is current does, and that comes with the section.
    staleTime: Infinity,
  });
}

/** Curves of a finding; the profile along the span at a frequency, or at the worst one when it is null. */
export function useFindingSeries(
  findingId: MaybeRefOrGetter<string | null>,
  frequencyHz: MaybeRefOrGetter<number | null>,
) {
  return useQuery({
    queryKey: computed(() => sectionKeys.series(toValue(findingId), toValue(frequencyHz))),
    queryFn: () => {
      const frequency = toValue(frequencyHz);
      return call('getFindingSeries', {
        params: { findingId: idOf(findingId) },
        query: frequency === null ? {} : { frequencyHz: frequency },
      });
    },
    enabled: () => toValue(findingId) !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  });
}

const historyPageCount = 20;

export function useSpanWireFindings(spanWireId: MaybeRefOrGetter<string>) {
  return useInfiniteQuery({
    queryKey: computed(() => sectionKeys.history(toValue(spanWireId))),
    queryFn: ({ pageParam }: { pageParam: string | null }) =>
      call('listSpanWireFindings', {
        params: { spanWireId: toValue(spanWireId) },
        query: { limitCount: historyPageCount, ...(pageParam === null ? {} : { cursor: pageParam }) },
      }),
    initialPageParam: null,
    getNextPageParam: (page) => page.nextCursor,
  });
}

const damperTypesMostCount = 500;

export function useDamperTypes(isNeeded: MaybeRefOrGetter<boolean>) {
  return useQuery({
    queryKey: sectionKeys.damperTypes,
    queryFn: () => call('listDamperTypes', { query: { limitCount: damperTypesMostCount } }),
    enabled: () => toValue(isNeeded),
  });
}

/** A damper to plan; `key` is made once a form, so that sending twice plans it once. */
export interface DamperPlan {
  readonly key: string;
  readonly spanWireId: string;
  readonly side: Side;
  readonly damperTypeId: string;
  readonly distanceM: number;
}

export function usePlanDamper(sectionId: MaybeRefOrGetter<string>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ key, ...body }: DamperPlan) =>
      call('createPlannedPlacement', { body: { id: key, ...body }, idempotencyKey: key }),
    onSuccess: () => client.invalidateQueries({ queryKey: sectionKeys.one(toValue(sectionId)) }),
  });
}

export function useWithdrawPlacement(sectionId: MaybeRefOrGetter<string>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (placement: Placement) =>
      call('removePlannedPlacement', {
        params: { placementId: placement.id },
        version: placement.versionNumber,
      }),
    // Also after a refusal: somebody else may have changed it, and the page should show that.
    onSettled: () => client.invalidateQueries({ queryKey: sectionKeys.one(toValue(sectionId)) }),
  });
}

export interface TensionEdit {
  readonly wireId: string;
  readonly tensionN: number;
  readonly versionNumber: Wire['versionNumber'];
}

export function useEditTension(sectionId: MaybeRefOrGetter<string>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ wireId, tensionN, versionNumber }: TensionEdit) =>
      call('editWire', { params: { wireId }, body: { tensionN }, version: versionNumber }),
    onSuccess: () => client.invalidateQueries({ queryKey: sectionKeys.one(toValue(sectionId)) }),
  });
}

export function useAssessSection() {
  return useMutation({
    mutationFn: ({ sectionId, key }: { sectionId: string; key: string }) =>
      call('createAssessment', {
        body: { selection: { kind: 'sections', sectionIds: [sectionId] } },
        idempotencyKey: key,
      }),
  });
}
