import { computed, toValue } from 'vue';
import type { MaybeRefOrGetter } from 'vue';
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';
import type { FieldLog, Side } from '#shared/contract/placements.ts';
import type { DamperDraft } from './damper-draft.ts';
import { fieldLogInput } from './damper-draft.ts';

export const fieldKeys = {
  structures: (search: string) => ['field', 'structures', search] as const,
  structure: (structureId: string | null) => ['field', 'structure', structureId] as const,
  logs: ['field', 'logs'] as const,
  damperTypes: ['damper-types'] as const,
  findings: (spanWireId: string) => ['findings', 'of', spanWireId, 'newest'] as const,
};

const structuresShownCount = 30;
const logsShownCount = 10;
const damperTypesMostCount = 500;

export function useFieldStructures(search: MaybeRefOrGetter<string>) {
  return useQuery({
    queryKey: computed(() => fieldKeys.structures(toValue(search))),
    queryFn: () =>
      call('listFieldStructures', {
        query: { limitCount: structuresShownCount, ...(toValue(search) === '' ? {} : { search: toValue(search) }) },
      }),
    placeholderData: keepPreviousData,
  });
}

export function useFieldStructure(structureId: MaybeRefOrGetter<string | null>) {
  return useQuery({
    queryKey: computed(() => fieldKeys.structure(toValue(structureId))),
    queryFn: () => call('getFieldStructure', { params: { structureId: toValue(structureId) ?? '' } }),
    enabled: () => toValue(structureId) !== null,
  });
}

export function useDamperTypes() {
  return useQuery({
    queryKey: fieldKeys.damperTypes,
    queryFn: () => call('listDamperTypes', { query: { limitCount: damperTypesMostCount } }),
  });
}

export function useRecentLogs() {
  return useQuery({
    queryKey: fieldKeys.logs,
    queryFn: () => call('listFieldLogs', { query: { limitCount: logsShownCount } }),
  });
}

/** The newest findings of a span wire: the one a log's re-assessment made, and the one before it. */
export function useNewestFindings(spanWireId: MaybeRefOrGetter<string>) {
  return useQuery({
    queryKey: computed(() => fieldKeys.findings(toValue(spanWireId))),
    queryFn: () =>
      call('listSpanWireFindings', { params: { spanWireId: toValue(spanWireId) }, query: { limitCount: 2 } }),
  });
}

export interface DamperLog {
  readonly draft: DamperDraft;
  readonly spanWireId: string;
  readonly side: Side;
  readonly fittedAt: string;
}

/** Sends the photo, if there is one, then the log; both under ids made before, so that sending again is safe. */
async function sendLog({ draft, spanWireId, side, fittedAt }: DamperLog): Promise<FieldLog> {
  if (draft.photo !== null) {
    const form = new FormData();
    form.append('file', draft.photo);
    await call('uploadPhoto', { params: { fileId: draft.photoFileId }, body: form });
  }
  return call('createFieldLog', {
    body: fieldLogInput(draft, { spanWireId, side, fittedAt }),
    idempotencyKey: draft.logId,
  });
}

export function useSendLog() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: sendLog,
    // Placements, grades and planned work have all changed.
    onSuccess: () => client.invalidateQueries(),
  });
}
