import { explainName, type NameExplanation } from '../naming/explain-name.ts';
import { parseName } from '../naming/parse-name.ts';
import type { ParsedName } from '../naming/parsed-name.ts';
import { proposeNames } from '../naming/propose-names.ts';
import type { NamingRules } from '../rules/naming-rules.ts';
import type { SessionInformation } from '../session/session-information.ts';

/** What a file's name says, whether it follows the rules, and what it would be called under them. */
export type FileName = ParsedName & {
  /** The name as dropped, without folder and extension. */
  stem: string;
  explanation: NameExplanation;
  /** Without extension; null where none can be worked out. */
  proposedName: string | null;
};

type FileToName = { path: string; channels: number | null };

/** Sessions whose names are remembered: the one on screen, before and after repairs, and a few. */
const mostRemembered = 8;
const remembered = new Map<string, readonly FileName[]>();

/**
 * Names and roles of all files of a session, in their order. What was set by hand wins. Reading
 * names takes longer than judging all the rest and depends on little, so it is remembered: a rule
 * that is not about names reads none of them again.
 */
export function nameFiles(
  files: readonly FileToName[],
  naming: NamingRules,
  information: SessionInformation,
): readonly FileName[] {
  const { artist, title, roles, names } = information;
  const key = JSON.stringify([files, naming, artist, title, roles, names]);
  const known = remembered.get(key);
  if (known) return known;
  const [oldest] = remembered.keys();
  if (remembered.size >= mostRemembered && oldest !== undefined) remembered.delete(oldest);
  const made = readNames(files, naming, information);
  remembered.set(key, made);
  return made;
}

function readNames(
  files: readonly FileToName[],
  naming: NamingRules,
  information: SessionInformation,
): FileName[] {
  const { artist, title, roles } = information;
  const read = files.map(({ path, channels }) => ({
    path,
    channels,
    parsed: parseName(path, naming, { artist, title }),
  }));
  const proposed = proposeNames(read, naming, information);
  return read.map(({ path, parsed }) => ({
    ...parsed,
    role: roles[path] ?? parsed.role,
    stem: stemOf(path),
    explanation: explainName(stemOf(path), naming),
    proposedName: proposed.get(path) ?? null,
  }));
}

/** A file's name without folders and extension; a leading dot is no extension. */
function stemOf(path: string): string {
  const name = path.slice(path.lastIndexOf('/') + 1);
  const dot = name.lastIndexOf('.');
  return dot > 0 ? name.slice(0, dot) : name;
}
