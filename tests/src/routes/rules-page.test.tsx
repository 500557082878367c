import { render, screen } from '@testing-library/react';
import { starterSets } from '#shared/rules/starter-sets.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { describe, expect, it } from 'vitest';
import { EditionText } from '../../../src/routes/rules/edition-text.tsx';
import { exampleName, patternWords } from '../../../src/routes/rules/name-example.ts';
import { bringRules, exportRules } from '../../../src/routes/rules/plain-rules.ts';

const letters = starterSets['group-letter'];

function howOf(rules: HouseRules, what: string): string | undefined {
  return [...exportRules(rules), ...bringRules(rules)].find((rule) => rule.what === what)?.how;
}

describe('example names', () => {
  it.each([
    ['numbered', '01 Kick In'],
    ['group-letter', 'D Kick In'],
    ['plain', 'Kick In'],
  ] as const)('follow the starter set %s as the product describes it', (starter, name) => {
    const { names } = starterSets[starter];
    const [drums] = names.groups;
    if (drums === undefined) throw new Error('a starter set has groups');
    expect(exampleName(names, drums, 1)).toBe(name);
  });

  it('follow separator, case, group words and digits', () => {
    const [drums] = letters.names.groups;
    if (drums === undefined) throw new Error('a starter set has groups');
    const naming = {
      ...letters.names,
      tokens: ['number', 'group', 'instrument', 'detail'] as typeof letters.names.tokens,
      separator: '_' as const,
      case: 'upper' as const,
      groupStyle: 'word' as const,
      numberDigits: 3,
    };
    expect(exampleName(naming, drums, 7)).toBe('007_DRUMS_KICK_IN');
    expect(patternWords(naming)).toBe(
      'A running number, then the group, then the instrument, then what tells it apart, with underscores between them.',
    );
  });
});

describe('rules in plain words', () => {
  it('write rates in kHz and join them', () => {
    const rules = { ...letters, format: { sampleRatesHz: [44100, 48000, 96000], minimumBits: 24 } };
    expect(howOf(rules, 'Sample rate')).toBe('44.1 kHz, 48 kHz or 96 kHz.');
    expect(howOf(rules, 'Bit depth')).toBe('24 bit or more.');
  });

  it('leave out what is not asked for', () => {
    const rules = {
      ...letters,
      bring: { ...letters.bring, notes: 'not-needed' as const, references: 0 },
    };
    expect(howOf(rules, 'Session notes')).toBeUndefined();
    expect(howOf(rules, 'References')).toBeUndefined();
  });

  it('name the groups that need a clean signal, by their labels', () => {
    const rules = { ...letters, bring: { ...letters.bring, diFor: ['guitars', 'bass'] } };
    expect(howOf(rules, 'Clean signal (DI)')).toBe('Beside the amp, for bass and guitars.');
  });

  it('give the engineer’s own why before ours', () => {
    const rules: HouseRules = {
      ...letters,
      levels: { 'rough-mix-missing': { why: 'I mix towards it.' } },
    };
    expect(bringRules(rules).find(({ what }) => what === 'Rough mix')?.why).toBe(
      'I mix towards it.',
    );
  });
});

describe('EditionText', () => {
  it('shows the engineer’s words as text and never as markup', () => {
    render(<EditionText rules={{ ...letters, notes: '<img src=x onerror=alert(1)>\n\nTwo' }} />);
    expect(screen.getByText('<img src=x onerror=alert(1)>')).toBeInTheDocument();
    expect(document.querySelector('img')).toBeNull();
  });

  it('stands in the order of doing', () => {
    render(<EditionText rules={letters} />);
    const headings = screen.getAllByRole('heading', { level: 2 }).map((node) => node.textContent);
    expect(headings).toEqual(['Before the export', 'The export', 'Names', 'What else to bring']);
  });
});
