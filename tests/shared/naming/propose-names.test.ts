import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { explainName } from '#shared/naming/explain-name.ts';
import { clashKey } from '#shared/naming/fold-name.ts';
import { parseName } from '#shared/naming/parse-name.ts';
import { checkPortability } from '#shared/naming/portability.ts';
import { proposeNames } from '#shared/naming/propose-names.ts';
import type { NamingRules } from '#shared/rules/naming-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { conventions, grouped, noSong, numbered, plain, readNameCases } from './naming-cases.ts';

const seen = readNameCases('seen').map(({ name }) => name);

function filesOf(names: readonly string[], naming: NamingRules) {
  return names.map((path) => ({ path, parsed: parseName(path, naming), channels: 1 }));
}

function propose(
  names: readonly string[],
  naming: NamingRules,
  given: Record<string, string> = {},
) {
  return Object.fromEntries(
    proposeNames(filesOf(names, naming), naming, { ...noSong, names: given }),
  );
}

describe('proposeNames', () => {
  it('makes a proper name from a messy one under each convention', () => {
    const name = 'Track 12 (3) KikIn copy.wav';
    expect(propose([name], plain)).toEqual({ [name]: 'Kick In' });
    expect(propose([name], numbered)).toEqual({ [name]: '01 Kick In' });
    expect(propose([name], grouped)).toEqual({ [name]: 'D Kick In' });
    expect(propose([name], { ...numbered, separator: '_', case: 'lower' })).toEqual({
      [name]: '01_kick_in',
    });
    expect(propose([name], { ...grouped, groupStyle: 'word', case: 'upper' })).toEqual({
      [name]: 'DRUMS KICK IN',
    });
    expect(propose([name], defaultRules.names)).toEqual({ [name]: 'Kick In' });
  });

  it('says honestly where it does not know', () => {
    expect(propose(['Audio 3.wav', '日本語.wav', 'Juno idea.wav'], plain)).toEqual({
      'Audio 3.wav': null,
      '日本語.wav': null,
      'Juno idea.wav': null,
    });
  });

  it('numbers in the order of the groups, whatever the order of the files', () => {
    const names = [
      'lv.wav',
      'bass_di.wav',
      'sn_b.wav',
      'kik.wav',
      'sn_t.wav',
      'gtr_R.wav',
      'gtr_L.wav',
    ];
    const expected = {
      'kik.wav': '01 Kick',
      'sn_t.wav': '02 Snare Top',
      'sn_b.wav': '03 Snare Bottom',
      'bass_di.wav': '04 Bass DI',
      'gtr_L.wav': '05 Guitar L',
      'gtr_R.wav': '06 Guitar R',
      'lv.wav': '07 Lead Vocal',
    };
    expect(propose(names, numbered)).toEqual(expected);
    expect(propose([...names].reverse(), numbered)).toEqual(expected);
  });

  it('keeps names that follow the convention, and numbers the rest behind them', () => {
    expect(
      propose(
        ['01 Kick In.wav', '02 Bass DI.wav', '03 LV.wav', 'tamb.wav', 'snr top.wav'],
        numbered,
      ),
    ).toEqual({
      '01 Kick In.wav': '01 Kick In',
      '02 Bass DI.wav': '02 Bass DI',
      '03 LV.wav': '03 LV',
      'snr top.wav': '04 Snare Top',
      'tamb.wav': '05 Tambourine',
    });
  });

  it('writes an instrument as the names do that stay', () => {
    expect(propose(['OH L.wav', 'OH_R.wav', 'Kick.wav'], plain)).toEqual({
      'OH L.wav': 'OH L',
      'OH_R.wav': 'OH R',
      'Kick.wav': 'Kick',
    });
  });

  it('never overwrites a name made by hand, and never repeats one', () => {
    const given = { 'kik.wav': 'Kick', 'weird.wav': 'Theremin of Doom' };
    expect(propose(['kik.wav', 'weird.wav', 'bd.wav', 'BD2.wav'], plain, given)).toEqual({
      'kik.wav': 'Kick',
      'weird.wav': 'Theremin of Doom',
      'bd.wav': 'BD',
      'BD2.wav': 'BD2',
    });
  });

  it('tells equal parts apart by takes, counters, ordinals and at last as alternatives', () => {
    expect(propose(['LV_take 1.wav', 'LV_take 2.wav'], plain)).toEqual({
      'LV_take 1.wav': 'Lead Vocal Take 1',
      'LV_take 2.wav': 'Lead Vocal Take 2',
    });
    expect(propose(['shkr_02.wav', 'shkr_01.wav'], plain)).toEqual({
      'shkr_01.wav': 'Shaker 1',
      'shkr_02.wav': 'Shaker 2',
    });
    expect(propose(['gtr_L.wav', 'Gitarre_L.wav', 'gtr_R.wav', 'Gitarre_R.wav'], plain)).toEqual({
      'gtr_L.wav': 'Guitar 1 L',
      'Gitarre_L.wav': 'Guitar 2 L',
      'gtr_R.wav': 'Guitar 1 R',
      'Gitarre_R.wav': 'Guitar 2 R',
    });
    expect(propose(['tom_1.wav', 'tom 1 copy.wav'], plain)).toEqual({
      'tom_1.wav': 'Tom 1',
      'tom 1 copy.wav': 'Tom 1 Alt',
    });
  });

  it('tells a mono file from a stereo file of the same name', () => {
    const files = filesOf(['pno.wav', 'piano_new.wav'], plain).map((file, index) => ({
      ...file,
      channels: 2 - index,
    }));
    expect(Object.fromEntries(proposeNames(files, plain, noSong))).toEqual({
      'pno.wav': 'Piano',
      'piano_new.wav': 'Piano Mono',
    });
  });

  it('keeps words of the artist, but not those that every file has', () => {
    expect(
      propose(['NBN_kik.wav', 'NBN_gtr Sol.wav', 'NBN_gtr Juno.wav', 'NBN_lv.wav'], plain),
    ).toEqual({
      'NBN_kik.wav': 'Kick',
      'NBN_gtr Sol.wav': 'Guitar Sol',
      'NBN_gtr Juno.wav': 'Guitar Juno',
      'NBN_lv.wav': 'Lead Vocal',
    });
  });

  it('shortens details before the instrument, and never the side', () => {
    const name = 'lead vox chorus dbl harm sol_L.wav';
    const under = (maximumLength: number) => propose([name], { ...plain, maximumLength })[name];
    expect(under(60)).toBe('Lead Vocal Harmony Chorus Double Sol L');
    expect(under(36)).toBe('Lead Vocal Harmony Chorus Double L');
    expect(under(32)).toBe('Lead Vocal Harmony Chorus Dbl L');
    expect(under(24)).toBe('Lead Vocal Harm Cho Dbl L'.length <= 24 ? '' : 'LV Harm Cho Dbl L');
    expect(under(12)).toBe('LV Harm L');
    expect(under(8)).toBe('LV L');
  });

  it('leaves rough mixes, references and notes alone', () => {
    expect(propose(['rough mix.wav', 'Reference.wav', 'kik.wav'], plain)).toEqual({
      'rough mix.wav': null,
      'Reference.wav': null,
      'kik.wav': 'Kick',
    });
    const files = filesOf(['kik.wav'], plain).map((file) => ({
      ...file,
      role: 'reference' as const,
    }));
    expect(proposeNames(files, plain, noSong).get('kik.wav')).toBeNull();
  });

  it('proposes nothing where the table has no group for an instrument', () => {
    const naming = { ...grouped, groups: grouped.groups.filter(({ id }) => id !== 'drums') };
    expect(propose(['kik.wav', 'bass.wav'], naming)).toEqual({
      'kik.wav': null,
      'bass.wav': 'B Bass',
    });
  });

  it('under any convention gives names that follow it, read back, travel and never meet', () => {
    const sessions = fc.uniqueArray(fc.constantFrom(...seen), { minLength: 1, maxLength: 25 });
    fc.assert(
      fc.property(conventions, sessions, (naming, names) => {
        const files = filesOf(names, naming);
        const proposals = proposeNames(files, naming, noSong);
        const keys = new Set<string>();
        for (const { path, parsed } of files) {
          const name = proposals.get(path) ?? null;
          if (name === null) {
            const due = parsed.instrument !== null && parsed.role !== 'reference';
            expect(due ? `${path} -> nothing` : null).toBeNull();
            continue;
          }
          expect(explainName(name, naming), `${path} -> ${name}`).toEqual({ ok: true });
          expect(checkPortability(`${name}.wav`)).toEqual([]);
          expect(name.normalize('NFC')).toBe(name);
          const back = parseName(name, naming);
          expect(back.instrument, `${path} -> ${name}`).toBe(parsed.instrument);
          if (parsed.side === 'L' || parsed.side === 'R') expect(back.side, name).toBe(parsed.side);
          expect(keys.has(clashKey(name)), `${name} twice`).toBe(false);
          keys.add(clashKey(name));
        }
      }),
      { numRuns: 200 },
    );
  }, 60_000);

  it('is the same for the same files, and proposes its own proposals again', () => {
    fc.assert(
      fc.property(
        conventions,
        fc.uniqueArray(fc.constantFrom(...seen), { maxLength: 25 }),
        (naming, names) => {
          const first = propose(names, naming);
          expect(propose(names, naming)).toEqual(first);
          const given = Object.values(first).filter((name): name is string => name !== null);
          const again = propose(
            given.map((name) => `${name}.wav`),
            naming,
          );
          expect(again).toEqual(Object.fromEntries(given.map((name) => [`${name}.wav`, name])));
        },
      ),
      { numRuns: 150 },
    );
  }, 60_000);

  it('names 2,000 files with thousands of clashes in reasonable time', () => {
    const names = Array.from(
      { length: 2000 },
      (_, i) => `${['kik', 'gtr_L', 'BV'][i % 3]} copy ${i}.wav`,
    );
    const proposals = Object.values(propose(names, numbered));
    expect(new Set(proposals).size).toBe(2000);
    expect(proposals).not.toContain(null);
  });
});
