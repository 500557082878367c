import { AppError } from '#shared/errors.ts';
import type { ReportSummary } from '#shared/api/reports.ts';
import { listWaiting, putWaiting, removeWaiting } from '../browser/waiting-reports.ts';
import { storeCheck, type ReportToStore } from './store-report.ts';

/**
 * Stores a report, or keeps it in this browser until the server can be reached: null then.
 * Throws AppError as the server says otherwise.
 */
export async function storeOrWait(check: ReportToStore): Promise<ReportSummary | null> {
  try {
    return await storeCheck(check);
  } catch (cause) {
    if (!isUnreachable(cause)) throw cause;
    await putWaiting(check.submissionId, check);
    return null;
  }
}

/**
 * Stores what waits, as far as that is possible now, and answers how many reports that were. A
 * report that the server will never take is let go; one for which somebody must sign in waits on.
 */
export async function storeWaiting(): Promise<number> {
  let stored = 0;
  for (const check of (await listWaiting()) as ReportToStore[]) {
    try {
      await storeCheck(check);
      stored += 1;
    } catch (cause) {
      if (isUnreachable(cause)) break;
      if (cause instanceof AppError && cause.code === 'sign-in-required') continue;
      if (!(cause instanceof AppError)) throw cause;
    }
    await removeWaiting(check.submissionId);
  }
  return stored;
}

function isUnreachable(cause: unknown): boolean {
  return cause instanceof AppError && (cause.code === 'offline' || cause.code === 'unavailable');
}
