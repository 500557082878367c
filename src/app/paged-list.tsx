import { useInfiniteQuery, type QueryKey } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Button } from '../ui/button.tsx';
import { LoadingState } from '../ui/states.tsx';
import { ErrorPanel } from './error-panel.tsx';

type ListPage<Item> = { items: Item[]; nextCursor: string | null };

/** The `query` part of a list's contract: which page. */
export type PageOf = { cursor?: string };

/** A list that the server answers page by page; more is loaded when asked for. */
export function usePagedList<Item>(
  queryKey: QueryKey,
  read: (query: PageOf, signal: AbortSignal) => Promise<ListPage<Item>>,
  enabled = true,
) {
  return useInfiniteQuery({
    queryKey,
    queryFn: ({ pageParam, signal }) =>
      read(pageParam === undefined ? {} : { cursor: pageParam }, signal),
    initialPageParam: undefined as string | undefined,
    getNextPageParam: (last) => last.nextCursor ?? undefined,
    enabled,
  });
}

export type PagedList<Item> = ReturnType<typeof usePagedList<Item>>;

type ListBodyProps<Item> = {
  list: PagedList<Item>;
  /** What is being loaded, for screen readers. */
  words: string;
  empty: ReactNode;
  children: (items: Item[]) => ReactNode;
};

/** A list in each of its states: loading, failed, empty, there, and with more to come. */
export function ListBody<Item>({ list, words, empty, children }: ListBodyProps<Item>) {
  if (list.isPending)
    return (
      <div className="px-5 py-4 sm:px-6">
        <LoadingState words={words} />
      </div>
    );
  if (list.isError)
    return (
      <div className="p-5 sm:p-6">
        <ErrorPanel error={list.error} onRetry={() => void list.refetch()} />
      </div>
    );
  const items = list.data.pages.flatMap((page) => page.items);
  if (items.length === 0) return empty;
  return (
    <>
      {children(items)}
      {list.hasNextPage && (
        <div className="border-t border-line px-5 py-3 sm:px-6">
          <Button
            size="small"
            busy={list.isFetchingNextPage}
            onClick={() => void list.fetchNextPage()}
          >
            Show more
          </Button>
        </div>
      )}
    </>
  );
}
