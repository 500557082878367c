import type { NamingRules } from '../rules/naming-rules.ts';
import type { FileRole, SessionInformation } from '../session/session-information.ts';
import { composeName } from './compose-name.ts';
import { examineName, explainName } from './explain-name.ts';
import { clashKey, foldName } from './fold-name.ts';
import { lexiconOf, type Instrument } from './lexicon.ts';
import { compareParts, partsOf, shorterParts, type Part } from './name-parts.ts';
import { parseName } from './parse-name.ts';
import type { ParsedName } from './parsed-name.ts';
import { checkPortability } from './portability.ts';
import { bareName } from './split-name.ts';
import { tellApart } from './tell-apart.ts';

export type FileToName = {
  /** Relative to the dropped folder, with `/`. */
  path: string;
  parsed: ParsedName;
  /** null where the file could not be read. */
  channels: number | null;
  /** A name given by hand, without extension; wins over `information.names`. */
  handMade?: string;
  /** A role given by hand; wins over `information.roles` and what the name says. */
  role?: FileRole;
};

type Proposals = Map<string, string | null>;

/** Roles whose files keep their own names: they do not lie among the tracks. */
const unnamedRoles: ReadonlySet<FileRole> = new Set([
  'rough-mix',
  'reference',
  'note',
  'leave-out',
]);

function roleOf(file: FileToName, information: Pick<SessionInformation, 'roles'>): FileRole {
  return file.role ?? information.roles[file.path] ?? file.parsed.role;
}

/** Unknown words that half of all files share: a song's or a session's name, not a detail. */
function sharedWords(files: readonly FileToName[]): Set<string> {
  const counts = new Map<string, number>();
  for (const { parsed } of files) {
    const words = parsed.leftovers.filter(({ kind }) => kind === 'unknown');
    for (const word of new Set(words.map(({ text }) => foldName(text)))) {
      counts.set(word, (counts.get(word) ?? 0) + 1);
    }
  }
  const most = Math.max(3, files.length / 2);
  return new Set([...counts].filter(([, count]) => count >= most).map(([word]) => word));
}

/** The name without its running number, for telling parts apart rather than files. */
function withoutNumber(name: string, parsed: ParsedName): string {
  const span = parsed.spans.find(({ kind }) => kind === 'number');
  if (!span) return name;
  return (name.slice(0, span.start) + name.slice(span.end)).replace(/^[ ._-]+|[ ._-]+$/g, '');
}

class NameGiver {
  private readonly taken = new Set<string>();
  private readonly ordinals = new Map<string, number>();

  constructor(private readonly naming: NamingRules) {}

  /** A body stands for a part: no two parts may differ by their number alone. */
  reserve(name: string, body: string): void {
    this.taken.add(clashKey(name));
    this.taken.add(`body ${clashKey(body)}`);
  }

  isFree(name: string, body: string): boolean {
    return !this.taken.has(clashKey(name)) && !this.taken.has(`body ${clashKey(body)}`);
  }

  /** The longest way to write a part that follows the convention, reads back and is free. */
  give(part: Part, number: number | null): string | null {
    for (const shorter of shorterParts(part)) {
      const given = this.tryName(shorter, part, number);
      if (given !== null && given !== 'taken') return given.name;
    }
    return this.giveOrdinal(part, number);
  }

  /** Shortened names can meet, and 808 is no number to everybody: then counting goes on. */
  private giveOrdinal(part: Part, number: number | null): string | null {
    for (const shorter of shorterParts(part)) {
      const uncounted = { ...shorter, number: null, ordinal: null };
      const key = clashKey(composeName(uncounted, this.naming).body);
      for (let ordinal = (this.ordinals.get(key) ?? 0) + 1; ; ordinal++) {
        const given = this.tryName({ ...shorter, ordinal }, part, number);
        if (given === 'taken') continue;
        if (given === null) break;
        this.ordinals.set(key, ordinal);
        return given.name;
      }
    }
    return null;
  }

  private tryName(
    shorter: Part,
    part: Part,
    number: number | null,
  ): { name: string } | 'taken' | null {
    const { name, body } = composeName({ ...shorter, number }, this.naming);
    if ([...name].length > this.naming.maximumLength) return null;
    if (!this.isFree(name, body)) return 'taken';
    if (!this.readsBack(name, part)) return null;
    this.reserve(name, body);
    return { name };
  }

  private readsBack(name: string, part: Part): boolean {
    if (checkPortability(name).length > 0) return false;
    const { parsed, failures } = examineName(name, this.naming);
    return (
      failures.length === 0 && parsed.instrument === part.entry.written && parsed.side === part.side
    );
  }
}

/** Names that already follow the convention, have a part of their own and need not change. */
function namesToKeep(parts: readonly Part[], naming: NamingRules): Map<Part, string> {
  const kept = new Map<Part, string>();
  const numbers = new Set<number>();
  const bodies = new Set<string>();
  for (const part of parts) {
    const { parsed } = part.file;
    const name = bareName(part.file.path);
    // Asked first because it is cheap: most names that are not kept have one of these.
    if (parsed.leftovers.some(({ kind }) => kind !== 'unknown')) continue;
    if (naming.tokens.includes('number') !== (parsed.number !== null)) continue;
    if (parsed.number !== null && numbers.has(parsed.number)) continue;
    if (!explainName(name, naming).ok || checkPortability(name).length > 0) continue;
    const body = clashKey(withoutNumber(name, parsed));
    if (bodies.has(body)) continue;
    bodies.add(body);
    if (parsed.number !== null) numbers.add(parsed.number);
    kept.set(part, name);
  }
  // Where most files have to be renamed, they are numbered anew in the order of the groups.
  const numbered = naming.tokens.includes('number');
  return numbered && kept.size * 2 < parts.length ? new Map<Part, string>() : kept;
}

/** How names that stay write an instrument, so that its other files are called alike. */
function ownWritings(kept: ReadonlyMap<Part, string>): Map<Instrument, string> {
  const writings = new Map<Instrument, string>();
  for (const { entry, file } of kept.keys()) {
    const [span, second] = file.parsed.spans.filter(({ kind }) => kind === 'instrument');
    if (span && !second && !writings.has(entry)) writings.set(entry, span.text);
  }
  return writings;
}

/** The next running number that no name uses yet; after the highest where some are kept. */
function numberSource(naming: NamingRules, used: ReadonlySet<number>, after: number) {
  let last = after;
  return (): number | null => {
    if (!naming.tokens.includes('number')) return null;
    do last++;
    while (used.has(last));
    return last;
  };
}

/**
 * Proper names under a convention for the tracks of one session, without extension, by path. null:
 * no name can be proposed honestly (no instrument recognised, no such group in the table, no room),
 * or none is due (rough mix, references, notes).
 *
 * Names made by hand are kept as they are, and so are names that follow the convention already.
 * No two names are the same on any disk. The order of the files decides only between equals: parts
 * are listed by group, instrument, ordinal, details and side.
 */
export function proposeNames(
  files: readonly FileToName[],
  naming: NamingRules,
  information: Pick<SessionInformation, 'names' | 'roles'>,
): Proposals {
  const proposals: Proposals = new Map(files.map(({ path }) => [path, null]));
  const giver = new NameGiver(naming);
  const usedNumbers = new Set<number>();
  const lexicon = lexiconOf(naming.groups);
  const noise = sharedWords(files);
  const parts: Part[] = [];
  files.forEach((file, index) => {
    const role = roleOf(file, information);
    const byHand = file.handMade ?? information.names[file.path];
    if (byHand !== undefined && byHand !== '') {
      proposals.set(file.path, byHand);
      const parsed = parseName(byHand, naming);
      giver.reserve(byHand, withoutNumber(byHand.normalize('NFC'), parsed));
      if (parsed.number !== null) usedNumbers.add(parsed.number);
      return;
    }
    const part = unnamedRoles.has(role) ? null : partsOf(file, index, naming, lexicon, noise);
    if (part) parts.push(part);
    else if (!unnamedRoles.has(role)) {
      const own = bareName(file.path);
      giver.reserve(own, own);
    }
  });
  parts.sort(compareParts);
  const kept = namesToKeep(parts, naming);
  for (const [part, name] of kept) {
    if (!giver.isFree(name, withoutNumber(name, part.file.parsed))) continue;
    giver.reserve(name, withoutNumber(name, part.file.parsed));
    proposals.set(part.file.path, name);
    if (part.file.parsed.number !== null) usedNumbers.add(part.file.parsed.number);
  }
  const writings = ownWritings(kept);
  const open = parts
    .filter((part) => proposals.get(part.file.path) === null)
    .map((part) => ({ ...part, instrument: writings.get(part.entry) ?? part.instrument }));
  const isFree = (part: Part) => {
    const { body } = composeName({ ...part, number: null }, naming);
    return giver.isFree(body, body);
  };
  const after = kept.size > 0 ? Math.max(0, ...usedNumbers) : 0;
  const nextNumber = numberSource(naming, usedNumbers, after);
  for (const part of tellApart(open, naming, isFree)) {
    const name = giver.give(part, nextNumber());
    const another = name === null && naming.tokens.includes('number');
    proposals.set(part.file.path, another ? giver.give(part, nextNumber()) : name);
  }
  return proposals;
}
