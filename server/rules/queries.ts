import { and, desc, eq, lt } from 'drizzle-orm';
import type { Queryable } from '../db/client.ts';
import { houseRulesEditions, studios } from '../db/schema.ts';

const summaryColumns = {
  number: houseRulesEditions.number,
  publishedAt: houseRulesEditions.publishedAt,
  changeSummary: houseRulesEditions.changeSummary,
  rulesHash: houseRulesEditions.rulesHash,
};

/** A studio's editions, newest first, older than number `before`. Null: no such studio. */
export async function listEditions(
  db: Queryable,
  slug: string,
  before: number | null,
  limit: number,
) {
  const [studio] = await db.select({ id: studios.id }).from(studios).where(eq(studios.slug, slug));
  if (!studio) return null;
  return db
    .select(summaryColumns)
    .from(houseRulesEditions)
    .where(
      and(
        eq(houseRulesEditions.studioId, studio.id),
        before === null ? undefined : lt(houseRulesEditions.number, before),
      ),
    )
    .orderBy(desc(houseRulesEditions.number))
    .limit(limit);
}

/** One edition with its rules, or the newest; null when there is none. */
export async function findEdition(db: Queryable, slug: string, number: number | 'latest') {
  const [row] = await db
    .select({
      ...summaryColumns,
      id: houseRulesEditions.id,
      rules: houseRulesEditions.rules,
      studioSlug: studios.slug,
      studioName: studios.name,
    })
    .from(houseRulesEditions)
    .innerJoin(studios, eq(studios.id, houseRulesEditions.studioId))
    .where(
      and(
        eq(studios.slug, slug),
        number === 'latest' ? undefined : eq(houseRulesEditions.number, number),
      ),
    )
    .orderBy(desc(houseRulesEditions.number))
    .limit(1);
  return row ?? null;
}

/** Publishes an edition; nothing can change it afterwards. */
export async function insertEdition(
  db: Queryable,
  edition: typeof houseRulesEditions.$inferInsert,
): Promise<void> {
  await db.insert(houseRulesEditions).values(edition);
}
