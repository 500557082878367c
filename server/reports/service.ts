import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import type { PageQuery } from '#shared/api/page.ts';
import type {
  ReportShare,
  ReportSummary,
  SharedReport,
  StoredReport,
} from '#shared/api/reports.ts';
import { AppError } from '#shared/errors.ts';
import { maxReportBytes, type CheckReport } from '#shared/report/check-report.ts';
import { readReport } from '#shared/report/read-report.ts';
import { readOverviews } from '#shared/report/stored-overviews.ts';
import type { Person } from '../accounts/sessions.ts';
import { fromNow, msPerDay } from '../clock.ts';
import { isTextNotStorable } from '../db/failures.ts';
import type { AuthorizedReport, AuthorizedSong } from '../http/authorize.ts';
import { keyPage, toPage } from '../http/page-by-key.ts';
import { findEdition } from '../rules/queries.ts';
import { findRulesOfProduct } from '../rules/service.ts';
import { newSecret } from '../secret.ts';
import type { Services } from '../services.ts';
import { compareJudgements, isConsistent } from './compare-judgements.ts';
import * as queries from './queries.ts';

const gunzipAsync = promisify(gunzip);

/** Overviews unpack to at most this: a small gzip can hide gigabytes. */
const maxUnpackedOverviewBytes = 64 * 1024 * 1024;

type SummaryRow = Awaited<ReturnType<typeof queries.findSummary>>;
type ReportRow = Awaited<ReturnType<typeof queries.findReport>>;

function toSummary(row: SummaryRow): ReportSummary {
  const { id, songId, songTitle, projectId, verdict, counts, rulesHash, judgedAgain } = row;
  return {
    ...{ id, songId, songTitle, projectId, verdict, counts, rulesHash, judgedAgain },
    createdAt: row.createdAt.toISOString(),
    createdBy: { id: row.createdBy, name: row.createdByName },
    rulesEdition:
      row.studioSlug && row.studioName && row.editionNumber
        ? { studioSlug: row.studioSlug, studioName: row.studioName, number: row.editionNumber }
        : null,
    hasOverviews: row.overviewsOf !== null,
  };
}

/** A report stored by an earlier version is brought to today's shape on reading. */
function toStored(row: ReportRow): StoredReport {
  const reading = readReport(row.report);
  if (!('report' in reading)) throw new Error(`a stored report that is ${reading.problem}`);
  return { ...toSummary(row), report: reading.report, differences: row.differences };
}

type Submission = {
  submissionId: string;
  report: CheckReport;
  rulesEdition: { studioSlug: string; number: number } | null;
};

/**
 * Stores a report after judging its measures again. Whoever sends the same submission twice
 * gets what was stored the first time.
 */
export async function storeReport(
  services: Services,
  may: AuthorizedSong<'store-report'>,
  { submissionId, report, rulesEdition }: Submission,
): Promise<ReportSummary> {
  const { db, clock, limits } = services;
  const userId = may.person.userId;
  await limits.count('reports-of-person', userId);
  if (Buffer.byteLength(JSON.stringify(report)) > maxReportBytes) {
    throw new AppError('too-large', { limitBytes: maxReportBytes });
  }
  if (!isConsistent(report)) {
    throw new AppError('invalid-request', {
      issues: [{ path: 'body.report.verdict', message: 'does not follow from the findings' }],
    });
  }
  const edition = await findCheckedEdition(services, report, rulesEdition);
  const rules = edition ? edition.rules : await findRulesOfProduct(report.rulesHash);
  const judged = rules && services.rejudge(report, rules);
  const differences = judged ? compareJudgements(report, judged) : [];
  try {
    const reportId =
      (await queries.insertReport(db, {
        ...{ songId: may.songId, submissionId, report, differences },
        createdBy: userId,
        createdAt: clock.now(),
        rulesEditionId: edition?.id ?? null,
        rulesHash: report.rulesHash,
        reportSchema: report.schema,
        measureVersion: report.measureVersion,
        judgeVersion: report.judgeVersion,
        verdict: report.verdict,
        counts: report.counts,
        judgedAgain: !judged ? 'not-compared' : differences.length > 0 ? 'differs' : 'same',
      })) ?? (await findOwnSubmission(services, may, submissionId));
    return toSummary(await queries.findSummary(db, reportId));
  } catch (error) {
    if (isTextNotStorable(error)) {
      throw new AppError('invalid-request', {
        issues: [{ path: 'body.report', message: 'a text in it is not valid Unicode' }],
      });
    }
    throw error;
  }
}

/** The named edition; it must be the one whose rules the report was judged with. */
async function findCheckedEdition(
  { db }: Services,
  report: CheckReport,
  named: Submission['rulesEdition'],
) {
  if (!named) return null;
  const edition = await findEdition(db, named.studioSlug, named.number);
  if (!edition) throw new AppError('not-found');
  if (edition.rulesHash !== report.rulesHash) {
    throw new AppError('invalid-request', {
      issues: [{ path: 'body.report.rulesHash', message: 'not the rules of this edition' }],
    });
  }
  return edition;
}

async function findOwnSubmission(
  { db }: Services,
  may: AuthorizedSong<'store-report'>,
  submissionId: string,
): Promise<string> {
  const stored = await queries.findSubmission(db, may.songId, submissionId);
  if (stored?.createdBy !== may.person.userId) throw new AppError('conflict');
  return stored.id;
}

export async function listSongReports(
  { db }: Services,
  may: AuthorizedSong<'read-project'>,
  query: PageQuery,
) {
  const page = keyPage(query);
  return toPage(page, await queries.listSongReports(db, may.songId, page), toSummary);
}

export async function listMyReports({ db }: Services, person: Person, query: PageQuery) {
  const page = keyPage(query);
  return toPage(page, await queries.listReportsBy(db, person.userId, page), toSummary);
}

export async function getReport(
  { db }: Services,
  may: AuthorizedReport<'read-project'>,
): Promise<StoredReport> {
  return toStored(await queries.findReport(db, may.reportId));
}

export async function putOverviews(
  { db, clock }: Services,
  { reportId }: AuthorizedReport<'add-overviews'>,
  overviews: Uint8Array,
): Promise<void> {
  await requireOverviews(overviews);
  if (await queries.insertOverviews(db, { reportId, overviews, createdAt: clock.now() })) return;
  const stored = await queries.findOverviews(db, reportId);
  if (!stored || Buffer.compare(stored, overviews) !== 0) throw new AppError('conflict');
}

async function requireOverviews(bytes: Uint8Array): Promise<void> {
  const unpacked = await gunzipAsync(bytes, { maxOutputLength: maxUnpackedOverviewBytes }).catch(
    () => null,
  );
  if (unpacked && readOverviews(unpacked)) return;
  throw new AppError('invalid-request', {
    issues: [{ path: 'body', message: 'no overviews in gzip, or too large when unpacked' }],
  });
}

export async function getOverviews(
  { db }: Services,
  { reportId }: AuthorizedReport<'read-project'>,
): Promise<Uint8Array> {
  const overviews = await queries.findOverviews(db, reportId);
  if (!overviews) throw new AppError('not-found');
  return overviews;
}

type ShareRow = Awaited<ReturnType<typeof queries.insertShare>>;

function toShare({ id, createdAt, expiresAt }: ShareRow): ReportShare {
  return { id, createdAt: createdAt.toISOString(), expiresAt: expiresAt.toISOString() };
}

export async function createShare(
  { db, clock }: Services,
  { reportId, person }: AuthorizedReport<'share-report'>,
  expiresInDays: number,
): Promise<ReportShare & { token: string }> {
  const { secret, secretHash } = newSecret();
  const row = await queries.insertShare(db, {
    reportId,
    tokenHash: secretHash,
    createdBy: person.userId,
    createdAt: clock.now(),
    expiresAt: fromNow(clock, expiresInDays * msPerDay),
  });
  return { ...toShare(row), token: secret };
}

export async function listShares(
  { db, clock }: Services,
  { reportId }: AuthorizedReport<'share-report'>,
  query: PageQuery,
) {
  const page = keyPage(query);
  return toPage(page, await queries.listShares(db, reportId, clock.now(), page), toShare);
}

export async function revokeShare(
  { db }: Services,
  { reportId }: AuthorizedReport<'share-report'>,
  shareId: string,
): Promise<void> {
  if (!(await queries.deleteShare(db, reportId, shareId))) throw new AppError('not-found');
}

async function requireShared({ db, clock }: Services, secret: string): Promise<string> {
  const reportId = await queries.findSharedReportId(db, secret, clock.now());
  if (!reportId) throw new AppError('link-expired');
  return reportId;
}

/** What a link shows: the report without keys and without names of people. */
export async function readShared(services: Services, secret: string): Promise<SharedReport> {
  const reportId = await requireShared(services, secret);
  const stored = toStored(await queries.findReport(services.db, reportId));
  const { songTitle, createdAt, verdict, counts, rulesEdition, rulesHash } = stored;
  const { judgedAgain, hasOverviews, report, differences } = stored;
  return {
    ...{ songTitle, createdAt, verdict, counts, rulesEdition, rulesHash },
    ...{ judgedAgain, hasOverviews, report, differences },
  };
}

export async function readSharedOverviews(services: Services, secret: string): Promise<Uint8Array> {
  const reportId = await requireShared(services, secret);
  const overviews = await queries.findOverviews(services.db, reportId);
  if (!overviews) throw new AppError('not-found');
  return overviews;
}
