import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { useInfiniteQuery, useMutation, useQuery, useQueryClient } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { Grade } from '#shared/contract/grades.ts';

export const assessmentKeys = {
  all: ['assessments'] as const,
  list: ['assessments', 'list'] as const,
  one: (assessmentId: string) => ['assessments', 'one', assessmentId] as const,
  findings: (assessmentId: string, grades: readonly Grade[]) =>
    ['assessments', 'one', assessmentId, 'findings', grades] as const,
};

const pageRowCount = 50;

export function useAssessments() {
  return useInfiniteQuery({
    queryKey: assessmentKeys.list,
    queryFn: ({ pageParam }: { pageParam: string | null }) =>
      call('listAssessments', {
        query: { limitCount: pageRowCount, ...(pageParam === null ? {} : { cursor: pageParam }) },
      }),
    initialPageParam: null,
    getNextPageParam: (page) => page.nextCursor,
  });
}

export function useAssessment(assessmentId: MaybeRefOrGetter<string>) {
  return useQuery({
    queryKey: computed(() => assessmentKeys.one(toValue(assessmentId))),
    queryFn: () => call('getAssessment', { params: { assessmentId: toValue(assessmentId) } }),
  });
}

export function useAssessmentFindings(
  assessmentId: MaybeRefOrGetter<string>,
  grades: MaybeRefOrGetter<readonly Grade[]>,
) {
  return useInfiniteQuery({
    queryKey: computed(() => assessmentKeys.findings(toValue(assessmentId), toValue(grades))),
    queryFn: ({ pageParam }: { pageParam: string | null }) =>
      call('listAssessmentFindings', {
        params: { assessmentId: toValue(assessmentId) },
        query: {
          limitCount: pageRowCount,
          ...(toValue(grades).length === 0 ? {} : { grades: toValue(grades).join(',') }),
          ...(pageParam === null ? {} : { cursor: pageParam }),
        },
      }),
    initialPageParam: null,
    getNextPageParam: (page) => page.nextCursor,
  });
}

export interface AssessmentAct {
  readonly assessmentId: string;
  readonly act: 'cancel' | 'retry';
}

export function useActOnAssessment() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ assessmentId, act }: AssessmentAct) =>
      call(act === 'cancel' ? 'cancelAssessment' : 'retryAssessment', { params: { assessmentId } }),
    onSettled: () => client.invalidateQueries({ queryKey: assessmentKeys.all }),
  });
}
