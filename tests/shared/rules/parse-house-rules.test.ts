import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { namingClashes } from '#shared/rules/naming-clashes.ts';
import { parseHouseRules, parseHouseRulesText } from '#shared/rules/parse-house-rules.ts';
import { starterGroups, starterSets } from '#shared/rules/starter-sets.ts';

const plain = starterSets.plain;

function issuesOf(json: unknown): [string, string][] {
  const parsed = parseHouseRules(json);
  return 'issues' in parsed ? parsed.issues.map(({ path, message }) => [path, message]) : [];
}

/** The rules with the value at a path replaced. */
function withValue(path: string, value: unknown): unknown {
  const copy: unknown = structuredClone(plain);
  const keys = path.split('.');
  const last = keys.pop() ?? '';
  const target = keys.reduce((at, key) => (at as Record<string, unknown>)[key], copy);
  (target as Record<string, unknown>)[last] = value;
  return copy;
}

describe('parseHouseRules', () => {
  it('fills in what is left out', () => {
    expect(parseHouseRules({ schema: 1, names: plain.names })).toMatchObject({
      rules: {
        format: { minimumBits: 24, sampleRatesHz: [] },
        folder: { template: '{artist} - {title} - {tempo} BPM' },
        bring: { roughMix: 'required' },
        confirm: [],
      },
    });
  });

  it.each<[string, unknown, string, string]>([
    ['format.minimumBits', 'many', 'format.minimumBits', 'must be a number'],
    ['format.minimumBits', 4, 'format.minimumBits', 'must be at least 8'],
    ['format.sampleRatesHz', [48000, 1], 'format.sampleRatesHz[1]', 'must be at least 8000'],
    ['format.bits', 24, 'format.bits', 'is not part of house rules'],
    ['names.case', 'Title', 'names.case', 'must be one of "title", "upper", "lower", "as-is"'],
    [
      'names.case',
      undefined,
      'names.case',
      'is missing and must be one of "title", "upper", "lower", "as-is"',
    ],
    [
      'names.tokens',
      ['detail'],
      'names.tokens',
      'must have every token at most once, and the instrument always',
    ],
    ['names.groups', [], 'names.groups', 'must not be empty'],
    [
      'names.groups.0.letter',
      'D-',
      'names.groups[0].letter',
      'must be one to four letters or digits',
    ],
    [
      'names.groups.1.letter',
      'd',
      'names.groups[1].letter',
      '"d" already stands for names.groups[0]',
    ],
    [
      'names.groups.2.id',
      'drums',
      'names.groups[2].id',
      '"drums" already stands for names.groups[0]',
    ],
    ['bring.diFor', ['bass', 'banjo'], 'bring.diFor[1]', 'there is no group "banjo"'],
    [
      'levels',
      { clipped: { byGroup: { brass: 'off' } } },
      'levels.clipped.byGroup.brass',
      'there is no group "brass"',
    ],
    ['levels', { boring: {} }, 'levels.boring', 'is not part of house rules'],
    ['folder.template', '', 'folder.template', 'must not be empty'],
    ['schema', 2, 'schema', 'must be 1, the version of house rules read here'],
  ])('says where and what: %s = %j', (path, value, place, message) => {
    expect(issuesOf(withValue(path, value))).toEqual([[place, message]]);
  });

  it('finds a group letter that the character set cannot write', () => {
    const json = structuredClone(starterSets['group-letter']);
    json.names.groups[0]!.letter = 'Ж';
    expect(issuesOf(json)).toEqual([
      ['names.groups[0].letter', 'has no character that names.characters allows'],
    ]);
    json.names.characters = 'unicode';
    expect(issuesOf(json)).toEqual([]);
  });

  it('lists everything at once', () => {
    expect(issuesOf({ schema: 1, names: 3, folder: 4 })).toEqual([
      ['names', 'must be an object'],
      ['folder', 'must be an object'],
    ]);
    expect(issuesOf(null)).toEqual([['', 'must be an object']]);
  });

  it('never throws', () => {
    fc.assert(
      fc.property(
        fc.jsonValue({ maxDepth: 4 }),
        fc.constantFrom('names', 'levels', 'signal'),
        (value, key) => {
          expect('issues' in parseHouseRules(value)).toBe(true);
          parseHouseRules({ ...plain, [key]: value });
        },
      ),
    );
  });
});

describe('parseHouseRulesText', () => {
  it('reads JSON with and without a byte order mark', () => {
    const text = JSON.stringify(plain);
    expect(parseHouseRulesText(text)).toEqual({ rules: plain });
    expect(parseHouseRulesText(`\uFEFF${text}`)).toEqual({ rules: plain });
  });

  it('names the line of a syntax error', () => {
    expect(parseHouseRulesText('{\n  "schema": 1,\n}')).toEqual({
      issues: [{ path: 'line 3, column 1', message: 'is not valid JSON' }],
    });
    expect('issues' in parseHouseRulesText('')).toBe(true);
  });
});

describe('namingClashes', () => {
  it('finds letters, labels and words given twice, whatever their case and accents', () => {
    const [drums, percussion, bass] = starterGroups;
    if (!drums || !percussion || !bass) throw new Error('the starter groups are incomplete');
    const clashes = namingClashes([
      { ...drums, words: ['Cajón', 'cajon'] },
      { ...percussion, letter: 'd', words: ['CAJON'] },
      { ...bass, label: 'DRUMS' },
    ]);
    expect(clashes).toEqual([
      { kind: 'letter', text: 'd', first: 0, second: 1 },
      { kind: 'word', text: 'CAJON', first: 0, second: 1 },
      { kind: 'label', text: 'DRUMS', first: 0, second: 2 },
    ]);
  });
});
