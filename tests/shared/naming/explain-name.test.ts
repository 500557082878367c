import { describe, expect, it } from 'vitest';
import { explainName } from '#shared/naming/explain-name.ts';
import type { NamingRules } from '#shared/rules/naming-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { grouped, numbered, plain } from './naming-cases.ts';

function failuresOf(name: string, naming: NamingRules): [string, string, object][] {
  const explanation = explainName(name, naming);
  if (explanation.ok) return [];
  return explanation.failures.map(({ token, reason, args }) => [token, reason, args]);
}

describe('explainName', () => {
  it.each([
    ['Kick In.wav', plain],
    ['Lead Vocal Double L.wav', plain],
    ['BV 3 L.aiff', plain],
    ['OH L', plain],
    ['Tom1.wav', plain],
    ['Hi-Hat.wav', plain],
    ['Guitar Sol.wav', plain],
    ['01 Kick In.wav', numbered],
    ['120 Kick In.wav', numbered],
    ['D Kick In.wav', grouped],
    ['V LV Dry.wav', grouped],
    ['kick in.wav', defaultRules.names],
    ['KICK_IN.wav', { ...plain, separator: '_' as const, case: 'upper' as const }],
    ['Drums Kick In.wav', { ...grouped, groupStyle: 'word' as const }],
    ['Gitarre Übung.wav', { ...plain, characters: 'unicode' as const }],
  ])('has nothing against %s', (name, naming) => {
    expect(failuresOf(name, naming)).toEqual([]);
  });

  it.each<[string, NamingRules, [string, string, object][]]>([
    ['Kick In.wav', numbered, [['number', 'missing', { expected: '01' }]]],
    ['1 Kick In.wav', numbered, [['number', 'digits', { found: '1', expected: '01' }]]],
    ['001 Kick In.wav', numbered, [['number', 'digits', { found: '001', expected: '01' }]]],
    ['01 Kick In.wav', plain, [['number', 'not-wanted', { found: '01' }]]],
    ['Kick In.wav', grouped, [['group', 'missing', { expected: 'D' }]]],
    [
      'G Kick In.wav',
      grouped,
      [
        ['group', 'wrong', { found: 'G', expected: 'D' }],
        ['detail', 'order', { found: 'G' }],
      ],
    ],
    ['Kik In.wav', plain, [['instrument', 'misspelt', { found: 'Kik', expected: 'Kick' }]]],
    ['Juno.wav', plain, [['instrument', 'unknown', {}]]],
    ['In Kick.wav', plain, [['detail', 'order', { found: 'In' }]]],
    ['L Guitar.wav', plain, [['side', 'order', { found: 'L' }]]],
    ['Kick_In.wav', plain, [['name', 'separator', { found: '_', expected: ' ' }]]],
    ['Kick  In.wav', plain, [['name', 'separator', { found: '  ', expected: ' ' }]]],
    ['KickIn.wav', plain, [['name', 'separator', { found: '', expected: ' ', text: 'KickIn' }]]],
    ['kick In.wav', plain, [['name', 'case', { found: 'kick', expected: 'Kick' }]]],
    ['SNARE Top.wav', plain, [['name', 'case', { found: 'SNARE', expected: 'Snare' }]]],
    ['Kick In copy.wav', plain, [['name', 'leftover', { found: 'copy', kind: 'copy' }]]],
    ['Gitarre Übung.wav', plain, [['name', 'characters', { found: 'Ü' }]]],
    ['Guitar (L).wav', plain, [['name', 'characters', { found: '()' }]]],
    [
      'Lead Vocal In The Big Stone Kitchen Upstairs.wav',
      plain,
      [['name', 'too-long', { length: 44, most: 40 }]],
    ],
    [
      'Kick In.wav',
      { ...plain, tokens: ['instrument'] },
      [['detail', 'not-wanted', { found: 'In' }]],
    ],
  ])('says which part of %s fails', (name, naming, expected) => {
    expect(failuresOf(name, naming)).toEqual(expected);
  });

  it('never throws on strange names', () => {
    for (const name of ['', '.', '日本語', '\uD800', '🎸', '\u0000', 'a/b/', ' ']) {
      expect(explainName(name, grouped).ok).toBe(false);
    }
  });
});
