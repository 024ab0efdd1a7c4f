import { onScopeDispose, shallowReadonly, shallowRef, toValue, watch, type MaybeRefOrGetter } from 'vue';
import type { z } from 'zod';
import { importProgressSchema } from '#shared/contract/imports.ts';
import { addressOf } from '#src/api/call.ts';

type ImportProgress = z.infer<typeof importProgressSchema>;

export const isImportEnded = (state: ImportProgress['state']) =>
  state === 'done' || state === 'refused' || state === 'failed';

/** Follows an import by server-sent events until it ends. */
export function useImportProgress(importId: MaybeRefOrGetter<string | null>, onEnded: () => void) {
  const progress = shallowRef<ImportProgress | null>(null);
  let source: EventSource | null = null;
  const close = () => {
    source?.close();
    source = null;
  };
  watch(
    () => toValue(importId),
    (id) => {
      close();
      progress.value = null;
      if (id === null) return;
      source = new EventSource(addressOf('watchImport', { params: { importId: id } }));
      source.onmessage = (event: MessageEvent<string>) => {
        progress.value = importProgressSchema.parse(JSON.parse(event.data));
        if (!isImportEnded(progress.value.state)) return;
        close();
        onEnded();
      };
    },
    { immediate: true },
  );
  onScopeDispose(close);
  return { progress: shallowReadonly(progress) };
}
