import type { PageQuery } from '#shared/api/page.ts';
import type { Edition, EditionSummary } from '#shared/api/rules.ts';
import { AppError } from '#shared/errors.ts';
import { hashRules } from '#shared/rules/canonical-json.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { defaultRules, starterSets } from '#shared/rules/starter-sets.ts';
import type { Services } from '../services.ts';
import * as queries from './queries.ts';

/*
 * Published house rules are for everybody, so nothing here asks for a membership. Publishing
 * itself belongs to the editor of house rules.
 */

/** A studio's editions by number, which is their key: the cursor is the last number. */
export async function listEditions({ db }: Services, slug: string, query: PageQuery) {
  const before = query.cursor === undefined ? null : Number(query.cursor);
  if (before !== null && !Number.isSafeInteger(before)) {
    throw new AppError('invalid-request', {
      issues: [{ path: 'query.cursor', message: 'unknown' }],
    });
  }
  const rows = await queries.listEditions(db, slug, before, query.limit + 1);
  if (!rows) throw new AppError('not-found');
  const shown = rows.slice(0, query.limit);
  const last = shown.at(-1);
  return {
    items: shown.map((row): EditionSummary => ({
      ...row,
      publishedAt: row.publishedAt.toISOString(),
    })),
    nextCursor: rows.length > query.limit && last ? String(last.number) : null,
  };
}

export async function getEdition(
  { db }: Services,
  slug: string,
  number: number | 'latest',
): Promise<Edition> {
  const row = await queries.findEdition(db, slug, number);
  if (!row) throw new AppError('not-found');
  return {
    number: row.number,
    publishedAt: row.publishedAt.toISOString(),
    changeSummary: row.changeSummary,
    rulesHash: row.rulesHash,
    studio: { slug: row.studioSlug, name: row.studioName },
    rules: row.rules,
  };
}

let knownRules: Promise<ReadonlyMap<string, HouseRules>> | undefined;

/** The rules with this hash that come with the product; null when they are somebody's own. */
export async function findRulesOfProduct(rulesHash: string): Promise<HouseRules | null> {
  knownRules ??= Promise.all(
    [defaultRules, ...Object.values(starterSets)].map(
      async (rules) => [await hashRules(rules), rules] as const,
    ),
  ).then((entries) => new Map(entries));
  return (await knownRules).get(rulesHash) ?? null;
}
