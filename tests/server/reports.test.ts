import { gunzipSync, gzipSync } from 'node:zlib';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as projects from '#shared/api/projects.ts';
import * as contract from '#shared/api/reports.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { defaultRules, starterSets } from '#shared/rules/starter-sets.ts';
import { storeReferenceScenario } from '../../server/dev/reference-scenario.ts';
import { getEdition } from '#shared/api/rules.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, signUp } from '../support/server-browser.ts';
import { checkSmallSession } from '../support/server-report.ts';

let server: TestServer;
let artist: Awaited<ReturnType<typeof signUp>>;
let songId: string;
let report: CheckReport;
let overviews: Uint8Array;
beforeAll(async () => {
  server = await startTestServer();
  await storeReferenceScenario(server.db, new Date());
  artist = await signUp(server, 'Nia', 'nia@people.example');
  const song = await artist.get(projects.createSong, {
    params: { projectId: artist.privateProjectId },
    body: { title: 'Salt on the Windows' },
  });
  songId = song.id;
  const small = await checkSmallSession(defaultRules);
  report = small.report;
  overviews = gzipSync(small.overviews);
});
afterAll(() => server.close());

function submission(sent: CheckReport) {
  return { submissionId: randomUUID(), report: sent, rulesEdition: null };
}

async function store(sent: CheckReport) {
  return artist.get(contract.storeReport, { params: { songId }, body: submission(sent) });
}

/** A copy with something changed. */
function edited(change: (copy: CheckReport) => void): CheckReport {
  const copy = structuredClone(report);
  change(copy);
  return copy;
}

describe('judging again', () => {
  it('agrees with an honest report, which finds something before and after repairs', async () => {
    expect(report.verdictBeforeRepairs).not.toBe('ready');
    expect(report.package.findings.length).toBeGreaterThan(0);
    const stored = await store(report);
    expect(stored.judgedAgain).toBe('same');
    const read = await artist.get(contract.getReport, { params: { reportId: stored.id } });
    expect(read.differences).toEqual([]);
    expect(read.report).toEqual(report);
  });

  it('notes a finding that was taken out, one that was made up, and one made milder', async () => {
    const file = report.files.find(({ findings }) => findings.length > 0);
    const finding = file?.findings[0];
    if (!file || !finding) throw new Error('the small session finds nothing');
    const takenOut = edited((copy) => {
      copy.files.find(({ path }) => path === file.path)?.findings.shift();
      copy.verdictBeforeRepairs = verdictOfDropped(copy);
    });
    const milder = edited((copy) => {
      const own = copy.files.find(({ path }) => path === file.path)?.findings[0];
      if (own) own.places += 1;
    });
    const madeUp = edited((copy) => {
      copy.session.findings.push({ ...finding, files: [file.path], code: 'lossy', level: 'note' });
    });
    const about = { about: 'dropped', files: [file.path] };
    const level = finding.level;
    for (const [sent, difference] of [
      [takenOut, { ...about, code: finding.code, sentLevel: null, judgedLevel: level }],
      [milder, { ...about, code: finding.code, sentLevel: level, judgedLevel: level }],
      [madeUp, { ...about, code: 'lossy', sentLevel: 'note', judgedLevel: null }],
    ] as const) {
      const stored = await store(sent);
      expect(stored.judgedAgain).toBe('differs');
      const read = await artist.get(contract.getReport, { params: { reportId: stored.id } });
      expect(read.differences).toEqual([difference]);
    }
  });

  it('notes what the measures show and the package does not say', async () => {
    const stored = await store(
      edited((copy) => {
        copy.package.findings = copy.package.findings.filter(({ level }) => level !== 'must-fix');
        copy.verdict = copy.package.findings.some(({ level }) => level === 'look')
          ? 'look'
          : 'ready';
        copy.counts['must-fix'] = 0;
      }),
    );
    expect(report.counts['must-fix']).toBeGreaterThan(0);
    const read = await artist.get(contract.getReport, { params: { reportId: stored.id } });
    expect(read.differences.length).toBe(report.counts['must-fix']);
    expect(new Set(read.differences.map(({ about }) => about))).toEqual(new Set(['packed']));
  });

  it('refuses a verdict or a count that does not follow from the findings', async () => {
    const changes: ((copy: CheckReport) => void)[] = [
      (copy) => (copy.verdict = 'ready'),
      (copy) => (copy.verdictBeforeRepairs = 'ready'),
      (copy) => (copy.counts.note += 1),
    ];
    for (const change of changes) {
      const { problem } = await artist.call(contract.storeReport, {
        params: { songId },
        body: submission(edited(change)),
      });
      expect(problem?.code).toBe('invalid-request');
    }
  });

  it('says nothing about another version, foreign rules or a shortened report', async () => {
    const changes: ((copy: CheckReport) => void)[] = [
      (copy) => (copy.judgeVersion += 1),
      (copy) => (copy.measureVersion += 1),
      (copy) => (copy.rulesHash = 'f'.repeat(64)),
      (copy) => (copy.shortened = 'places'),
    ];
    for (const change of changes) {
      expect((await store(edited(change))).judgedAgain).toBe('not-compared');
    }
  });

  it("takes the published edition's own rules, and refuses a report made with others", async () => {
    const edition = await openBrowser(server).get(getEdition, {
      params: { slug: 'harbour-lane-mixing', number: 'latest' },
    });
    const { report: checked } = await checkSmallSession(edition.rules);
    const rulesEdition = { studioSlug: 'harbour-lane-mixing', number: 1 };
    const stored = await artist.get(contract.storeReport, {
      params: { songId },
      body: { submissionId: randomUUID(), report: checked, rulesEdition },
    });
    expect(stored).toMatchObject({
      judgedAgain: 'same',
      rulesEdition: { ...rulesEdition, studioName: 'Harbour Lane Mixing' },
      rulesHash: edition.rulesHash,
    });
    expect(edition.rules.names).toEqual(starterSets['group-letter'].names);
    const withOthers = await artist.call(contract.storeReport, {
      params: { songId },
      body: { submissionId: randomUUID(), report, rulesEdition },
    });
    expect(withOthers.problem?.code).toBe('invalid-request');
    const noSuch = await artist.call(contract.storeReport, {
      params: { songId },
      body: { submissionId: randomUUID(), report, rulesEdition: { ...rulesEdition, number: 9 } },
    });
    expect(noSuch.problem?.code).toBe('not-found');
  });
});

describe('storing', () => {
  it('stores a submission once however often it is sent, also at the same time', async () => {
    const body = submission(report);
    const stored = await Promise.all(
      Array.from({ length: 4 }, () =>
        artist.get(contract.storeReport, { params: { songId }, body }),
      ),
    );
    expect(new Set(stored.map(({ id }) => id)).size).toBe(1);
  });

  it('refuses a body over the limit', async () => {
    const { problem } = await artist.call(contract.storeReport, {
      params: { songId },
      body: submission(edited((copy) => (copy.information.notes = 'x'.repeat(2_200_000)))),
    });
    expect(problem?.code).toBe('too-large');
  });

  it('refuses text that PostgreSQL cannot keep, in a sentence and not as a bug', async () => {
    for (const text of ['a\u0000b', 'half a pair \ud83d']) {
      const { problem } = await artist.call(contract.storeReport, {
        params: { songId },
        body: submission(edited((copy) => (copy.information.notes = text))),
      });
      expect(problem?.code).toBe('invalid-request');
    }
  });

  it('keeps overviews byte by byte, once', async () => {
    const { id: reportId } = await store(report);
    const params = { reportId };
    expect((await artist.call(contract.getOverviews, { params })).problem?.code).toBe('not-found');
    const bytes = Uint8Array.from(overviews);
    await artist.get(contract.putOverviews, { params, bytes });
    await artist.get(contract.putOverviews, { params, bytes });
    const read = await artist.get(contract.getOverviews, { params });
    expect(Buffer.from(read).equals(Buffer.from(bytes))).toBe(true);
    expect(gunzipSync(read).length).toBeGreaterThan(1_000);
    const others = Uint8Array.from(gzipSync(gunzipSync(overviews), { level: 1 }));
    expect((await artist.call(contract.putOverviews, { params, bytes: others })).status).toBe(409);
    const summary = await artist.get(contract.getReport, { params });
    expect(summary.hasOverviews).toBe(true);
  });

  it('refuses overviews that are no gzip, no overviews, or a bomb', async () => {
    const { id: reportId } = await store(report);
    for (const bytes of [
      new Uint8Array(100),
      Uint8Array.from(gzipSync('hello')),
      Uint8Array.from(gzipSync(Buffer.alloc(80 * 1024 * 1024))),
    ]) {
      const { problem } = await artist.call(contract.putOverviews, { params: { reportId }, bytes });
      expect(problem?.code).toBe('invalid-request');
    }
  });
});

describe('lists', () => {
  it('page by key: every report once, newest first, nothing shifted by what arrives', async () => {
    const song = await artist.get(projects.createSong, {
      params: { projectId: artist.privateProjectId },
      body: { title: 'Paper Ferry' },
    });
    const params = { songId: song.id };
    const ids: string[] = [];
    for (let count = 0; count < 7; count += 1) {
      ids.unshift(
        (await artist.get(contract.storeReport, { params, body: submission(report) })).id,
      );
    }
    const seen: string[] = [];
    let cursor: string | undefined;
    for (let pages = 0; pages < 10; pages += 1) {
      const page = await artist.get(contract.listSongReports, {
        params,
        query: cursor === undefined ? { limit: 3 } : { limit: 3, cursor },
      });
      seen.push(...page.items.map(({ id }) => id));
      await artist.get(contract.storeReport, { params, body: submission(report) });
      if (page.nextCursor === null) break;
      cursor = page.nextCursor;
    }
    expect(seen).toEqual(ids);
    const refused = await artist.call(contract.listSongReports, {
      params,
      query: { cursor: 'nonsense' },
    });
    expect(refused.problem?.code).toBe('invalid-request');
    const mine = await artist.get(contract.listMyReports, { query: { limit: 1 } });
    expect(mine.items[0]?.songTitle).toBe('Paper Ferry');
  });
});

describe('shared links', () => {
  it('let a visitor read the report without names and keys, until revoked or lapsed', async () => {
    const { id: reportId } = await store(report);
    await artist.get(contract.putOverviews, {
      params: { reportId },
      bytes: Uint8Array.from(overviews),
    });
    const share = await artist.get(contract.createReportShare, {
      params: { reportId },
      body: { expiresInDays: 30 },
    });
    const visitor = openBrowser(server);
    const body = { token: share.token };
    const shared = await visitor.get(contract.readSharedReport, { body });
    expect(shared.report).toEqual(report);
    expect(JSON.stringify(shared)).not.toMatch(/Nia|nia@/);
    expect(JSON.stringify(shared)).not.toContain(reportId);
    const pictures = await visitor.get(contract.readSharedOverviews, { body });
    expect(Buffer.from(pictures).equals(Buffer.from(overviews))).toBe(true);

    const listed = await artist.get(contract.listReportShares, { params: { reportId }, query: {} });
    expect(listed.items.map(({ id }) => id)).toEqual([share.id]);
    expect(JSON.stringify(listed)).not.toContain(share.token);
    await artist.get(contract.revokeReportShare, { params: { reportId, shareId: share.id } });
    const revoked = await visitor.call(contract.readSharedReport, { body });
    expect([revoked.status, revoked.problem?.code]).toEqual([410, 'link-expired']);

    const short = await artist.get(contract.createReportShare, {
      params: { reportId },
      body: { expiresInDays: 1 },
    });
    server.clock.move(25 * 3_600_000);
    for (const endpoint of [contract.readSharedReport, contract.readSharedOverviews]) {
      const lapsed = await visitor.call(endpoint, { body: { token: short.token } });
      expect(lapsed.problem?.code).toBe('link-expired');
    }
  });
});

function verdictOfDropped({ files, session }: CheckReport): CheckReport['verdict'] {
  const all = [...files.flatMap(({ findings }) => findings), ...session.findings];
  if (all.some(({ level }) => level === 'must-fix')) return 'must-fix';
  return all.some(({ level }) => level === 'look') ? 'look' : 'ready';
}
