import type { NamingRules } from '../rules/naming-rules.ts';
import type { FileRole, SessionInformation } from '../session/session-information.ts';
import { parseName } from './parse-name.ts';
import type { ParsedName } from './parsed-name.ts';
import { proposeNames } from './propose-names.ts';

export type NamedFile = {
  path: string;
  parsed: ParsedName;
  /** Given by hand, else what the name says. */
  role: FileRole;
  /** Without extension; see proposeNames for null. */
  proposedName: string | null;
};

type NamingFacts = Pick<SessionInformation, 'artist' | 'title' | 'names' | 'roles'>;

/**
 * Reads and names all files of one session, in their order. `channels` is null for a file that
 * could not be read.
 */
export function nameSession(
  files: readonly { path: string; channels: number | null }[],
  naming: NamingRules,
  information: NamingFacts,
): NamedFile[] {
  const read = files.map(({ path, channels }) => {
    const parsed = parseName(path, naming, information);
    return { path, channels, parsed, role: information.roles[path] ?? parsed.role };
  });
  const proposals = proposeNames(read, naming, information);
  return read.map(({ path, parsed, role }) => ({
    path,
    parsed,
    role,
    proposedName: proposals.get(path) ?? null,
  }));
}
