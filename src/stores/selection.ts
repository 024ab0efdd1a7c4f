import { defineStore } from 'pinia';
import { computed, ref } from 'vue';

/** Spans picked on the map, in the order of picking. */
export const useSelectionStore = defineStore('selection', () => {
  const spanIds = ref<readonly string[]>([]);
  const picked = computed(() => new Set(spanIds.value));
  return {
    spanIds,
    picked,
    count: computed(() => spanIds.value.length),
    add: (ids: readonly string[]) => {
      spanIds.value = [...spanIds.value, ...ids.filter((id) => !picked.value.has(id))];
    },
    remove: (ids: readonly string[]) => {
      const gone = new Set(ids);
      spanIds.value = spanIds.value.filter((id) => !gone.has(id));
    },
    toggle: (id: string) => {
      spanIds.value = picked.value.has(id) ? spanIds.value.filter((other) => other !== id) : [...spanIds.value, id];
    },
    clear: () => {
      spanIds.value = [];
    },
  };
});
