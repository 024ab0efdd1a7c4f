import { useMutation, useQuery, useQueryClient } from '@tanstack/vue-query';
import { computed, toValue, type MaybeRefOrGetter } from 'vue';
import type { ImportOptions } from '#shared/contract/imports.ts';
import { call } from '#src/api/call.ts';

export const importKeys = {
  all: ['imports'] as const,
  list: ['imports', 'list'] as const,
  one: (id: string) => ['imports', id] as const,
  conductors: (search: string) => ['imports', 'conductors', search] as const,
};

export const useImports = () =>
  useQuery({ queryKey: importKeys.list, queryFn: () => call('listImports', { query: { limitCount: 20 } }) });

export function useImportRun(importId: MaybeRefOrGetter<string | null>) {
  return useQuery({
    queryKey: computed(() => importKeys.one(toValue(importId) ?? '')),
    queryFn: () => call('getImport', { params: { importId: toValue(importId) ?? '' } }),
    enabled: computed(() => toValue(importId) !== null),
  });
}

export function useConductorSearch(search: MaybeRefOrGetter<string>) {
  return useQuery({
    queryKey: computed(() => importKeys.conductors(toValue(search))),
    queryFn: () =>
      call('listConductorTypes', {
        query: { limitCount: 30, ...(toValue(search) === '' ? {} : { search: toValue(search) }) },
      }),
    placeholderData: (former) => former,
  });
}

export function useUpload() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ file, options }: { file: File; options: ImportOptions }) => {
      const body = new FormData();
      // The options come first: the server reads the parts in order.
      body.append('options', JSON.stringify(options));
      body.append('file', file);
      return call('createImport', { body });
    },
    onSettled: () => client.invalidateQueries({ queryKey: importKeys.list }),
  });
}
