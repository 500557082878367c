import type { GroupNature, NamingRules } from '../rules/naming-rules.ts';
import type { FileRole, SessionInformation } from '../session/session-information.ts';

/** What the judge needs to know of a file's name. Made from the naming of the whole session. */
export type FileName = {
  /** Without folder and extension. */
  stem: string;
  /** Group id of the naming table; null if no instrument was recognised. */
  group: string | null;
  nature: GroupNature | null;
  /** A clean signal, taken before the amp. */
  isDi: boolean;
  /** Said to be acoustic: an acoustic guitar, not an amp. */
  isAcoustic: boolean;
  /** The instrument as the naming calls it; the same for microphones of one instrument. */
  instrument: string | null;
  /** A proper name under the rules, without extension; null where none can be worked out. */
  proposedName: string | null;
};

/** Names and roles of all files of a session, in their order. Roles set by hand win. */
export function nameFiles(
  paths: readonly string[],
  _rules: NamingRules,
  information: SessionInformation,
): { name: FileName; role: FileRole }[] {
  return paths.map((path) => ({
    role: information.roles[path] ?? 'track',
    name: {
      stem: stemOf(path),
      group: null,
      nature: null,
      isDi: false,
      isAcoustic: false,
      instrument: null,
      proposedName: null,
    },
  }));
}

/** A file's name without folders and extension; a leading dot is no extension. */
function stemOf(path: string): string {
  const name = path.slice(path.lastIndexOf('/') + 1);
  const dot = name.lastIndexOf('.');
  return dot > 0 ? name.slice(0, dot) : name;
}
