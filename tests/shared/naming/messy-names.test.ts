import { describe, expect, it } from 'vitest';
import { explainName } from '#shared/naming/explain-name.ts';
import { parseName } from '#shared/naming/parse-name.ts';
import { proposeNames } from '#shared/naming/propose-names.ts';
import {
  expectedReading,
  grouped,
  noSong,
  numbered,
  plain,
  readingOf,
  readNameCases,
  type NameCase,
} from './naming-cases.ts';

/** The tables are common practice of the trade, no source; fixtures/names/README.md says more. */
const tables = { seen: readNameCases('seen'), 'held-back': readNameCases('held-back') };

function parseCase(row: NameCase) {
  return parseName(row.name, plain, { artist: row.artist ?? null, title: row.title ?? null });
}

function isRight(row: NameCase): boolean {
  return JSON.stringify(readingOf(parseCase(row))) === JSON.stringify(expectedReading(row));
}

describe.each(Object.entries(tables))('names of exported files (%s)', (_, rows) => {
  it('are read rightly, 95 in 100 at least', () => {
    const wrong = rows.filter((row) => !isRight(row)).map(({ name }) => name);
    expect(wrong.length / rows.length, wrong.join(', ')).toBeLessThanOrEqual(0.05);
  });

  it('are never read wrongly with certainty', () => {
    const wrong = rows.filter((row) => parseCase(row).confidence === 'certain' && !isRight(row));
    expect(wrong.map(({ name }) => name)).toEqual([]);
  });

  it.each([
    ['plain', plain],
    ['numbered', numbered],
    ['group letter', grouped],
  ])('become proper names where the instrument is known (%s)', (_, naming) => {
    for (const row of rows) {
      const parsed = parseName(row.name, naming, {
        artist: row.artist ?? null,
        title: row.title ?? null,
      });
      const [proposed] = proposeNames(
        [{ path: row.name, parsed, channels: 1 }],
        naming,
        noSong,
      ).values();
      if (row.instrument === undefined) {
        expect(proposed, row.name).toBeNull();
        continue;
      }
      expect(explainName(proposed ?? '', naming), `${row.name} -> ${proposed}`).toEqual({
        ok: true,
      });
    }
  });
});

it('the tables have at least 300 names, a third of them held back', () => {
  const all = tables.seen.length + tables['held-back'].length;
  expect(all).toBeGreaterThanOrEqual(300);
  expect(tables['held-back'].length / all).toBeGreaterThan(0.3);
});
