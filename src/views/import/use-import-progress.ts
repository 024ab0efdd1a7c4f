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
  /** True while the connection is broken; the browser takes it up again by itself. */
  const isBroken = shallowRef(false);
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
      isBroken.value = false;
      if (id === null) return;
      source = new EventSource(addressOf('watchImport', { params: { importId: id } }));
      source.onerror = () => (isBroken.value = true);
      source.onmessage = (event: MessageEvent<string>) => {
        isBroken.value = false;
        progress.value = importProgressSchema.parse(JSON.parse(event.data));
        if (!isImportEnded(progress.value.state)) return;
        close();
        onEnded();
      };
    },
    { immediate: true },
  );
  onScopeDispose(close);
  return { progress: shallowReadonly(progress), isBroken: shallowReadonly(isBroken) };
}
