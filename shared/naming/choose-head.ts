import type { GroupNature } from '../rules/naming-rules.ts';
import type { Instrument, Meaning } from './lexicon.ts';
import type { Word } from './read-words.ts';

/** One word of a name read as an instrument. */
type Hit = {
  index: number;
  instrument: Instrument;
  standing: 'sure' | 'unsure' | 'misspelt';
  /** The word could also describe another instrument. */
  describes: boolean;
  /** The word says what is played rather than who plays it: oohs. */
  tellsMore: boolean;
};

export type Head = {
  instrument: Instrument;
  /** Words that name it, or its group beside it. */
  indexes: ReadonlySet<number>;
  sure: boolean;
  /** Named by a word that means an instrument, if not surely this one. */
  plain: boolean;
};

type InstrumentMeaning = Extract<Meaning, { kind: 'instrument' }>;

export function instrumentMeanings(word: Word): InstrumentMeaning[] {
  return word.meanings.filter((meaning) => meaning.kind === 'instrument');
}

const standingOrder = { sure: 0, misspelt: 1, unsure: 2 } as const;

function hitOf(words: readonly Word[], index: number, hint: GroupNature | null): Hit | null {
  const word = words[index];
  if (!word) return null;
  // One letter names an instrument only with its number: T1, T2.
  const letter = word.to - word.from === 1;
  if (letter && (words.length > 2 || words[index + 1]?.digits == null)) return null;
  const [best] = instrumentMeanings(word).sort((a, b) => {
    const hinted = Number(b.instrument.nature === hint) - Number(a.instrument.nature === hint);
    const standing = standingOrder[a.standing] - standingOrder[b.standing];
    return standing || hinted;
  });
  if (!best) return null;
  const describes =
    best.instrument.detail !== null || word.meanings.some((m) => m.kind === 'detail');
  const { instrument, standing, adds } = best;
  return { index, instrument, standing, describes, tellsMore: adds !== null };
}

/** The hits that name an instrument most plainly; empty only if there is no hit at all. */
function plainest(hits: readonly Hit[]): { hits: readonly Hit[]; sure: boolean } {
  const sure = hits.filter((hit) => hit.standing !== 'unsure');
  const plain = sure.filter((hit) => !hit.describes);
  if (plain.length > 0) return { hits: plain, sure: true };
  const named = sure.filter((hit) => hit.instrument.detail === null);
  if (named.length > 0) return { hits: named, sure: true };
  if (sure.length > 0) return { hits: sure, sure: true };
  const undescribing = hits.filter((hit) => !hit.describes);
  return { hits: undescribing.length > 0 ? undescribing : hits, sure: false };
}

function last<T>(items: readonly T[]): T | undefined {
  return items.at(-1);
}

/**
 * Chooses the instrument that a name is about among the words that name one. A word for the whole
 * group gives way to one instrument of it (`Drums Kick`, `Elec Rhythm Gtr`). Two instruments leave
 * only a guess: the more particular one, else the last, where English puts the main word.
 */
export function chooseHead(words: readonly Word[], hint: GroupNature | null): Head | null {
  const hits = words.flatMap((_, index) => hitOf(words, index, hint) ?? []);
  if (hits.length === 0) return null;
  const { hits: candidates, sure } = plainest(hits);
  const particular = candidates.filter((hit) => !hit.instrument.general);
  const rivals = candidates.filter(
    (hit) =>
      !hit.instrument.general ||
      !particular.some((other) => other.instrument.nature === hit.instrument.nature),
  );
  const distinct = [...new Set(rivals.map((hit) => hit.instrument))];
  const onlyGeneral = distinct.every((instrument) => instrument.general);
  const oneNature = new Set(distinct.map((instrument) => instrument.nature)).size === 1;

  let instrument: Instrument | undefined;
  let certain = sure;
  if (distinct.length === 1) {
    instrument = distinct[0];
  } else if (onlyGeneral && oneNature) {
    instrument = distinct.reduce((a, b) => (a.rank <= b.rank ? a : b));
  } else {
    certain = false;
    instrument = (last(particular) ?? last(rivals))?.instrument;
  }
  if (!instrument) return null;
  if (instrument.general) {
    const general = instrument;
    // A voice is sung by somebody, whatever else is said; other groups are only headings.
    const heading = general.nature !== 'vocals';
    const narrower = hits.find(
      (hit) =>
        (heading || (hit.standing === 'unsure' && !hit.tellsMore)) &&
        hit.instrument.nature === general.nature &&
        !hit.instrument.general,
    );
    if (narrower) instrument = narrower.instrument;
  }
  const chosen = instrument;
  const own = hits.filter(
    (hit) =>
      hit.instrument === chosen ||
      (hit.instrument.general && hit.instrument.nature === chosen.nature),
  );
  // A guitar pad may be a pad and not a guitar; a drum beside a bass may be what is meant.
  const doubted = hits.some(
    (hit) =>
      hit.instrument.nature !== chosen.nature &&
      (hit.standing === 'unsure' ? !hit.describes : hit.instrument.nature === 'synths'),
  );
  return {
    instrument: chosen,
    indexes: new Set(own.map((hit) => hit.index)),
    sure: certain && !doubted,
    plain: sure,
  };
}
