import { useQueryClient } from '@tanstack/vue-query';
import { computed, shallowReadonly, shallowRef } from 'vue';
import { useAssessmentProgress } from '#src/composables/use-assessment-progress.ts';
import { useAssessPicked, type AssessPicked } from './queries.ts';

type Picked = Omit<AssessPicked, 'key'>;

/** Assesses the picked spans and follows the run; when it ends everything that shows grades is asked again. */
export function useTrayAssessment(onEnded: () => void) {
  const client = useQueryClient();
  const start = useAssessPicked();
  const assessmentId = shallowRef<string | null>(null);
  const { progress, isBroken } = useAssessmentProgress(assessmentId, () => {
    onEnded();
    void client.invalidateQueries();
  });

  async function assess(picked: Picked): Promise<void> {
    const assessment = await start.mutateAsync({ ...picked, key: crypto.randomUUID() });
    assessmentId.value = assessment.id;
  }

  return {
    // What went wrong stands in the mutation's error, which the tray shows.
    assess: (picked: Picked) => void assess(picked).catch(() => undefined),
    assessmentId: shallowReadonly(assessmentId),
    progress,
    isBroken,
    problem: computed(() => start.error.value),
    isStarting: computed(() => start.isPending.value),
  };
}
