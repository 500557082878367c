import type { NamingRules } from '../rules/naming-rules.ts';
import { composeName } from './compose-name.ts';
import { clashKey } from './fold-name.ts';
import type { Part } from './name-parts.ts';

function bodyOf(part: Part, naming: NamingRules): string {
  return clashKey(composeName({ ...part, number: null }, naming).body);
}

function buckets(parts: readonly Part[], naming: NamingRules): Part[][] {
  const byBody = new Map<string, Part[]>();
  for (const part of parts) {
    const body = bodyOf(part, naming);
    const bucket = byBody.get(body);
    if (bucket) bucket.push(part);
    else byBody.set(body, [part]);
  }
  return [...byBody.values()];
}

function allDistinct(values: readonly (number | null)[]): boolean {
  return new Set(values).size === values.length;
}

function withDetail(part: Part, detail: string): Part {
  const known = part.details.length - part.freeWords;
  const details = [...part.details.slice(0, known), detail, ...part.details.slice(known)];
  return { ...part, details };
}

/** Takes of one part keep the number that somebody gave them. */
function byTake(parts: readonly Part[], naming: NamingRules): readonly Part[] {
  const takes = parts.map(({ file }) => file.parsed.take);
  if (!naming.tokens.includes('detail') || takes.every((take) => take === null)) return parts;
  return parts.map((part, index) => {
    const take = takes[index] ?? null;
    return take === null ? part : withDetail(part, `Take ${take}`);
  });
}

/** A mono file beside a stereo file of the same name says that it is mono. */
function byChannels(parts: readonly Part[], naming: NamingRules): readonly Part[] {
  const stereo = parts.some(({ file }) => file.channels !== null && file.channels > 1);
  if (!stereo || !naming.tokens.includes('detail')) return parts;
  return parts.map((part) => {
    const tells = part.file.channels === 1 && !part.details.includes('Mono');
    return tells ? withDetail(part, 'Mono') : part;
  });
}

/** `_01`, `_02` at the end of names that are otherwise the same were ordinals after all. */
function byCounter(parts: readonly Part[]): readonly Part[] {
  const counters = parts.map(({ file }) => file.parsed.counter);
  const usable =
    parts.every(({ ordinal }) => ordinal === null) &&
    counters.every((counter) => counter !== null && counter >= 1 && counter <= parts.length) &&
    allDistinct(counters);
  return usable
    ? parts.map((part, index) => ({ ...part, ordinal: counters[index] ?? null }))
    : parts;
}

/**
 * Gives parts that would be called the same what tells them apart: the take that was written, mono
 * beside stereo, a counter, else an ordinal in the order of the parts; where there is an ordinal already, `Alt`.
 * `isFree` tells whether nobody else has a name; a part that is the only one of its name stays.
 */
export function tellApart(
  parts: readonly Part[],
  naming: NamingRules,
  isFree: (part: Part) => boolean,
): Part[] {
  const used = new Set<string>();
  const counted = new Map<string, number>();
  const free = (part: Part) => isFree(part) && !used.has(bodyOf(part, naming));
  const told = new Map<number, Part>();
  const settle = (part: Part) => {
    used.add(bodyOf(part, naming));
    told.set(part.index, part);
  };
  const several: Part[][] = [];
  for (const bucket of buckets(parts, naming)) {
    const [only] = bucket;
    if (bucket.length === 1 && only && free(only)) settle(only);
    else several.push(bucket);
  }
  for (const bucket of several) {
    for (const group of buckets(byChannels(byTake(bucket, naming), naming), naming)) {
      const [only] = group;
      if (group.length === 1 && only && free(only)) settle(only);
      else for (const part of byCounter(group)) settle(numbered(part, naming, free, counted));
    }
  }
  return parts.map((part) => told.get(part.index) ?? part);
}

function numbered(
  part: Part,
  naming: NamingRules,
  free: (part: Part) => boolean,
  counted: Map<string, number>,
): Part {
  if (part.ordinal !== null && free(part)) return part;
  const alternative = part.ordinal !== null && naming.tokens.includes('detail');
  const key = bodyOf(alternative ? part : { ...part, ordinal: null }, naming);
  // Beside one that is called so already, the next is the second.
  const first = alternative || free({ ...part, ordinal: null }) ? 1 : 2;
  for (let count = counted.get(key) ?? first; ; count++) {
    const other = alternative
      ? withDetail(part, count === 1 ? 'Alt' : `Alt ${count}`)
      : { ...part, ordinal: count };
    if (!free(other)) continue;
    counted.set(key, count + 1);
    return other;
  }
}
