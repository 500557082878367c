import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseName } from '#shared/naming/parse-name.ts';
import { conventions, grouped, numbered, plain, readingOf } from './naming-cases.ts';

const song = { artist: 'Velvet Tramline', title: 'Salt on the Windows' };

describe('parseName', () => {
  it('finds the instrument in a name full of what exports leave behind', () => {
    const parsed = parseName('Track 12 (3) KikIn copy.wav', plain);
    expect(readingOf(parsed)).toMatchObject({
      nature: 'drums',
      instrument: 'Kick',
      detail: ['In'],
      number: null,
    });
    expect(parsed.groupId).toBe('drums');
    expect(parsed.leftovers.map(({ kind, text }) => [kind, text])).toEqual([
      ['export-word', 'Track 12'],
      ['counter', '(3)'],
      ['copy', 'copy'],
    ]);
  });

  it('gives the place of every piece in the name', () => {
    const name = '01_Kick_In';
    const { spans } = parseName(`${name}.wav`, numbered);
    expect(spans.map(({ kind, text }) => [kind, text])).toEqual([
      ['number', '01'],
      ['instrument', 'Kick'],
      ['detail', 'In'],
    ]);
    for (const { start, end, text } of spans) expect(name.slice(start, end)).toBe(text);
  });

  it('reads one name alike however its words are joined', () => {
    const names = ['Kick In', 'kick_in', 'KICK-IN', 'KickIn', 'kick.in', 'kick   in', 'kickin'];
    const readings = names.map((name) => readingOf(parseName(name, plain)));
    for (const reading of readings) expect(reading).toEqual(readings[0]);
    expect(readings[0]).toMatchObject({ instrument: 'Kick', detail: ['In'] });
  });

  it('does not care about the Unicode form of a name', () => {
    const name = 'Guitare électrique Été';
    const composed = parseName(name.normalize('NFC'), plain);
    expect(parseName(name.normalize('NFD'), plain)).toEqual(composed);
    expect(composed.instrument).toBe('Electric Guitar');
  });

  it('tells running numbers, ordinals, takes and counters apart', () => {
    const numbersOf = (name: string) => {
      const { number, ordinal, take, counter } = parseName(name, plain);
      return { number, ordinal, take, counter };
    };
    const none = { number: null, ordinal: null, take: null, counter: null };
    expect(numbersOf('03 Tom 2.wav')).toEqual({ ...none, number: 3, ordinal: 2 });
    expect(numbersOf('LV take 4.wav')).toEqual({ ...none, take: 4 });
    expect(numbersOf('LV t4.wav')).toEqual({ ...none, take: 4 });
    expect(numbersOf('Snare_02.wav')).toEqual({ ...none, counter: 2 });
    expect(numbersOf('BV 8.wav')).toEqual({ ...none, ordinal: 8 });
    expect(numbersOf('Gtr 57.wav')).toEqual(none);
    expect(numbersOf('12 String.wav')).toEqual(none);
  });

  it('leaves out the artist and the title of the song', () => {
    const parsed = parseName('VelvetTramline_SaltOnTheWindows_BV2.wav', plain, song);
    expect(readingOf(parsed)).toMatchObject({ instrument: 'Backing Vocal', ordinal: 2 });
    expect(parsed.leftovers.map(({ kind }) => kind)).toEqual(['artist', 'title']);
  });

  it('takes a file that only bears the title for a mix of the song, as a guess', () => {
    const parsed = parseName('Velvet Tramline - Salt on the Windows (2).wav', plain, song);
    expect(parsed).toMatchObject({ role: 'rough-mix', confidence: 'guess', instrument: null });
  });

  it.each([
    ['Bass Drum.wav', 'Kick'],
    ['Drum Bass Loop.wav', null],
    ['Synth Bass.wav', 'Synth Bass'],
    ['Bass Clarinet.wav', 'Bass Clarinet'],
    ['Synth Strings.wav', 'Synth Strings'],
    ['Lap Steel Gtr.wav', 'Lap Steel'],
  ])('takes words that belong together together: %s', (name, instrument) => {
    const parsed = parseName(name, plain);
    if (instrument === null) expect(parsed.confidence).not.toBe('certain');
    else expect(parsed).toMatchObject({ instrument, confidence: 'certain' });
  });

  it.each(['Kick Snare.wav', 'Vox Piano.wav', 'Room.wav', 'Lead.wav', 'ft.wav', 'Strings Pad.wav'])(
    'is not certain where a name could mean something else: %s',
    (name) => {
      expect(parseName(name, plain).confidence).toBe('guess');
    },
  );

  it.each(['Amber.wav', 'Hotel.wav', 'Sandy.wav', 'Ohio.wav', 'Epic.wav', 'Again.wav', 'Kids.wav'])(
    'sees no instrument in an ordinary word: %s',
    (name) => {
      expect(parseName(name, plain).confidence).not.toBe('certain');
    },
  );

  it('takes folders as a hint, never as certain', () => {
    const inFolder = (path: string) => {
      const { instrument, detail, confidence } = parseName(path, plain);
      return { instrument, detail, confidence };
    };
    expect(inFolder('Song/Snare/Top.wav')).toEqual({
      instrument: 'Snare',
      detail: ['Top'],
      confidence: 'guess',
    });
    expect(inFolder('Drums/Audio 3.wav')).toMatchObject({
      instrument: 'Drums',
      confidence: 'guess',
    });
    expect(inFolder('Drums/Vox.wav')).toMatchObject({ instrument: 'Vocal', confidence: 'certain' });
    expect(inFolder('My Drum Song/Top.wav')).toMatchObject({ instrument: null });
  });

  it('reads the group of a convention, and only where the convention writes it', () => {
    expect(parseName('D Kick In.wav', grouped).spans[0]).toMatchObject({
      kind: 'group',
      text: 'D',
    });
    const other = parseName('S Snare.wav', grouped);
    expect(other.spans.some(({ kind }) => kind === 'group')).toBe(false);
    expect(other.instrument).toBe('Snare');
    expect(parseName('B Vox.wav', grouped)).toMatchObject({ instrument: 'Backing Vocal' });
  });

  it("puts words of the engineer's own into their group", () => {
    const groups = plain.groups.map((group) => {
      if (group.id === 'percussion') return { ...group, words: ['Timpani', 'Hurdy Gurdy'] };
      return group;
    });
    const naming = { ...plain, groups };
    expect(parseName('hurdygurdy L.wav', naming)).toMatchObject({
      instrument: 'Hurdy Gurdy',
      groupId: 'percussion',
      nature: 'percussion',
      side: 'L',
      confidence: 'certain',
    });
    expect(parseName('timp.wav', naming)).toMatchObject({
      instrument: 'Timpani',
      groupId: 'percussion',
      nature: 'percussion',
    });
    expect(parseName('timp.wav', plain)).toMatchObject({ groupId: 'orchestra' });
  });

  it.each([
    '日本語のギター.wav',
    'Бас-гитара 2.wav',
    'جيتار.wav',
    'גיטרה L.wav',
    '🎸🥁 gtr 🎤.wav',
    'n\u0303o\u0308\u0301\u0302\u0303.wav',
    'kick\u0000in\u0007.wav',
    '\u202Egtr.wav',
    '\uD800lone.wav',
    'ﬁddle ½ ①.wav',
    '٣ طبل.wav',
    '...',
    '.wav',
    '',
    '/',
    ' '.repeat(300),
    '9'.repeat(300),
    '1a'.repeat(150),
  ])('survives any script: %j', (name) => {
    const parsed = parseName(name, numbered);
    expect(['certain', 'guess', 'unknown']).toContain(parsed.confidence);
  });

  it('never throws, whatever the name and the convention', () => {
    const names = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 60 }),
      fc.string({ unit: 'grapheme', maxLength: 60 }),
      fc
        .array(
          fc.constantFrom(
            'kick',
            'In',
            '_',
            ' ',
            '01',
            'L',
            '(2)',
            'gtr',
            'é',
            '日',
            '\u0301',
            'S',
            '.',
          ),
        )
        .map((pieces) => pieces.join('')),
    );
    fc.assert(
      fc.property(names, conventions, (name, naming) => {
        const parsed = parseName(name, naming, song);
        const bare = name.slice(name.lastIndexOf('/') + 1).normalize('NFC');
        for (const { start, end, text } of parsed.spans) expect(bare.slice(start, end)).toBe(text);
        const starts = parsed.spans.map(({ start }) => start);
        expect(starts).toEqual([...starts].sort((a, b) => a - b));
      }),
      { numRuns: 500 },
    );
  }, 60_000);
});
