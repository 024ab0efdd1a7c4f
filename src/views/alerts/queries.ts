import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { useInfiniteQuery, useMutation, useQueryClient } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { Alert } from '#shared/contract/alerts.ts';

export type AlertState = Alert['state'];

export const alertKeys = {
  all: ['alerts'] as const,
  list: (states: readonly AlertState[]) => ['alerts', states] as const,
};

const alertPageCount = 50;

export function useAlerts(states: MaybeRefOrGetter<readonly AlertState[]>) {
  return useInfiniteQuery({
    queryKey: computed(() => alertKeys.list(toValue(states))),
    queryFn: ({ pageParam }: { pageParam: string | null }) =>
      call('listAlerts', {
        query: {
          limitCount: alertPageCount,
          ...(toValue(states).length === 0 ? {} : { states: toValue(states).join(',') }),
          ...(pageParam === null ? {} : { cursor: pageParam }),
        },
      }),
    initialPageParam: null,
    getNextPageParam: (page) => page.nextCursor,
  });
}

export interface AlertAct {
  readonly alertId: string;
  readonly act: 'acknowledge' | 'close';
  readonly note: string;
}

export function useActOnAlert() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ alertId, act, note }: AlertAct) =>
      call(act === 'acknowledge' ? 'acknowledgeAlert' : 'closeAlert', { params: { alertId }, body: { note } }),
    onSettled: () => client.invalidateQueries({ queryKey: alertKeys.all }),
  });
}
