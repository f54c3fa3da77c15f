import { infiniteQueryOptions, type InfiniteData } from '@tanstack/react-query';
import { apiGet, type List, type Params } from './api';

/** A list that is fetched page by page, by the cursor that each answer carries. */
export function listQuery<Item>(key: readonly unknown[], path: string, params: Params = {}) {
  return infiniteQueryOptions({
    queryKey: key,
    queryFn: ({ pageParam, signal }) => apiGet<List<Item>>(path, { ...params, cursor: pageParam }, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
    select: allRows<Item>,
  });
}

const allRows = <Item>(data: InfiniteData<List<Item>>) => data.pages.flatMap((page) => page.data);
