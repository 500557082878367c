import { and, desc, eq, gt, isNotNull, or } from 'drizzle-orm';
import type { Queryable } from '../db/client.ts';
import {
  houseRulesEditions,
  projectMembers,
  projects,
  reportOverviews,
  reports,
  reportShares,
  songs,
  studioMembers,
  studios,
  users,
} from '../db/schema.ts';
import { olderThan, type KeyPage } from '../http/page-by-key.ts';
import { sha256Hex } from '../secret.ts';

/** What lists show: everything but the report itself. */
const summaryColumns = {
  id: reports.id,
  songId: reports.songId,
  songTitle: songs.title,
  projectId: songs.projectId,
  createdAt: reports.createdAt,
  createdBy: users.id,
  createdByName: users.name,
  verdict: reports.verdict,
  counts: reports.counts,
  rulesHash: reports.rulesHash,
  judgedAgain: reports.judgedAgain,
  editionNumber: houseRulesEditions.number,
  studioSlug: studios.slug,
  studioName: studios.name,
  overviewsOf: reportOverviews.reportId,
};

function selectSummaries(db: Queryable) {
  return db
    .select(summaryColumns)
    .from(reports)
    .innerJoin(songs, eq(songs.id, reports.songId))
    .innerJoin(users, eq(users.id, reports.createdBy))
    .leftJoin(houseRulesEditions, eq(houseRulesEditions.id, reports.rulesEditionId))
    .leftJoin(studios, eq(studios.id, houseRulesEditions.studioId))
    .leftJoin(reportOverviews, eq(reportOverviews.reportId, reports.id))
    .$dynamic();
}

export async function insertReport(db: Queryable, report: typeof reports.$inferInsert) {
  const [row] = await db
    .insert(reports)
    .values(report)
    .onConflictDoNothing({ target: [reports.songId, reports.submissionId] })
    .returning({ id: reports.id });
  return row?.id ?? null;
}

export async function findSubmission(db: Queryable, songId: string, submissionId: string) {
  const [row] = await db
    .select({ id: reports.id, createdBy: reports.createdBy })
    .from(reports)
    .where(and(eq(reports.songId, songId), eq(reports.submissionId, submissionId)));
  return row ?? null;
}

export async function findSummary(db: Queryable, reportId: string) {
  const [row] = await selectSummaries(db).where(eq(reports.id, reportId));
  if (!row) throw new Error('an authorised report that is not there');
  return row;
}

/** The report with everything about it. */
export async function findReport(db: Queryable, reportId: string) {
  const [[content], summary] = await Promise.all([
    db
      .select({ report: reports.report, differences: reports.differences })
      .from(reports)
      .where(eq(reports.id, reportId)),
    findSummary(db, reportId),
  ]);
  if (!content) throw new Error('an authorised report that is not there');
  return { ...summary, ...content };
}

/** The reports of a song, newest first. */
export async function listSongReports(db: Queryable, songId: string, page: KeyPage) {
  return selectSummaries(db)
    .where(and(eq(reports.songId, songId), olderThan(page, reports.id)))
    .orderBy(desc(reports.id))
    .limit(page.fetch);
}

/** The reports a person stored, newest first, in projects they still belong to. */
export async function listReportsBy(db: Queryable, userId: string, page: KeyPage) {
  return selectSummaries(db)
    .innerJoin(projects, eq(projects.id, songs.projectId))
    .leftJoin(
      studioMembers,
      and(
        eq(studioMembers.studioId, projects.studioId),
        eq(studioMembers.userId, userId),
        eq(studioMembers.role, 'owner'),
      ),
    )
    .leftJoin(
      projectMembers,
      and(eq(projectMembers.projectId, projects.id), eq(projectMembers.userId, userId)),
    )
    .where(
      and(
        eq(reports.createdBy, userId),
        or(eq(projects.ownerId, userId), isNotNull(studioMembers.id), isNotNull(projectMembers.id)),
        olderThan(page, reports.id),
      ),
    )
    .orderBy(desc(reports.id))
    .limit(page.fetch);
}

/** Stores the overviews; false when the report has some already. */
export async function insertOverviews(
  db: Queryable,
  row: { reportId: string; overviews: Uint8Array; createdAt: Date },
): Promise<boolean> {
  const stored = await db
    .insert(reportOverviews)
    .values(row)
    .onConflictDoNothing()
    .returning({ reportId: reportOverviews.reportId });
  return stored.length > 0;
}

export async function findOverviews(db: Queryable, reportId: string): Promise<Uint8Array | null> {
  const [row] = await db
    .select({ overviews: reportOverviews.overviews })
    .from(reportOverviews)
    .where(eq(reportOverviews.reportId, reportId));
  return row?.overviews ?? null;
}

export async function insertShare(db: Queryable, share: typeof reportShares.$inferInsert) {
  const [row] = await db.insert(reportShares).values(share).returning();
  if (!row) throw new Error('no key of the new link');
  return row;
}

/** The links of a report that still work, newest first. */
export async function listShares(db: Queryable, reportId: string, now: Date, page: KeyPage) {
  return db
    .select()
    .from(reportShares)
    .where(
      and(
        eq(reportShares.reportId, reportId),
        gt(reportShares.expiresAt, now),
        olderThan(page, reportShares.id),
      ),
    )
    .orderBy(desc(reportShares.id))
    .limit(page.fetch);
}

export async function deleteShare(db: Queryable, reportId: string, shareId: string) {
  const gone = await db
    .delete(reportShares)
    .where(and(eq(reportShares.id, shareId), eq(reportShares.reportId, reportId)))
    .returning({ id: reportShares.id });
  return gone.length > 0;
}

/** The report a link leads to; null when the link does not work. */
export async function findSharedReportId(db: Queryable, secret: string, now: Date) {
  const [row] = await db
    .select({ reportId: reportShares.reportId })
    .from(reportShares)
    .where(and(eq(reportShares.tokenHash, sha256Hex(secret)), gt(reportShares.expiresAt, now)));
  return row?.reportId ?? null;
}
