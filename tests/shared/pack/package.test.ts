import { readFile, readdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import JSZip from 'jszip';
import { beforeAll, describe, expect, it } from 'vitest';
import { checkSession, packSession, repairSession } from '#shared/check.ts';
import { AppError } from '#shared/errors.ts';
import { plainChecksums } from '#shared/pack/checksums.ts';
import { buildReport } from '#shared/report/build-report.ts';
import { checkReportSchema } from '#shared/report/check-report.ts';
import { safeRepairs } from '#shared/repair/choose-repairs.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { measureHere } from '#shared/session/measure-file.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { loadMeters } from '../../../server/cli/load-meters.ts';
import { bextChunk } from '../../support/audio-writer.ts';
import { countingSource } from '../../support/counting-source.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { droppedBytes, savedIn, soxSamples } from '../../support/rendering.ts';
import {
  cleanPart,
  cleanSession,
  tellStory,
  unpacked,
  waveOf,
  type Story,
} from '../../support/story.ts';

/** A clean session with all that travels beside tracks, and what must not. */
async function fullSession(): Promise<Record<string, Buffer>> {
  const mp3 = await withFolder(async (folder) => {
    const path = join(folder, 'rough.mp3');
    const tone = ['-f', 'lavfi', '-i', 'sine=frequency=220:duration=1'];
    await run('ffmpeg', ['-v', 'error', ...tone, path]);
    return readFile(path);
  });
  const text = (words: string) => Buffer.from(words);
  return {
    ...cleanSession(),
    'Größe 한글 Ω.wav': waveOf([cleanPart({ seed: 77 })]),
    '50% Wet\u0007.wav': waveOf([cleanPart({ seed: 78 })]),
    'Rough Mix.mp3': mp3,
    'texts/lyrics.txt': text('salt on the windows'),
    'texts/Tempo.mid': text('MThd'),
    'photos/amp.jpg': text('no real picture'),
    '.DS_Store': text('x'),
    '__MACOSX/._Kick.wav': text('x'),
    'Kick.wav.reapeaks': text('x'),
    'what.bin': text('x'),
  };
}

const about = {
  artist: 'Velvet Tramline',
  title: 'Salt on the Windows',
  tempo: { kind: 'fixed', bpm: 112 },
} as const;

let files: Record<string, Buffer>;
let story: Story;
beforeAll(async () => {
  files = await fullSession();
  story = await tellStory(files, { information: about, sheet: true, choose: safeRepairs });
}, 60_000);

describe('the package', () => {
  it('has its folders and names, and nothing that is not part of the music', async () => {
    const zip = await JSZip.loadAsync(story.zip, { checkCRC32: true });
    const folder = 'Velvet Tramline - Salt on the Windows - 112 BPM';
    const names = Object.values(zip.files).flatMap(({ name, dir }) => (dir ? [] : [name]));
    expect(names.every((name) => name.startsWith(`${folder}/`))).toBe(true);
    expect(names.map((name) => name.slice(folder.length + 1)).sort()).toEqual(
      [
        '50_ Wet_.wav',
        'Bass.wav',
        'Größe 한글 Ω.wav'.normalize('NFC'),
        'Kick.wav',
        'Notes/Tempo.mid',
        'Notes/amp.jpg',
        'Notes/lyrics.txt',
        'Organ.wav',
        'Rough mix/Rough Mix.mp3',
        'SHA256SUMS.txt',
        'Snare.wav',
        'Track sheet.pdf',
        'check-report.json',
      ].sort(),
    );
    expect(story.report.package.leftOut).toEqual([
      { path: '.DS_Store', reason: 'junk' },
      { path: 'Kick.wav.reapeaks', reason: 'junk' },
      { path: '__MACOSX/._Kick.wav', reason: 'junk' },
      { path: 'what.bin', reason: 'not-packable' },
    ]);
  });

  it('is accepted by unzip, Python and sha256sum --strict', async () => {
    await withFolder(async (folder) => {
      const saved = await unpacked(folder, story);
      expect(await run('unzip', ['-t', join(folder, 'package.zip')])).toContain('No errors');
      const check = 'import sys, zipfile; print(zipfile.ZipFile(sys.argv[1]).testzip())';
      expect((await run('python3', ['-c', check, join(folder, 'package.zip')])).trim()).toBe(
        'None',
      );
      const sums = ['-c', `cd "$1" && sha256sum -c --strict SHA256SUMS.txt`, 'sh', saved];
      const lines = (await run('sh', sums)).trim().split('\n');
      expect(lines.every((line) => line.endsWith(': OK'))).toBe(true);
      const all = (await readdir(saved, { recursive: true, withFileTypes: true })).filter((one) =>
        one.isFile(),
      );
      expect(lines.length).toBe(all.length - 1);
      const list = await readFile(join(saved, 'SHA256SUMS.txt'));
      expect(list.includes('\r') || list[0] === 0xef).toBe(false);
    });
  });

  it('holds the report it was made with', async () => {
    await withFolder(async (folder) => {
      const saved = await unpacked(folder, story);
      const json: unknown = JSON.parse(await readFile(join(saved, 'check-report.json'), 'utf8'));
      expect(checkReportSchema.parse(json)).toEqual(story.report);
    });
  });

  it('has a track sheet that other programs can read', async () => {
    await withFolder(async (folder) => {
      const saved = await unpacked(folder, story);
      const text = await run('pdftotext', ['-layout', join(saved, 'Track sheet.pdf'), '-']);
      for (const words of [
        'Salt on the Windows',
        'Velvet Tramline',
        '112 BPM',
        '48 kHz',
        'Snare',
      ]) {
        expect(text).toContain(words);
      }
      // Greek has letters in the sheet's typeface, Hangul has not, and the sheet says so.
      expect(text).toContain('Ω');
      expect(text).toContain('[U+D55C]');
      expect(text).toContain('no letters for some of the characters');
    });
  });

  it('is the same, byte for byte, when it is made again in another order', async () => {
    const shuffled = Object.fromEntries(Object.entries(files).reverse());
    const options = { information: about, sheet: true, choose: safeRepairs };
    const again = await tellStory(shuffled, options);
    expect(again.zip.equals(story.zip)).toBe(true);
  });
});

describe('reading', () => {
  it('takes no file in pieces of more than 1 MiB, from the check to the zip', async () => {
    const long = waveOf([new Array<number>(900_000).fill(0).map((_, i) => 0.3 * Math.sin(i / 7))]);
    const counters: ReturnType<typeof countingSource>[] = [];
    const watched = Object.entries({ ...cleanSession(), 'Organ.wav': long }).map(
      ([path, bytes]) => {
        const file = droppedBytes(path, bytes);
        const open = async () => {
          const source = await file.open();
          const counting = countingSource(source);
          counters.push(counting);
          return { ...counting, close: () => source.close() };
        };
        return { ...file, open };
      },
    );
    await tellStory(watched, { choose: safeRepairs });
    expect(counters.length).toBeGreaterThan(5);
    expect(Math.max(...counters.map(({ counts }) => counts.largest))).toBeLessThanOrEqual(1 << 20);
  });
});

describe('copies', () => {
  const personal = {
    before: [
      bextChunk({
        description: '/Users/juno.park/Music/Weather for Two/Bass.wav',
        originator: 'Juno Park',
        timeReference: 480n,
      }),
    ],
    after: [{ id: 'id3 ', bytes: Buffer.from('ID3 Juno Park, home address') }],
  };

  it('leave personal metadata behind and keep every sample', async () => {
    const bass = waveOf([cleanPart({ seed: 11 })], personal);
    const session = { ...cleanSession(), 'Bass.wav': bass };
    const clean = await tellStory(session);
    expect(clean.zip.includes('Juno')).toBe(false);
    expect(clean.zip.includes('juno.park')).toBe(false);
    await withFolder(async (folder) => {
      const dropped = await savedIn(folder, 'Bass.wav', bass);
      const saved = await unpacked(folder, clean);
      expect(await soxSamples([join(saved, 'Bass.wav')])).toEqual(await soxSamples([dropped]));
      // The CRC was worked out without reading the samples again; unzip reads them.
      expect(await run('unzip', ['-t', join(folder, 'package.zip')])).toContain('No errors');
    });
    const entry = clean.report.package.entries.find(({ to }) => to === 'Bass.wav');
    expect(entry?.repairs).toEqual([]);
    expect(entry?.measures).toBeNull();
  });

  it('are not packed when the file changed after it was checked', async () => {
    const session = cleanSession();
    const changing = session['Kick.wav']!;
    const dropped = Object.entries(session).map(([path, bytes]) => droppedBytes(path, bytes));
    const engine = await loadMeters();
    const input = {
      files: dropped,
      rules: defaultRules,
      information: emptySessionInformation(),
      measureFile: measureHere(engine),
    };
    const check = await checkSession(input);
    const repaired = await repairSession(input, check, []);
    const report = await buildReport({ ...input, check, repaired, engine: engine.name });
    const trackSheet = Buffer.from('sheet');
    const files = dropped;
    const pack = await packSession({
      ...{ files, check, repaired, report, trackSheet, checksums: plainChecksums },
    });
    changing[changing.length - 100]! ^= 0xff;
    const write = async () => {
      for await (const block of pack.stream()) expect(block.length).toBeGreaterThan(0);
    };
    await expect(write()).rejects.toEqual(new AppError('file-changed', { path: 'Kick.wav' }));
  });

  it('keep a rough mix that is not WAV as it is', async () => {
    await withFolder(async (folder) => {
      const saved = await unpacked(folder, story);
      await writeFile(join(folder, 'rough.mp3'), files['Rough Mix.mp3']!);
      await run('cmp', [join(folder, 'rough.mp3'), join(saved, 'Rough mix/Rough Mix.mp3')]);
    });
  });
});
