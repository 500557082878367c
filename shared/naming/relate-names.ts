import { detailBase } from './name-parts.ts';
import type { ParsedName } from './parsed-name.ts';

/** Names that belong together; numbers are positions in the list that was given. */
export type NameRelation =
  /** Takes of one part that still have to be chosen from; a word for take stands in the names. */
  | { kind: 'takes'; members: number[]; chosen: number | null }
  /** The same part with and without its effect, tuning or amplifier. */
  | { kind: 'wet-dry' | 'tuned-untuned' | 'amp-di'; processed: number[]; clean: number[] }
  /** Two mono files of one pair. */
  | { kind: 'left-right' | 'mid-side'; first: number; second: number };

/** Details that say how a part was taken or treated, not which part it is. */
const treatments = {
  clean: { DI: 'amp-di', Line: 'amp-di', Dry: 'wet-dry', Untuned: 'tuned-untuned' },
  processed: { Amp: 'amp-di', Mic: 'amp-di', Wet: 'wet-dry', Tuned: 'tuned-untuned' },
} as const;

const chosenTake = 'Comp';

type Treatment = 'amp-di' | 'wet-dry' | 'tuned-untuned';

function treatmentOf(detail: string, side: 'clean' | 'processed'): Treatment | null {
  const table: Readonly<Record<string, Treatment>> = treatments[side];
  return table[detailBase(detail)] ?? null;
}

function isTreatment(detail: string): boolean {
  return (
    detail === chosenTake ||
    treatmentOf(detail, 'clean') !== null ||
    treatmentOf(detail, 'processed') !== null
  );
}

/** `DI 2` and `Amp 2` are of the second part, where the part has no number of its own. */
function ordinalOf(parsed: ParsedName): number | null {
  if (parsed.ordinal !== null) return parsed.ordinal;
  const numbered = parsed.detail.find(
    (detail) => isTreatment(detail) && detail !== detailBase(detail),
  );
  return numbered === undefined ? null : Number(/\d+$/.exec(numbered)?.[0]);
}

function keyOf(parsed: ParsedName, details: readonly string[], withSide: boolean): string | null {
  if (parsed.instrument === null) return null;
  const words = parsed.leftovers.filter(({ kind }) => kind === 'unknown').map(({ text }) => text);
  const side = withSide ? parsed.side : null;
  return JSON.stringify([parsed.instrument, ordinalOf(parsed), [...details].sort(), side, words]);
}

/**
 * Which part a name is of: equal for wet and dry, tuned and untuned, DI and amp, takes, and the
 * two sides of one part. null where no instrument is known.
 */
export function partKey(parsed: ParsedName): string | null {
  return keyOf(
    parsed,
    parsed.detail.filter((detail) => !isTreatment(detail)),
    false,
  );
}

function gather(
  names: readonly ParsedName[],
  key: (name: ParsedName) => string | null,
): number[][] {
  const groups = new Map<string, number[]>();
  names.forEach((name, index) => {
    const text = key(name);
    if (text === null) return;
    const group = groups.get(text);
    if (group) group.push(index);
    else groups.set(text, [index]);
  });
  return [...groups.values()].filter((group) => group.length > 1);
}

function isClean(name: ParsedName | undefined): boolean {
  return name?.detail.some((detail) => treatmentOf(detail, 'clean') !== null) ?? false;
}

function treated(names: readonly ParsedName[]): NameRelation[] {
  const relations: NameRelation[] = [];
  const parts = gather(names, partKey);
  for (const part of parts) {
    for (const kind of ['amp-di', 'wet-dry', 'tuned-untuned'] as const) {
      const has = (index: number, side: 'clean' | 'processed') =>
        names[index]?.detail.some((detail) => treatmentOf(detail, side) === kind) ?? false;
      const clean = part.filter((index) => has(index, 'clean'));
      // A file that says nothing stands for the processed one; spare takes stand for nothing.
      const processed = part.filter(
        (index) => !isClean(names[index]) && names[index]?.take === null,
      );
      if (clean.length > 0 && processed.length > 0) relations.push({ kind, processed, clean });
    }
  }
  return relations;
}

function pairs(names: readonly ParsedName[]): NameRelation[] {
  const relations: NameRelation[] = [];
  const one = (name: ParsedName) =>
    keyOf(name, [...name.detail, `${name.take} ${name.counter}`], false);
  for (const group of gather(names, one)) {
    for (const [kind, a, b] of [
      ['left-right', 'L', 'R'],
      ['mid-side', 'M', 'S'],
    ] as const) {
      const first = group.filter((index) => names[index]?.side === a);
      const second = group.filter((index) => names[index]?.side === b);
      if (first.length !== 1 || second.length !== 1) continue;
      relations.push({ kind, first: first[0] ?? 0, second: second[0] ?? 0 });
    }
  }
  return relations;
}

function takes(names: readonly ParsedName[]): NameRelation[] {
  const withoutComp = (name: ParsedName) =>
    keyOf(
      name,
      name.detail.filter((detail) => detail !== chosenTake),
      true,
    );
  return gather(names, withoutComp).flatMap((group): NameRelation[] => {
    const members = group.filter((index) => names[index]?.take !== null);
    const chosen = group.find((index) => names[index]?.detail.includes(chosenTake)) ?? null;
    const several = members.length > 1 || (members.length === 1 && chosen !== null);
    return several ? [{ kind: 'takes', members, chosen }] : [];
  });
}

/**
 * Finds which names of a session belong together. Numbers alone make no takes: backing vocals 1 to
 * 8 are eight parts.
 */
export function relateNames(names: readonly ParsedName[]): NameRelation[] {
  return [...takes(names), ...treated(names), ...pairs(names)];
}
