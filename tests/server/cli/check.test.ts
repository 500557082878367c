import { readFile, readdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { checkReportSchema } from '#shared/report/check-report.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import { buildCheckCommand, runCheckCommand, saveAll } from '../../support/check-command.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { cleanPart, cleanSession, storyFrames, waveOf } from '../../support/story.ts';

const part = cleanPart({ seed: 7 });
const damaged = Buffer.from('RIFF....WAVE');

beforeAll(buildCheckCommand, 120_000);

describe('npm run check', () => {
  it('explains itself at once', async () => {
    const { code, stdout } = await runCheckCommand(['--help']);
    expect(code).toBe(0);
    expect(stdout).toContain('--repair safe');
  });

  it('prints the schema of its report', async () => {
    const { code, stdout } = await runCheckCommand(['--schema']);
    expect(code).toBe(0);
    expect(JSON.parse(stdout)).toMatchObject({
      $schema: 'https://json-schema.org/draft/2020-12/schema',
      properties: { verdict: { enum: ['ready', 'look', 'must-fix'] } },
    });
  });

  it.each([
    [[], 'Name the folder or zip'],
    [['a', 'b'], 'one too many'],
    [['a', '--repair', 'all'], '--repair takes "safe"'],
    [['a', '--tempo', 'fast'], '--tempo takes a number'],
    [['a', '--nonsense'], '--nonsense is not an option'],
    [['a', '--out'], '--out needs a value'],
  ])('says what is wrong with %j', async (args, words) => {
    const { code, stdout, stderr } = await runCheckCommand(args);
    expect(code).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toContain(words);
  });

  it('answers 0 for a good set, 1 while something must be fixed', async () => {
    await withFolder(async (folder) => {
      const good = await saveAll(join(folder, 'good'), cleanSession());
      const ready = await runCheckCommand([good]);
      expect(ready.code).toBe(0);
      expect(ready.stderr).toBe('');
      expect(ready.stdout).toContain('Ready');
      const bad = await saveAll(join(folder, 'bad'), { ...cleanSession(), 'Organ.wav': damaged });
      const open = await runCheckCommand([bad, '--repair', 'safe']);
      expect(open.code).toBe(1);
      expect(open.stdout).toContain('Must be fixed:');
      expect(open.stdout).toContain('Organ.wav');
    });
  });

  it('prints only the report with --json', async () => {
    await withFolder(async (folder) => {
      await saveAll(folder, { ...cleanSession(), 'Drums/Hi-Hat.wav': damaged });
      const { code, stdout, stderr } = await runCheckCommand([folder, '--json', '--tempo', '112']);
      expect(code).toBe(1);
      expect(stderr).toBe('');
      const report = checkReportSchema.parse(JSON.parse(stdout));
      expect(report.files.map(({ path }) => path)).toContain('Drums/Hi-Hat.wav');
      expect(report.information.tempo).toEqual({ kind: 'fixed', bpm: 112 });
    });
  });

  it('repairs, packs under the right name, and finds nothing more in its own zip', async () => {
    await withFolder(async (folder) => {
      const short = waveOf([part.slice(0, storyFrames - 4000)]);
      const source = await saveAll(join(folder, 'song'), {
        ...cleanSession(),
        'Organ.wav': short,
        'Snare.wav': waveOf([part, part]),
      });
      const out = join(folder, 'out.zip');
      const song = ['--artist', 'Velvet Tramline', '--title', 'Paper Ferry', '--tempo', '96'];
      const first = await runCheckCommand([source, ...song, '--repair', 'safe', '--out', out]);
      expect(first.code).toBe(0);
      expect(first.stdout).toContain(`Saved ${out}`);
      expect(await run('unzip', ['-Z1', out])).toContain(
        'Velvet Tramline - Paper Ferry - 96 BPM/Organ.wav',
      );
      expect(await run('unzip', ['-t', out])).toContain('No errors');
      const again = await runCheckCommand([out, '--json', '--repair', 'safe', ...song]);
      const report = checkReportSchema.parse(JSON.parse(again.stdout));
      expect(report.package.entries.filter(({ repairs }) => repairs.length > 0)).toEqual([]);
      expect(report.package.folderName).toBe('Velvet Tramline - Paper Ferry - 96 BPM');
      // What was dropped is as it was.
      expect((await readFile(join(source, 'Organ.wav'))).equals(short)).toBe(true);
      expect((await readdir(folder)).sort()).toEqual(['out.zip', 'song']);
    });
  });

  it('makes the same bytes in any time zone and language', { timeout: 60_000 }, async () => {
    await withFolder(async (folder) => {
      const source = await saveAll(join(folder, 'song'), {
        ...cleanSession(),
        'Größe.wav': waveOf([part.map((x) => x + 0.04)]),
        'lyrics.txt': Buffer.from('la'),
      });
      const places = [
        { TZ: 'UTC', LANG: 'C' },
        { TZ: 'Pacific/Auckland', LANG: 'de_DE.UTF-8' },
        { TZ: 'America/St_Johns', LANG: 'tr_TR.UTF-8', LC_ALL: 'C.UTF-8' },
      ];
      for (const [index, env] of places.entries()) {
        const out = join(folder, `${index}.zip`);
        const { code } = await runCheckCommand([source, '--title', 'x', '--out', out], { env });
        expect(code).toBe(0);
        if (index > 0) await run('cmp', [join(folder, '0.zip'), out]);
      }
    });
  });

  it('takes the rough mix from the folder, by name, or from elsewhere', async () => {
    await withFolder(async (folder) => {
      const elsewhere = await saveAll(join(folder, 'elsewhere'), { 'mixdown.wav': waveOf([part]) });
      const source = await saveAll(join(folder, 'song'), {
        ...cleanSession(),
        'sub/all together.wav': waveOf([part]),
      });
      const roughMixOf = async (named: string) => {
        const args = [source, '--rough-mix', named, '--json'];
        const { stdout } = await runCheckCommand(args, { cwd: folder });
        const { files } = checkReportSchema.parse(JSON.parse(stdout));
        return files.filter(({ role }) => role === 'rough-mix').map(({ path }) => path);
      };
      expect(await roughMixOf('sub/all together.wav')).toEqual(['sub/all together.wav']);
      expect(await roughMixOf('all together.wav')).toEqual(['sub/all together.wav']);
      expect(await roughMixOf('song/sub/all together.wav')).toEqual(['sub/all together.wav']);
      expect(await roughMixOf(join(elsewhere, 'mixdown.wav'))).toEqual(['Rough mix/mixdown.wav']);
      const missing = await runCheckCommand([source, '--rough-mix', 'none.wav']);
      expect(missing).toMatchObject({ code: 2, stderr: 'There is no none.wav.\n' });
    });
  });

  it('checks against rules from a file, and names every place that is wrong in one', async () => {
    await withFolder(async (folder) => {
      const source = await saveAll(join(folder, 'song'), cleanSession());
      const save = async (name: string, content: string) => {
        await writeFile(join(folder, name), content);
        return join(folder, name);
      };
      const numbered = await save('numbered.json', JSON.stringify(starterSets.numbered));
      const { stdout } = await runCheckCommand([source, '--rules', numbered, '--json']);
      const report = checkReportSchema.parse(JSON.parse(stdout));
      const codes = [
        ...report.files.flatMap(({ findings }) => findings),
        ...report.session.findings,
      ].map(({ code }) => code);
      expect(codes).toContain('name-breaks-rule');

      const broken = { ...starterSets.plain, format: { minimumBits: 'many' }, extra: 1 };
      const wrong = await runCheckCommand([
        ...[source, '--rules', await save('wrong.json', JSON.stringify(broken))],
      ]);
      expect(wrong.code).toBe(2);
      expect(wrong.stdout).toBe('');
      expect(wrong.stderr).toContain('format.minimumBits must be a number');
      expect(wrong.stderr).toContain('extra is not part of house rules');
      const text = await runCheckCommand([
        source,
        '--rules',
        await save('no.json', '{"schema": 1,}'),
      ]);
      expect(text.code).toBe(2);
      expect(text.stderr).toContain('is not valid JSON');
    });
  });
});
