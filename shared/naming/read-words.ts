import type { Form, Meaning, TrieNode } from './lexicon.ts';
import { glued, hard, soft, splitName, type NameText, type Range } from './split-name.ts';

/** One piece of a name: a known form, a number, or a word that is not known. */
export type Word = {
  /** Letter offsets in the NameText. */
  from: number;
  to: number;
  /** UTF-16 offsets in the name. */
  start: number;
  end: number;
  text: string;
  /** Empty for numbers and unknown words. */
  meanings: readonly Meaning[];
  digits: number | null;
  /** Part of a run of letters that was cut where nothing shows that a word ends, and too short to
   * be sure of. */
  doubtful: boolean;
};

/** Costs of a reading; only their order matters. A known phrase is cheaper than its words apart,
 * and an unknown word dearer than a few glued known ones. */
const cost = {
  form: 4,
  unsureForm: 5,
  singleLetter: 2,
  digits: 6,
  gluedCut: 4,
  gluedInside: 1,
  softInside: 1.5,
  unknown: 12,
} as const;

type Step = { from: number; form: Form | null; digits: boolean };

const onlyDigits = /^[0-9]{1,9}$/;

/** The price of reading `form` at letter `at`, or null where the boundaries speak against it. */
function priceOf(text: NameText, form: Form, at: number): number | null {
  const length = form.letters.length;
  const startsGlued = text.boundary[at] === glued;
  const endsGlued = text.boundary[at + length] === glued;
  let price: number = form.sure ? cost.form : cost.unsureForm;
  if (length === 1) {
    if (endsGlued) return null;
    if (startsGlued && !form.side) return null;
    price += cost.singleLetter;
  }
  if (startsGlued) price += cost.gluedCut;
  let wordStart = 0;
  for (let i = 1; i <= length; i++) {
    const isBreak = i === length || form.breaks.includes(i);
    if (i < length) {
      const boundary = text.boundary[at + i];
      if (boundary === hard && !isBreak) return null;
      if (boundary === soft && !isBreak) price += cost.softInside;
      if (boundary === glued && isBreak) price += cost.gluedInside;
    }
    if (isBreak) {
      // A single letter of a phrase must stand out, or the phrase be long: `egtr`, not `snt`.
      const after = text.boundary[at + i] === glued;
      const before = text.boundary[at + wordStart] === glued;
      const atEdge = (after && i === length) || (before && wordStart === 0);
      const alone = i - wordStart === 1 && length > 1;
      if (alone && (after || before) && (length < 4 || atEdge)) return null;

      wordStart = i;
    }
  }
  return price;
}

function cheapestSteps(text: NameText, tries: readonly TrieNode[], closed: Set<number>): Step[] {
  const length = text.letters.length;
  const best = new Array<number>(length + 1).fill(Infinity);
  const steps = new Array<Step | null>(length + 1).fill(null);
  best[0] = 0;
  const offer = (to: number, price: number, step: Step) => {
    if (price < (best[to] ?? 0)) {
      best[to] = price;
      steps[to] = step;
    }
  };
  for (let at = 0; at < length; at++) {
    const sofar = best[at] ?? Infinity;
    if (sofar === Infinity) continue;
    if (text.boundary[at] !== glued) {
      let to = at + 1;
      while (to < length && text.boundary[to] === glued) to++;
      const digits = onlyDigits.test(text.letters.slice(at, to));
      const price = digits ? cost.digits : cost.unknown + (to - at);
      offer(to, sofar + price, { from: at, form: null, digits });
    }
    for (const root of tries) {
      let node: TrieNode | undefined = root;
      for (let to = at; node; to++) {
        for (const form of node.forms) {
          if (text.boundary[to] === glued && closed.has(to)) continue;
          const price = priceOf(text, form, at);
          if (price !== null) offer(to, sofar + price, { from: at, form, digits: false });
        }
        if (to >= length) break;
        node = node.next.get(text.letters.charCodeAt(to));
      }
    }
  }
  const path: Step[] = [];
  for (let to = length; to > 0;) {
    const step = steps[to];
    if (!step) break;
    path.unshift(step);
    to = step.from;
  }
  return path;
}

function wordOf(text: NameText, step: Step, to: number): Word {
  const start = text.starts[step.from] ?? 0;
  const end = text.ends[to - 1] ?? start;
  return {
    from: step.from,
    to,
    start,
    end,
    text: text.name.slice(start, end),
    meanings: step.form?.meanings ?? [],
    digits: step.digits ? Number(text.letters.slice(step.from, to)) : null,
    doubtful: false,
  };
}

const strongEnough = 3;

function textOf(text: NameText, words: readonly Word[]): string {
  return text.name.slice(words[0]?.start, words.at(-1)?.end);
}

function isCapitals(run: string): boolean {
  return run === run.toUpperCase() && run !== run.toLowerCase();
}

/** What a run of glued words is worth: read as it is, only a guess, or better left unknown. */
function judgeGlue(text: NameText, words: readonly Word[]): 'good' | 'doubtful' | 'bad' {
  const isInstrument = (word: Word) => word.meanings.some((m) => m.kind === 'instrument');
  const named = words.filter(isInstrument);
  if (named.length === 0) {
    const least = isCapitals(textOf(text, words)) ? 2 : strongEnough;
    return words.every((word) => word.to - word.from >= least) ? 'good' : 'bad';
  }
  const surely = (word: Word) =>
    word.to - word.from >= strongEnough &&
    word.meanings.some((m) => m.kind === 'instrument' && m.standing !== 'unsure');
  if (named.some(surely)) return 'good';
  const first = words[0];
  const last = words.at(-1);
  if (!first || !last) return 'bad';
  if (isCapitals(textOf(text, words))) return 'good';

  return last.to - first.from >= 4 ? 'doubtful' : 'bad';
}

/** Words of one run: nothing between them shows where one ends. */
function gluedRuns(text: NameText, words: readonly Word[]): Word[][] {
  const runs: Word[][] = [];
  for (const word of words) {
    const run = runs.at(-1);
    if (run && text.boundary[word.from] === glued) run.push(word);
    else runs.push([word]);
  }
  return runs.filter((run) => run.length > 1);
}

/**
 * Cuts a name into known forms, numbers and unknown words: the cheapest reading over all ways to
 * cut it. `KickIn`, `kick in`, `KICK_IN` and `kickin` read alike.
 */
export function readWords(
  name: string,
  tries: readonly TrieNode[],
  masks: readonly Range[] = [],
): { text: NameText; words: Word[] } {
  const text = splitName(name, masks);
  const closed = new Set<number>();
  for (;;) {
    const steps = cheapestSteps(text, tries, closed);
    const words = steps.map((step, index) =>
      wordOf(text, step, steps[index + 1]?.from ?? text.letters.length),
    );
    let again = false;
    for (const run of gluedRuns(text, words)) {
      const worth = judgeGlue(text, run);
      if (worth === 'doubtful') for (const word of run) word.doubtful = true;
      if (worth !== 'bad') continue;
      for (const word of run.slice(1)) closed.add(word.from);
      again = true;
    }
    if (!again) return { text, words };
  }
}
