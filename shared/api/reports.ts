import { z } from 'zod';
import { findingCodes, levels } from '../findings/finding.ts';
import { checkReportSchema, maxReportBytes, verdicts } from '../report/check-report.ts';
import { defineEndpoint } from './endpoint.ts';
import { idSchema, momentSchema, slugSchema, tokenSchema } from './fields.ts';
import { pageQuerySchema, pageSchema } from './page.ts';
import { editionNumberSchema, rulesHashSchema } from './rules.ts';

/** The most bytes of gzip the overviews of one report may have. */
export const overviewsLimitBytes = 8 * 1024 * 1024;

/** The media type overviews travel under, both ways: the bytes are gzip (RFC 6713). */
export const overviewsMediaType = 'application/gzip';

/**
 * One finding on which the server and the sender disagree: the server judged the measures in
 * the report again, with its own copy of the rules.
 */
export const differenceSchema = z.strictObject({
  /** In the files as they were dropped, or as they are packed after repairs. */
  about: z.enum(['dropped', 'packed']),
  code: z.enum(findingCodes),
  /** Paths as in the report, at most 20; empty where the finding is about the whole set. */
  files: z.array(z.string()),
  /** Null where only the server finds it. */
  sentLevel: z.enum(levels).nullable(),
  /** Null where the server does not find it. Equal levels: something else in it differs. */
  judgedLevel: z.enum(levels).nullable(),
});
export type Difference = z.output<typeof differenceSchema>;

export const reportSummarySchema = z.strictObject({
  id: idSchema,
  songId: idSchema,
  songTitle: z.string(),
  projectId: idSchema,
  createdAt: momentSchema,
  createdBy: z.strictObject({ id: idSchema, name: z.string() }),
  verdict: z.enum(verdicts),
  /** Findings that remain, by level. */
  counts: checkReportSchema.shape.counts,
  /** Null when the check ran against rules that no studio published. */
  rulesEdition: z
    .strictObject({ studioSlug: slugSchema, studioName: z.string(), number: editionNumberSchema })
    .nullable(),
  rulesHash: rulesHashSchema,
  /**
   * `same`: the server judged again and agrees. `differs`: it does not, see the differences.
   * `not-compared`: made by another version of measures or judge, under rules the server does
   * not know, or shortened to stay within its size, so nothing can be said.
   */
  judgedAgain: z.enum(['same', 'differs', 'not-compared']),
  hasOverviews: z.boolean(),
});
export type ReportSummary = z.output<typeof reportSummarySchema>;

export const storedReportSchema = reportSummarySchema.extend({
  report: checkReportSchema,
  differences: z.array(differenceSchema),
});
export type StoredReport = z.output<typeof storedReportSchema>;

const songParams = z.strictObject({ songId: idSchema });
const reportParams = z.strictObject({ reportId: idSchema });

/**
 * Stores a report for a song. `submissionId` is made by the sender, once per report: sending
 * the same again (after a lost answer) returns what was stored the first time. For everybody
 * in the project. Errors: `too-large`, `invalid-request`, `not-found` (edition).
 */
export const storeReport = defineEndpoint({
  method: 'POST',
  path: '/api/songs/:songId/reports',
  params: songParams,
  body: z.strictObject({
    submissionId: idSchema,
    report: checkReportSchema,
    /** The published edition the check ran against, where there is one. */
    rulesEdition: z
      .strictObject({ studioSlug: slugSchema, number: editionNumberSchema })
      .nullable(),
  }),
  bodyLimitBytes: maxReportBytes + 4096,
  response: reportSummarySchema,
});

/** The song's reports, newest first. */
export const listSongReports = defineEndpoint({
  method: 'GET',
  path: '/api/songs/:songId/reports',
  params: songParams,
  query: pageQuerySchema,
  response: pageSchema(reportSummarySchema),
});

/** The reports the signed-in person stored, newest first. */
export const listMyReports = defineEndpoint({
  method: 'GET',
  path: '/api/reports',
  query: pageQuerySchema,
  response: pageSchema(reportSummarySchema),
});

export const getReport = defineEndpoint({
  method: 'GET',
  path: '/api/reports/:reportId',
  params: reportParams,
  response: storedReportSchema,
});

/**
 * Stores the overviews (pictures of the sound) of a report, gzip, once; sending the same again
 * does nothing. Whoever stored the report. Errors: `too-large`, `conflict` (others are stored).
 */
export const putOverviews = defineEndpoint({
  method: 'PUT',
  path: '/api/reports/:reportId/overviews',
  params: reportParams,
  bodyBytes: { mediaType: overviewsMediaType, limitBytes: overviewsLimitBytes },
  response: null,
});

/** The overviews as they were stored (still gzip). Errors: `not-found` when there are none. */
export const getOverviews = defineEndpoint({
  method: 'GET',
  path: '/api/reports/:reportId/overviews',
  params: reportParams,
  response: null,
  responseBytes: { mediaType: overviewsMediaType, limitBytes: overviewsLimitBytes },
});

export const reportShareSchema = z.strictObject({
  id: idSchema,
  createdAt: momentSchema,
  expiresAt: momentSchema,
});
export type ReportShare = z.output<typeof reportShareSchema>;

/**
 * Makes a link with which anybody can read the report: `/shared-report#token=…`. The token is
 * answered this once, only its hash is kept. Whoever stored the report, and the studio's owner.
 */
export const createReportShare = defineEndpoint({
  method: 'POST',
  path: '/api/reports/:reportId/shares',
  params: reportParams,
  body: z.strictObject({ expiresInDays: z.number().int().min(1).max(365).default(90) }),
  response: reportShareSchema.extend({ token: tokenSchema }),
});

/** The report's links that still work, newest first. For those who may make one. */
export const listReportShares = defineEndpoint({
  method: 'GET',
  path: '/api/reports/:reportId/shares',
  params: reportParams,
  query: pageQuerySchema,
  response: pageSchema(reportShareSchema),
});

/** Ends a link. For those who may make one. */
export const revokeReportShare = defineEndpoint({
  method: 'DELETE',
  path: '/api/reports/:reportId/shares/:shareId',
  params: z.strictObject({ reportId: idSchema, shareId: idSchema }),
  response: null,
});

/** What a visitor with a link sees: the report, but no names of people and no keys. */
export const sharedReportSchema = storedReportSchema.omit({
  id: true,
  songId: true,
  projectId: true,
  createdBy: true,
});
export type SharedReport = z.output<typeof sharedReportSchema>;

/**
 * Reads a shared report. The token travels in the body, so this is a POST although it changes
 * nothing. Errors: `link-expired`.
 */
export const readSharedReport = defineEndpoint({
  method: 'POST',
  path: '/api/shared-reports/read',
  body: z.strictObject({ token: tokenSchema }),
  response: sharedReportSchema,
});

/** The overviews of a shared report, gzip. Errors: `link-expired`, `not-found`. */
export const readSharedOverviews = defineEndpoint({
  method: 'POST',
  path: '/api/shared-reports/overviews',
  body: z.strictObject({ token: tokenSchema }),
  response: null,
  responseBytes: { mediaType: overviewsMediaType, limitBytes: overviewsLimitBytes },
});
