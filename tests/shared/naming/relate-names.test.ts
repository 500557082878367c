import { describe, expect, it } from 'vitest';
import { parseName } from '#shared/naming/parse-name.ts';
import { partKey, relateNames } from '#shared/naming/relate-names.ts';
import { plain } from './naming-cases.ts';

function relate(names: string[]) {
  const at = (index: number) => names[index];
  return relateNames(names.map((name) => parseName(name, plain))).map((relation) => {
    switch (relation.kind) {
      case 'takes': {
        const chosen = relation.chosen === null ? null : at(relation.chosen);
        return [relation.kind, relation.members.map(at), chosen];
      }
      case 'left-right':
      case 'mid-side':
        return [relation.kind, at(relation.first), at(relation.second)];
      case 'amp-di':
      case 'wet-dry':
      case 'tuned-untuned':
        return [relation.kind, relation.processed.map(at), relation.clean.map(at)];
    }
  });
}

describe('relateNames', () => {
  it('sees takes only where a word for take is written', () => {
    expect(relate(['LV take 1', 'LV tk2', 'LV Take 3'])).toEqual([
      ['takes', ['LV take 1', 'LV tk2', 'LV Take 3'], null],
    ]);
    expect(relate(['LV take 3', 'Lead Vox Comp'])).toEqual([
      ['takes', ['LV take 3'], 'Lead Vox Comp'],
    ]);
    expect(relate(['LV take 3', 'BV take 1'])).toEqual([]);
    expect(relate(['BV 1', 'BV 2', 'BV 3', 'BV 4', 'BV 5', 'BV 6', 'BV 7', 'BV 8'])).toEqual([]);
    expect(relate(['Vox', 'Vox Dbl', 'Vox 2', 'Gtr_01', 'Gtr_02'])).toEqual([]);
  });

  it('sees the clean signal beside the amp', () => {
    expect(relate(['Bass DI', 'Bass Amp', 'EG1 DI', 'EG 1', 'EG2'])).toEqual([
      ['amp-di', ['Bass Amp'], ['Bass DI']],
      ['amp-di', ['EG 1'], ['EG1 DI']],
    ]);
    expect(relate(['Gtr DI 1', 'Gtr Amp 1', 'Gtr Amp 2'])).toEqual([
      ['amp-di', ['Gtr Amp 1'], ['Gtr DI 1']],
    ]);
    expect(relate(['Bass DI', 'Gtr Amp'])).toEqual([]);
  });

  it('sees wet and dry, tuned and untuned, also where one of them says nothing', () => {
    expect(relate(['LV', 'LV Dry', 'LV Untuned'])).toEqual([
      ['wet-dry', ['LV'], ['LV Dry']],
      ['tuned-untuned', ['LV'], ['LV Untuned']],
    ]);
    expect(relate(['Vox Tuned', 'Vox Untuned'])).toEqual([
      ['tuned-untuned', ['Vox Tuned'], ['Vox Untuned']],
    ]);
    expect(relate(['Gtr Verse Wet', 'Gtr Chorus Dry'])).toEqual([]);
  });

  it('pairs left and right of one part, and of nothing else', () => {
    expect(relate(['OH_R', 'OH L', 'Room L', 'Gtr 1 L', 'Gtr 2 R'])).toEqual([
      ['left-right', 'OH L', 'OH_R'],
    ]);
    expect(relate(['Gtr Sol L', 'Gtr Juno R'])).toEqual([]);
    expect(relate(['Vox Dbl L', 'Vox Dbl R', 'Vox Dbl R copy'])).toEqual([]);
    expect(relate(['OH M', 'OH S'])).toEqual([['mid-side', 'OH M', 'OH S']]);
  });
});

describe('partKey', () => {
  it('is the same for all files of one part', () => {
    const keyOf = (name: string) => partKey(parseName(name, plain));
    expect(keyOf('Bass DI')).toBe(keyOf('Bass Amp'));
    expect(keyOf('LV Comp Tuned')).toBe(keyOf('LV Untuned'));
    expect(keyOf('OH L')).toBe(keyOf('OH R'));
    expect(keyOf('EG 1')).not.toBe(keyOf('EG 2'));
    expect(keyOf('Gtr Verse')).not.toBe(keyOf('Gtr Chorus'));
    expect(keyOf('Audio 3')).toBeNull();
  });
});
