import { describe, expect, it } from 'vitest';
import { explainName } from '#shared/naming/explain-name.ts';
import { foldName } from '#shared/naming/fold-name.ts';
import { detailRanks, instruments, vocabularyTrie, type TrieNode } from '#shared/naming/lexicon.ts';
import { parseName } from '#shared/naming/parse-name.ts';
import { groupNatures } from '#shared/rules/naming-rules.ts';
import { plain } from './naming-cases.ts';

function* formsOf(node: TrieNode): Generator<TrieNode['forms'][number]> {
  yield* node.forms;
  for (const next of node.next.values()) yield* formsOf(next);
}

function written(form: TrieNode['forms'][number]): string {
  const starts = [0, ...form.breaks];
  return starts.map((start, i) => form.letters.slice(start, form.breaks[i])).join(' ');
}

describe('the vocabulary', () => {
  it('has instruments of every nature', () => {
    const natures = new Set([...instruments.values()].map(({ nature }) => nature));
    expect([...natures].sort()).toEqual([...groupNatures].sort());
  });

  it('gives no two instruments and no two details the same written or short form', () => {
    const instrumentForms = [...instruments.values()].flatMap((entry) => [
      ...new Set([foldName(entry.written), foldName(entry.short)]),
    ]);
    expect(new Set(instrumentForms).size).toBe(instrumentForms.length);
    const detailForms = [...detailRanks.values()].flatMap(({ entry }) => [
      ...new Set([foldName(entry.written), foldName(entry.short)]),
    ]);
    expect(new Set(detailForms).size).toBe(detailForms.length);
  });

  it('reads every instrument back from its written and its short form', () => {
    for (const { written: name, short, nature } of instruments.values()) {
      for (const text of [name, short]) {
        expect(parseName(`${text}.wav`, plain), text).toMatchObject({ instrument: name, nature });
        expect(explainName(`${text}.wav`, plain), text).toEqual({ ok: true });
      }
    }
  });

  it('reads every sure form as the one instrument it is listed under', () => {
    for (const form of formsOf(vocabularyTrie())) {
      const sure = form.meanings.filter(
        (meaning) => meaning.kind === 'instrument' && meaning.standing !== 'unsure',
      );
      expect(sure.length, written(form)).toBeLessThanOrEqual(1);
      for (const meaning of sure) {
        if (meaning.kind !== 'instrument') continue;
        const parsed = parseName(`${written(form)}.wav`, plain);
        expect(parsed.instrument, written(form)).toBe(meaning.instrument.written);
      }
    }
  }, 60_000);

  it('reads every detail back beside a guitar, written and short', () => {
    for (const { entry } of detailRanks.values()) {
      for (const text of [entry.written, entry.short]) {
        const parsed = parseName(`Guitar ${text}.wav`, plain);
        expect([parsed.instrument, parsed.detail], text).toEqual(['Guitar', [entry.written]]);
      }
    }
  });
});
