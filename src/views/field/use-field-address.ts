import { computed } from 'vue';
import type { ComputedRef } from 'vue';
import { useRoute, useRouter } from 'vue-router';

export interface FieldAddress {
  readonly structureId: ComputedRef<string | null>;
  readonly spanWireId: ComputedRef<string | null>;
  readonly logId: ComputedRef<string | null>;
  readonly openStructure: (structureId: string) => void;
  readonly openSpanWire: (spanWireId: string) => void;
  readonly back: () => void;
}

/** Where the crew is in the log: at which structure, at which wire; kept in the address, so that Back steps back. */
export function useFieldAddress(): FieldAddress {
  const route = useRoute();
  const router = useRouter();
  const part = (key: string) =>
    computed(() => {
      const value = route.query[key];
      return typeof value === 'string' && value !== '' ? value : null;
    });
  const structureId = part('structure');
  const spanWireId = part('wire');
  const go = (query: Record<string, string>) => void router.push({ query });
  return {
    structureId,
    spanWireId,
    logId: part('log'),
    openStructure: (id) => go({ structure: id }),
    openSpanWire: (id) => go({ ...(structureId.value === null ? {} : { structure: structureId.value }), wire: id }),
    back: () => go(spanWireId.value !== null && structureId.value !== null ? { structure: structureId.value } : {}),
  };
}
