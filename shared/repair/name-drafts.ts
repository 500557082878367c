import { clashKey } from '../naming/fold-name.ts';
import { parseName } from '../naming/parse-name.ts';
import { proposeNames, type FileToName } from '../naming/propose-names.ts';
import { fileNameOf, splitExtension } from '../naming/safe-names.ts';
import type { NamingRules } from '../rules/naming-rules.ts';
import type { SessionInformation } from '../session/session-information.ts';
import type { Draft } from './draft-entries.ts';

/**
 * A name for every draft, without extension: given by hand, else the proposal where a proper name
 * was asked for, else the one the file has. Proposals are made for all drafts together and keep
 * clear of the names that stay.
 */
export function nameDrafts(
  drafts: readonly Draft[],
  naming: NamingRules,
  information: SessionInformation,
): string[] {
  const { artist, title, roles } = information;
  const ownNames = namesToKeep(drafts.map((draft) => pathOf(draft, naming)));
  const files = drafts.map((draft, index): FileToName => {
    // Drafts of one split file would share a path.
    const path = `${index}/${pathOf(draft, naming)}`;
    const hand = handName(draft, information);
    const role = roles[draft.from[0] ?? ''];
    const handMade = hand ?? (draft.rename ? null : ownNames[index]!);
    return {
      path,
      parsed: parseName(pathOf(draft, naming), naming, { artist, title }),
      channels: draft.channels,
      ...(handMade !== null && { handMade }),
      ...(role && { role }),
    };
  });
  const proposed = proposeNames(files, naming, { names: {}, roles: {} });
  return files.map(
    ({ path, handMade }, index) => handMade ?? proposed.get(path) ?? ownNames[index]!,
  );
}

/** Own names; files that only their folders tell apart take the folder's name along. */
function namesToKeep(paths: readonly string[]): string[] {
  const keys = paths.map((path) => clashKey(stemOf(path)));
  return paths.map((path, index) => {
    const alone = keys.indexOf(keys[index]!) === keys.lastIndexOf(keys[index]!);
    const folder = path.split('/').at(-2);
    return alone || !folder ? stemOf(path) : `${folder} ${stemOf(path)}`;
  });
}

const stemOf = (path: string): string => splitExtension(fileNameOf(path)).base;

/** The path a draft would have if it had been dropped like this. */
function pathOf({ from, channelLabel }: Draft, naming: NamingRules): string {
  const [first = ''] = from;
  const fileName = fileNameOf(first);
  const folder = first.slice(0, first.length - fileName.length);
  const { base, extension } = splitExtension(fileName);
  const part = from.length === 2 ? withoutSide(base, naming) : base;
  return folder + (channelLabel === '' ? part : `${part} ${channelLabel}`) + extension;
}

/** `Piano (L)` becomes `Piano`: what is joined has both sides. */
function withoutSide(name: string, naming: NamingRules): string {
  const span = parseName(`${name}.wav`, naming).spans.findLast(({ kind }) => kind === 'side');
  if (!span) return name;
  const before = name.slice(0, span.start).replace(/[\s._([-]+$/, '');
  const after = name.slice(span.end).replace(/^[\s._)\]-]+/, '');
  return [before, after].filter((part) => part !== '').join(' ') || name;
}

function handName({ from, channelLabel }: Draft, { names }: SessionInformation): string | null {
  const given = from.map((path) => names[path]).find((name) => name !== undefined && name !== '');
  if (given === undefined) return null;
  return channelLabel === '' ? given : `${given} ${channelLabel}`;
}
