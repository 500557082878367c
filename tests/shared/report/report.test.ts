import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { compareReports } from '#shared/report/compare-reports.ts';
import { maxReportBytes, type CheckReport } from '#shared/report/check-report.ts';
import { fitReport, writeReport } from '#shared/report/fit-report.ts';
import { readReport, reportJsonSchema } from '#shared/report/read-report.ts';
import { canonicalJson } from '#shared/rules/canonical-json.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { cleanPart, cleanSession, storyFrames, tellStory, waveOf } from '../../support/story.ts';

let report: CheckReport;
const part = cleanPart({ seed: 7 });
const clipped = part.map((x) => Math.max(-0.27, Math.min(0.27, x)));

beforeAll(async () => {
  const session = {
    ...cleanSession(),
    'Organ.wav': waveOf([part.map(() => 0)]),
    'Snare.wav': waveOf([part, part]),
    'Tambourine.wav': waveOf([clipped]),
    'short.wav': Buffer.from('RIFF'),
  };
  ({ report } = await tellStory(session));
});

describe('the report', () => {
  it('has every field it promises to other programs', () => {
    const file = report.files.find(({ path }) => path === 'Tambourine.wav')!;
    expect(report).toMatchObject({ schema: 1, verdict: 'must-fix' });
    expect(typeof file.proposedName).toBe('string');
    expect(Object.keys(file.format!)).toEqual(
      expect.arrayContaining([
        ...['container', 'encoding', 'sampleRateHz', 'bits', 'channels', 'frames'],
        'timeReferenceFrames',
      ]),
    );
    expect(Object.keys(file.measures!)).toEqual(
      expect.arrayContaining(['channels', 'truePeakDbtp', 'audioHash', 'crc32']),
    );
    expect(Object.keys(file.measures!.channels[0]!)).toEqual(
      expect.arrayContaining([
        ...['peakDbfs', 'rmsDbfs', 'dcOffset', 'clippedRuns', 'firstSoundFrame'],
        ...['lastSoundFrame', 'realBits'],
      ]),
    );
    const finding = file.findings.find(({ code }) => code === 'clipped')!;
    expect(Object.keys(finding)).toEqual(
      expect.arrayContaining(['code', 'level', 'channel', 'ranges', 'args']),
    );
    expect(Object.keys(finding.ranges[0]!).sort()).toEqual([
      'confidence',
      'endFrame',
      'startFrame',
    ]);
    expect(report.package.folderName).toBe('Multitracks');
    expect(Object.keys(report.package.entries[0]!)).toEqual(
      expect.arrayContaining(['from', 'to', 'repairs']),
    );
    for (const one of report.session.findings) expect(Array.isArray(one.files)).toBe(true);
  });

  it('says null for silence, and no file where nothing could be read', () => {
    const silent = report.files.find(({ path }) => path === 'Organ.wav')!;
    expect(silent.measures?.channels[0]).toMatchObject({ peakDbfs: null, rmsDbfs: null });
    const damaged = report.files.find(({ path }) => path === 'short.wav')!;
    expect(damaged).toMatchObject({ format: null, measures: null });
    expect(damaged.findings.map(({ code }) => code)).toContain('unreadable');
  });

  it('hashes the rules it was judged with as sha256sum does', async () => {
    await withFolder(async (folder) => {
      const path = join(folder, 'rules.json');
      await writeFile(path, canonicalJson(defaultRules));
      expect((await run('sha256sum', [path])).slice(0, 64)).toBe(report.rulesHash);
    });
  });

  it('survives JSON and is read again', () => {
    const json: unknown = JSON.parse(new TextDecoder().decode(writeReport(report)));
    expect(readReport(json)).toEqual({ report });
  });

  it('is described by a JSON Schema that asks for its parts', () => {
    const { required } = reportJsonSchema() as { required: string[] };
    expect(required).toEqual(
      expect.arrayContaining(['schema', 'verdict', 'files', 'session', 'package']),
    );
  });
});

describe('readReport', () => {
  it('refuses what is no report, and names the place', () => {
    expect(readReport({})).toMatchObject({ problem: 'not-a-report' });
    expect(readReport('report')).toMatchObject({ problem: 'not-a-report' });
    const wrong = { ...report, verdict: 'fine' };
    expect(readReport(wrong)).toMatchObject({
      problem: 'not-a-report',
      issues: [{ path: 'verdict' }],
    });
  });

  it('does not guess at a report from a later version', () => {
    expect(readReport({ ...report, schema: 99 })).toEqual({ problem: 'newer', issues: [] });
  });
});

describe('fitReport', () => {
  const manyFiles = (count: number): CheckReport => ({
    ...report,
    files: Array.from({ length: count }, (_, index) => {
      const file = report.files[index % report.files.length]!;
      return { ...file, path: `${index}/${file.path}` };
    }),
  });

  it('leaves a usual report alone', () => {
    expect(fitReport(report)).toBe(report);
  });

  it.each([400, 2000, 10_000])(
    'keeps %i files within the limit and says what is missing',
    (count) => {
      const fitted = fitReport(manyFiles(count));
      expect(writeReport(fitted).length).toBeLessThanOrEqual(maxReportBytes);
      expect(readReport(JSON.parse(JSON.stringify(fitted)))).toHaveProperty('report');
      if (count < 10_000) expect(fitted.files.length).toBe(count);
      else expect(fitted.shortened).toBe('files');
      expect(fitted.verdict).toBe(report.verdict);
      if (fitted.shortened === 'places') {
        expect(
          fitted.files.every(({ format, measures }) => (format === null) === (measures === null)),
        ).toBe(true);
      }
    },
  );

  it('leaves away places before measures, and never their number', () => {
    const ranges = Array.from({ length: 200 }, (_, i) => ({
      startFrame: i,
      endFrame: i + 1,
      confidence: 'sure' as const,
    }));
    const full: CheckReport = {
      ...report,
      files: Array.from({ length: 300 }, (_, index) => {
        const file = report.files[0]!;
        const { measures } = report.files.find(({ path }) => path === 'Bass.wav')!;
        const finding = {
          ...report.files.find(({ findings }) => findings.length > 0)!.findings[0]!,
          ...{ places: 5000, ranges },
        };
        return { ...file, path: `${index}.wav`, measures, findings: [finding] };
      }),
    };
    const fitted = fitReport(full);
    expect(fitted.shortened).toBe('places');
    expect(fitted.files[0]!.findings[0]).toMatchObject({ places: 5000 });
    expect(fitted.files[0]!.findings[0]!.ranges.length).toBeLessThan(200);
    expect(fitted.files.every(({ measures }) => measures !== null)).toBe(true);
  });
});

describe('compareReports', () => {
  it('tells what is mended, new and still there, and follows a file under a new name', async () => {
    const before = {
      'Bass.wav': waveOf([part.slice(0, storyFrames - 4000)]),
      'Kick.wav': waveOf([cleanPart({ seed: 22 })]),
      'Organ.wav': waveOf([cleanPart({ seed: 33 }), cleanPart({ seed: 33 })]),
      'Piano.wav': waveOf([cleanPart({ seed: 55 })]),
      'Tambourine.wav': waveOf([clipped]),
    };
    const after = {
      'Bass.wav': waveOf([part]),
      'Kick.wav': waveOf([cleanPart({ seed: 22 }).map((x) => x + 0.04)]),
      'Hammond Organ.wav': before['Organ.wav'],
      'Snare.wav': waveOf([cleanPart({ seed: 44 })]),
      'Tambourine.wav': before['Tambourine.wav'],
    };
    const compared = compareReports(
      (await tellStory(before)).report,
      (await tellStory(after)).report,
    );
    expect(compared.files).toEqual([
      { path: 'Bass.wav', formerPath: 'Bass.wav', change: 'changed' },
      { path: 'Hammond Organ.wav', formerPath: 'Organ.wav', change: 'renamed' },
      { path: 'Kick.wav', formerPath: 'Kick.wav', change: 'changed' },
      { path: 'Snare.wav', formerPath: null, change: 'new' },
      { path: 'Tambourine.wav', formerPath: 'Tambourine.wav', change: 'same' },
    ]);
    expect(compared.gone).toEqual(['Piano.wav']);
    const codes = (findings: typeof compared.fresh) =>
      findings.map(({ code, files }) => `${code} ${files.join()}`);
    expect(codes(compared.mended)).toContain('length-differs Bass.wav');
    expect(codes(compared.fresh)).toContain('dc-offset Kick.wav');
    expect(codes(compared.remaining)).toEqual(
      expect.arrayContaining(['dual-mono Hammond Organ.wav', 'clipped Tambourine.wav']),
    );
  });
});
