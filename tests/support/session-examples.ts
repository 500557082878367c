import type { Session } from '#shared/api/accounts.ts';
import type { Project } from '#shared/api/projects.ts';
import type { ReportSummary } from '#shared/api/reports.ts';

/** A UUID of version 7's shape that ends in the given number. */
export function exampleId(number: number): string {
  return `01890000-0000-7000-8000-${String(number).padStart(12, '0')}`;
}

export const marenSession: Session = {
  user: {
    id: exampleId(1),
    name: 'Maren Holt',
    email: 'maren@harbour-lane.example',
    privateProjectId: exampleId(2),
  },
  studios: [
    { id: exampleId(3), slug: 'harbour-lane-mixing', name: 'Harbour Lane Mixing', role: 'owner' },
  ],
};

export const weatherForTwo: Project = {
  id: exampleId(4),
  kind: 'studio',
  title: 'Weather for Two',
  artistName: 'Velvet Tramline',
  studio: { id: exampleId(3), slug: 'harbour-lane-mixing', name: 'Harbour Lane Mixing' },
  rulesEditionNumber: 1,
  role: 'owner',
  createdAt: '2026-11-20T10:12:00.000Z',
};

export const firstReport: ReportSummary = {
  id: exampleId(100),
  songId: exampleId(50),
  songTitle: 'Salt on the Windows',
  projectId: weatherForTwo.id,
  createdAt: '2026-11-21T10:12:00.000Z',
  createdBy: { id: exampleId(9), name: 'Juno Park' },
  verdict: 'must-fix',
  counts: { 'must-fix': 2, look: 4, note: 1 },
  rulesEdition: { studioSlug: 'harbour-lane-mixing', studioName: 'Harbour Lane Mixing', number: 1 },
  rulesHash: 'a'.repeat(64),
  judgedAgain: 'differs',
  hasOverviews: true,
};

/** One page of a list, the last one. */
export function onePage(items: readonly unknown[]) {
  return { items, nextCursor: null };
}
