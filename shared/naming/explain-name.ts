import type { NameToken, NamingRules } from '../rules/naming-rules.ts';
import { groupText, inCase, padNumber } from './compose-name.ts';
import { groupCandidates, parseName } from './parse-name.ts';
import type { NameSpan, ParsedName } from './parsed-name.ts';
import { bareName, nameRuns, type NameRun } from './split-name.ts';
import { firstOutOfOrder, tokenOf } from './token-order.ts';

/**
 * Why a part of a name breaks the convention:
 * - `missing`: the token is not there; { expected } where it is known
 * - `not-wanted`: the convention has no place for { found }
 * - `unknown`: no instrument is recognised
 * - `wrong`: { found } stands for another group than the instrument's { expected }
 * - `misspelt`: { found } is understood as { expected }
 * - `digits`: the number { found } is not written like { expected }
 * - `order`: { found } stands in the wrong place
 * - `separator`: { found } (empty: nothing) stands between words instead of { expected }
 * - `case`: { found } is not written as { expected }
 * - `leftover`: { found } is left from an export, { kind } says what it is
 * - `characters`: { found } are not allowed
 * - `too-long`: { length } characters, { most } are allowed
 */
export const nameFailureReasons = [
  'missing',
  'not-wanted',
  'unknown',
  'wrong',
  'misspelt',
  'digits',
  'order',
  'separator',
  'case',
  'leftover',
  'characters',
  'too-long',
] as const;
export type NameFailureReason = (typeof nameFailureReasons)[number];

/** `token` is the part that fails, `name` where no single token does. */
export type NameFailure = {
  token: NameToken | 'name';
  reason: NameFailureReason;
  args: Record<string, string | number>;
};

export type NameExplanation = { ok: true } | { ok: false; failures: NameFailure[] };

type Add = (
  token: NameFailure['token'],
  reason: NameFailureReason,
  args?: NameFailure['args'],
) => void;

function spanOf(parsed: ParsedName, kind: NameSpan['kind']): NameSpan | undefined {
  return parsed.spans.find((span) => span.kind === kind);
}

function explainNumber(parsed: ParsedName, naming: NamingRules, add: Add): void {
  const span = spanOf(parsed, 'number');
  if (!naming.tokens.includes('number')) {
    if (span) add('number', 'not-wanted', { found: span.text });
  } else if (!span || parsed.number === null) {
    add('number', 'missing', { expected: padNumber(1, naming) });
  } else {
    const expected = padNumber(parsed.number, naming);
    if (span.text !== expected) add('number', 'digits', { found: span.text, expected });
  }
}

function explainGroup(name: string, parsed: ParsedName, naming: NamingRules, add: Add): void {
  if (!naming.tokens.includes('group') || spanOf(parsed, 'group')) return;
  const own = naming.groups.find((group) => group.id === parsed.groupId);
  const expected = own ? inCase(groupText(own, naming), naming) : '';
  // Another group's letter counts only where the convention would have put it.
  const instrument = spanOf(parsed, 'instrument');
  const before = naming.tokens.indexOf('group') < naming.tokens.indexOf('instrument');
  const other = groupCandidates(name, naming).find(({ range }) =>
    before ? range.end <= (instrument?.start ?? 0) : range.start >= (instrument?.end ?? 0),
  );
  if (other) {
    const found = name.slice(other.range.start, other.range.end);
    add('group', 'wrong', own ? { found, expected } : { found });
  } else {
    add('group', 'missing', own ? { expected } : {});
  }
}

function explainInstrument(parsed: ParsedName, add: Add): void {
  const span = spanOf(parsed, 'instrument');
  if (parsed.instrument === null) add('instrument', 'unknown');
  else if (!span) add('instrument', 'missing', { expected: parsed.instrument });
  else if (parsed.misspelt) {
    add('instrument', 'misspelt', { found: span.text, expected: parsed.instrument });
  }
}

function explainPlaces(parsed: ParsedName, naming: NamingRules, add: Add): void {
  for (const span of parsed.spans) {
    const isDetail = ['detail', 'unknown', 'take', 'role'].includes(span.kind);
    if (isDetail && !naming.tokens.includes('detail')) {
      add('detail', 'not-wanted', { found: span.text });
    } else if (tokenOf(span, naming.tokens) === null) {
      add('name', 'leftover', { found: span.text, kind: span.kind });
    }
  }
  const early = firstOutOfOrder(parsed.spans, naming.tokens);
  if (early) add(early.token, 'order', { found: early.span.text });
}

/** Characters that a convention does not allow. */
function outside(naming: NamingRules): RegExp {
  return naming.characters === 'portable'
    ? /[^A-Za-z0-9 ._-]/u
    : /(?!\u200c|\u200d)[^\p{L}\p{N}\p{M}'’ ._-]/u;
}

/** Gaps between words that are not one separator, and words that have no gap between them. */
function explainSeparators(name: string, parsed: ParsedName, naming: NamingRules, add: Add): void {
  const expected = naming.separator;
  // Hi-Hat and Ad-Lib are words, whatever the convention puts between words.
  const hyphenated = (run: NameRun) =>
    run.text === '-' && parsed.spans.some((span) => span.start < run.start && span.end > run.end);
  const wrong = nameRuns(name).find(
    (run) =>
      !run.isWord &&
      (run.text !== expected || run.start === 0 || run.end === name.length) &&
      !hyphenated(run) &&
      !outside(naming).test(run.text),
  );
  if (wrong) add('name', 'separator', { found: wrong.text, expected });
  parsed.spans.forEach((span, index) => {
    const next = parsed.spans[index + 1];
    if (!next || next.start !== span.end) return;
    // `Tom1` and `Verse2` are written like this everywhere.
    const counted = next.kind === 'ordinal' || (next.kind === 'detail' && /^\d+$/.test(next.text));
    if (!counted) add('name', 'separator', { found: '', expected, text: span.text + next.text });
  });
}

const longestAbbreviation = 4;

function titleCase(word: string): string {
  const [first = ''] = word;
  const rest = word.slice(first.length);
  const shouts = word.length > longestAbbreviation && rest === rest.toUpperCase();
  return first.toUpperCase() + (shouts ? rest.toLowerCase() : rest);
}

function explainCase(name: string, parsed: ParsedName, naming: NamingRules, add: Add): void {
  const written = (word: string) => {
    if (naming.case === 'title') return titleCase(word);
    return inCase(word, naming);
  };
  const leftOver = (run: NameRun) =>
    parsed.leftovers.some(
      ({ kind, start, end }) => kind !== 'unknown' && run.start < end && run.end > start,
    );
  const words = nameRuns(name).filter((run) => run.isWord && !leftOver(run));
  const found = words.map(({ text }) => text).find((word) => written(word) !== word);
  if (found !== undefined) add('name', 'case', { found, expected: written(found) });
}

function explainCharacters(name: string, naming: NamingRules, add: Add): void {
  const characters = [...name].filter((character) => outside(naming).test(character));
  const found = [...new Set(characters)].join('');
  if (found !== '') add('name', 'characters', { found });
  const length = [...name].length;
  if (length > naming.maximumLength) {
    add('name', 'too-long', { length, most: naming.maximumLength });
  }
}

/**
 * Whether a file name follows a convention, and which part of it does not. The extension of an
 * audio file does not count. Abbreviations that are generally understood are as good as words in
 * full; details may be free words.
 */
export function explainName(fileName: string, naming: NamingRules): NameExplanation {
  const { failures } = examineName(fileName, naming);
  return failures.length === 0 ? { ok: true } : { ok: false, failures };
}

/** What a file name says by itself, without folders, and what is wrong with it. */
export function examineName(
  fileName: string,
  naming: NamingRules,
): { parsed: ParsedName; failures: NameFailure[] } {
  const lastPart = fileName.slice(fileName.lastIndexOf('/') + 1);
  const name = bareName(lastPart);
  const parsed = parseName(lastPart, naming);
  const failures: NameFailure[] = [];
  const add: Add = (token, reason, args = {}) => failures.push({ token, reason, args });
  explainNumber(parsed, naming, add);
  explainGroup(name, parsed, naming, add);
  explainInstrument(parsed, add);
  explainPlaces(parsed, naming, add);
  explainSeparators(name, parsed, naming, add);
  explainCase(name, parsed, naming, add);
  explainCharacters(name, naming, add);
  return { parsed, failures };
}
