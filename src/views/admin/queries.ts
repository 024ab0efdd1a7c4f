import { useInfiniteQuery } from '@tanstack/vue-query';
import { call } from '#src/api/call.ts';

type PageParam = { pageParam: string | null };
const pageQuery = (cursor: string | null) => ({ limitCount: 100, ...(cursor === null ? {} : { cursor }) });
const paging = { initialPageParam: null, getNextPageParam: (page: { nextCursor: string | null }) => page.nextCursor };

export const usePeople = () =>
  useInfiniteQuery({
    queryKey: ['admin', 'people'],
    queryFn: ({ pageParam }: PageParam) => call('listPeople', { query: pageQuery(pageParam) }),
    ...paging,
  });

export const useAudit = () =>
  useInfiniteQuery({
    queryKey: ['admin', 'audit'],
    queryFn: ({ pageParam }: PageParam) => call('listAudit', { query: pageQuery(pageParam) }),
    ...paging,
  });
