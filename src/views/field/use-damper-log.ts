import { computed, shallowReadonly, shallowRef } from 'vue';
import type { DamperDraft, SpanWireAtStructure } from './damper-draft.ts';
import { draftFaults, newDraft, offPlanM, steppedDistanceM } from './damper-draft.ts';
import { useSendLog } from './queries.ts';

/** The form of one fitted damper: its draft, what is wrong with it, and sending it. */
export function useDamperLog(spanWire: SpanWireAtStructure) {
  const newId = () => crypto.randomUUID();
  const draft = shallowRef<DamperDraft>(newDraft(spanWire, null, newId));
  const isChecked = shallowRef(false);
  const send = useSendLog();
  /** When Send was first pressed; a second try tells the same time, so that the service sees the same log. */
  let fittedAt: string | null = null;

  const faults = computed(() => (isChecked.value ? draftFaults(draft.value, spanWire) : {}));

  function change(part: Partial<Omit<DamperDraft, 'logId' | 'photoFileId'>>): void {
    draft.value = { ...draft.value, ...part };
  }

  function realise(placementId: string | null): void {
    const placement = spanWire.placements.find((one) => one.id === placementId);
    change({
      replacesPlacementId: placement?.id ?? null,
      ...(placement === undefined ? {} : { damperTypeId: placement.damperTypeId, distanceM: placement.distanceM }),
    });
  }

  function submit(): void {
    isChecked.value = true;
    if (send.isPending.value || Object.keys(draftFaults(draft.value, spanWire)).length > 0) return;
    fittedAt ??= new Date().toISOString();
    send.mutate({ draft: draft.value, spanWireId: spanWire.spanWireId, side: spanWire.side, fittedAt });
  }

  return {
    draft: shallowReadonly(draft),
    faults,
    offPlanM: computed(() => offPlanM(draft.value, spanWire)),
    change,
    realise,
    step: (count: 1 | -1) => change({ distanceM: steppedDistanceM(draft.value.distanceM, count) }),
    submit,
    log: computed(() => send.data.value ?? null),
    problem: computed(() => send.error.value),
    isSending: computed(() => send.isPending.value),
  };
}
