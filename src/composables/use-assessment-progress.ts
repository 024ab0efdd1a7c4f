import { onScopeDispose, shallowReadonly, shallowRef, toValue, watch } from 'vue';
import type { MaybeRefOrGetter, ShallowRef } from 'vue';
import type { AssessmentProgress, AssessmentState } from '#shared/contract/assessments.ts';
import { assessmentProgressSchema } from '#shared/contract/assessments.ts';
import { apiPrefix } from '#shared/contract/routes.ts';

/** True when an assessment will not go on by itself. */
export function isEnded(state: AssessmentState): boolean {
  return state === 'done' || state === 'failed' || state === 'cancelled';
}

export interface AssessmentWatch {
  /** Newest progress of the watched assessment; null before the first word of it. */
  readonly progress: Readonly<ShallowRef<AssessmentProgress | null>>;
  /** True while the connection is broken; it is taken up again by itself. */
  readonly isBroken: Readonly<ShallowRef<boolean>>;
}

/**
 * Follows an assessment by server-sent events until it ends.
 *
 * @param assessmentId whom to follow; null follows nobody
 * @param onEnded called once with the last progress, when results can be fetched
 */
export function useAssessmentProgress(
  assessmentId: MaybeRefOrGetter<string | null>,
  onEnded: (last: AssessmentProgress) => void = () => undefined,
): AssessmentWatch {
  const progress = shallowRef<AssessmentProgress | null>(null);
  const isBroken = shallowRef(false);
  let source: EventSource | null = null;

  function close(): void {
    source?.close();
    source = null;
  }

  function onMessage(event: MessageEvent<unknown>): void {
    if (typeof event.data !== 'string') return;
    const next = assessmentProgressSchema.parse(JSON.parse(event.data));
    isBroken.value = false;
    progress.value = next;
    if (!isEnded(next.state)) return;
    // A stream that ended is opened again by the browser unless it is closed here.
    close();
    onEnded(next);
  }

  function open(id: string): void {
    source = new EventSource(`${apiPrefix}/assessments/${encodeURIComponent(id)}/events`);
    source.addEventListener('message', onMessage);
    source.addEventListener('error', () => (isBroken.value = true));
  }

  watch(
    () => toValue(assessmentId),
    (id) => {
      close();
      progress.value = null;
      isBroken.value = false;
      if (id !== null) open(id);
    },
    { immediate: true },
  );
  onScopeDispose(close);

  return { progress: shallowReadonly(progress), isBroken: shallowReadonly(isBroken) };
}
