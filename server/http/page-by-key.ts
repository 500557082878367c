import { gt, lt, type SQL } from 'drizzle-orm';
import type { PgColumn } from 'drizzle-orm/pg-core';
import { z } from 'zod';
import type { PageQuery } from '#shared/api/page.ts';
import { AppError } from '#shared/errors.ts';

/** Which rows a list query fetches: one more than asked for, to know whether more follow. */
export type KeyPage = {
  /** The key of the last row of the page before; null for the first page. */
  readonly after: string | null;
  /** Rows to fetch. */
  readonly fetch: number;
};

/**
 * Every list is ordered by its rows' keys (UUIDv7) and paged by them, so that a page costs the
 * same wherever it is and rows that arrive in between shift nothing. The cursor is the last key.
 */
export function keyPage(query: PageQuery): KeyPage {
  if (query.cursor !== undefined && !z.uuid().safeParse(query.cursor).success) {
    throw new AppError('invalid-request', {
      issues: [{ path: 'query.cursor', message: 'unknown' }],
    });
  }
  return { after: query.cursor ?? null, fetch: query.limit + 1 };
}

/** The rows behind the page before, in a list that begins with the newest. */
export function olderThan(page: KeyPage, key: PgColumn): SQL | undefined {
  return page.after === null ? undefined : lt(key, page.after);
}

/** The rows behind the page before, in a list that begins with the oldest. */
export function newerThan(page: KeyPage, key: PgColumn): SQL | undefined {
  return page.after === null ? undefined : gt(key, page.after);
}

/** Makes the answer of a list from the fetched rows; `id` of a row is its key. */
export function toPage<Row extends { id: string }, Item>(
  page: KeyPage,
  rows: readonly Row[],
  toItem: (row: Row) => Item,
): { items: Item[]; nextCursor: string | null } {
  const shown = rows.slice(0, page.fetch - 1);
  const last = shown.at(-1);
  return {
    items: shown.map(toItem),
    nextCursor: rows.length === page.fetch && last ? last.id : null,
  };
}
