import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { folderName } from '#shared/naming/folder-name.ts';
import { checkPortability } from '#shared/naming/portability.ts';

const tempo = { kind: 'fixed' as const, bpm: 112 };
const all = { artist: 'Velvet Tramline', title: 'Salt on the Windows', tempo };
const none = { artist: null, title: null, tempo: null };

describe('folderName', () => {
  it.each([
    [all, 'Velvet Tramline - Salt on the Windows - 112 BPM'],
    [{ ...all, artist: null }, 'Salt on the Windows - 112 BPM'],
    [{ ...all, title: '' }, 'Velvet Tramline - 112 BPM'],
    [{ ...all, tempo: null }, 'Velvet Tramline - Salt on the Windows'],
    [{ ...all, tempo: { kind: 'no-click' as const } }, 'Velvet Tramline - Salt on the Windows'],
    [
      { ...all, tempo: { ...tempo, bpm: 96.5 } },
      'Velvet Tramline - Salt on the Windows - 96.5 BPM',
    ],
    [{ ...none, title: 'Paper Ferry' }, 'Paper Ferry'],
    [none, 'Multitracks'],
  ])('leaves out what is not known together with its separator', (information, expected) => {
    expect(folderName('{artist} - {title} - {tempo} BPM', information)).toBe(expected);
  });

  it.each([
    ['{title} ({tempo} BPM)', 'Salt on the Windows'],
    ['{title} by {artist}', 'Salt on the Windows by Velvet Tramline'],
    ['{artist}_{title}_{tempo}bpm', 'Velvet Tramline_Salt on the Windows'],
    ['{tempo} BPM {title}', 'Salt on the Windows'],
    ['Multitracks - {tempo} - {title}', 'Multitracks - Salt on the Windows'],
    ['{key} {title}', 'Salt on the Windows'],
    ['For the mix', 'For the mix'],
    ['{', 'Multitracks'],
  ])('takes words along that belong to what is missing: %s', (template, expected) => {
    expect(folderName(template, { ...all, tempo: null })).toBe(expected);
  });

  it('cannot be led out of its folder or into a reserved name', () => {
    expect(folderName('{title}', { ...none, title: '../../etc/passwd' })).toBe('etc-passwd');
    expect(folderName('{title}', { ...none, title: 'CON' })).toBe('CON_');
    expect(folderName('{title}', { ...none, title: '???' })).toBe('Multitracks');
  });

  it('is a good folder name on every system, whatever artist and title', () => {
    const text = fc.option(fc.string({ unit: 'binary', maxLength: 200 }));
    fc.assert(
      fc.property(fc.string({ maxLength: 60 }), text, text, (template, artist, title) => {
        for (const used of [template, `{artist} - ${template} {title}`]) {
          const name = folderName(used, { artist, title, tempo });
          expect(checkPortability(name)).toEqual([]);
          expect(checkPortability(`${name}.zip`)).toEqual([]);
        }
      }),
    );
  });
});
