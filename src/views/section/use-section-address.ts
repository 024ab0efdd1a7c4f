import { computed } from 'vue';
import type { ComputedRef } from 'vue';
import { useRoute, useRouter } from 'vue-router';
import type { SpanWireChoice } from '#src/components/drawing/span-wire-steps.ts';
import type { AskedChoice, SectionTab } from './section-choice.ts';
import { chosenTab } from './section-choice.ts';

export interface SectionAddress {
  readonly asked: ComputedRef<AskedChoice>;
  readonly tab: ComputedRef<SectionTab>;
  readonly choose: (choice: SpanWireChoice) => void;
  readonly showTab: (tab: SectionTab) => void;
}

/** What the section page shows, kept in its address: span, wire and tab. */
export function useSectionAddress(): SectionAddress {
  const route = useRoute();
  const router = useRouter();
  const text = (value: unknown): string | null => (typeof value === 'string' && value !== '' ? value : null);

  function change(query: Record<string, string>): void {
    void router.replace({ query: { ...route.query, ...query } });
  }

  return {
    asked: computed(() => ({ span: text(route.query['span']), wire: text(route.query['wire']) })),
    tab: computed(() => chosenTab(text(route.query['tab']))),
    choose: (choice) => change({ span: choice.spanId, wire: choice.wireId }),
    showTab: (tab) => change({ tab }),
  };
}
