import { createSong, listSongs } from '#shared/api/projects.ts';
import { putOverviews, storeReport, type ReportSummary } from '#shared/api/reports.ts';
import type { Overview } from '#shared/measure/overview.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { writeOverviews } from '#shared/report/stored-overviews.ts';
import { call } from '../app/api-client.ts';
import { gzip } from '../browser/gzip.ts';

export type ReportToStore = {
  /** Made once per report, so that sending again after a lost answer stores it once. */
  submissionId: string;
  projectId: string;
  /** The song is found by its title, or added. */
  songTitle: string;
  report: CheckReport;
  overviews: ReadonlyMap<string, Overview>;
  rulesEdition: { studioSlug: string; number: number } | null;
};

/** Stores a report with its picture. Throws AppError as the server says, or `offline`. */
export async function storeCheck(check: ReportToStore): Promise<ReportSummary> {
  const songId = await findOrAddSong(check.projectId, check.songTitle);
  const { submissionId, report, rulesEdition } = check;
  const stored = await call(storeReport, {
    params: { songId },
    body: { submissionId, report, rulesEdition },
  });
  const bytes = await gzip(writeOverviews(check.overviews));
  await call(putOverviews, { params: { reportId: stored.id }, bytes });
  return stored;
}

async function findOrAddSong(projectId: string, title: string): Promise<string> {
  const params = { projectId };
  let cursor: string | undefined;
  do {
    const page = await call(listSongs, { params, query: cursor === undefined ? {} : { cursor } });
    const song = page.items.find((candidate) => sameTitle(candidate.title, title));
    if (song) return song.id;
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
  return (await call(createSong, { params, body: { title } })).id;
}

/** Titles are typed by hand: capitals, accents written two ways and outer spaces do not matter. */
function sameTitle(a: string, b: string): boolean {
  const fold = (title: string): string => title.normalize('NFC').trim().toLocaleLowerCase('en');
  return fold(a) === fold(b);
}
