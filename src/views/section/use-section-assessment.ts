import { computed, shallowReadonly, shallowRef, toValue, watch } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { useQueryClient } from '@tanstack/vue-query';
import { useAssessmentProgress } from '#src/composables/use-assessment-progress.ts';
import { useAssessSection } from './queries.ts';

/** Assesses a section and follows the run; when it ends everything that shows grades is asked again. */
export function useSectionAssessment(sectionId: MaybeRefOrGetter<string>) {
  const client = useQueryClient();
  const start = useAssessSection();
  const assessmentId = shallowRef<string | null>(null);
  const { progress, isBroken } = useAssessmentProgress(assessmentId, () => void client.invalidateQueries());

  async function assess(): Promise<void> {
    const assessment = await start.mutateAsync({ sectionId: toValue(sectionId), key: crypto.randomUUID() });
    assessmentId.value = assessment.id;
  }

  watch(
    () => toValue(sectionId),
    () => {
      assessmentId.value = null;
      start.reset();
    },
  );

  return {
    assess: () => void assess().catch(() => undefined),
    assessmentId: shallowReadonly(assessmentId),
    progress,
    isBroken,
    problem: computed(() => start.error.value),
    isStarting: computed(() => start.isPending.value),
  };
}
