import { nameFiles } from '../judge/file-names.ts';
import { fileNameOf, splitExtension } from '../pack/safe-names.ts';
import type { NamingRules } from '../rules/naming-rules.ts';
import type { SessionInformation } from '../session/session-information.ts';
import type { Draft } from './draft-entries.ts';

/** The word for one side at the end of a name, as people and programs write it. */
const sideWord = /[\s._-]*[([]?\b(l|r|left|right)\b[)\]]?$/i;

/**
 * A name for every draft, without extension: given by hand, else the proposal where a proper name
 * was asked for, else the one the file has. Proposals are made for all drafts together, so that
 * running numbers have no holes after a join or a file that was left out.
 */
export function nameDrafts(
  drafts: readonly Draft[],
  naming: NamingRules,
  information: SessionInformation,
): string[] {
  const paths = drafts.map(pathFor);
  const names: Record<string, string> = {};
  for (const [index, draft] of drafts.entries()) {
    const hand = handName(draft, information);
    if (hand !== null) names[paths[index]!] = hand;
  }
  const named = nameFiles(paths, naming, { ...information, roles: {}, names });
  return drafts.map((draft, index) => {
    const path = paths[index]!;
    const proposed = draft.rename ? named[index]?.proposedName : null;
    return names[path] ?? proposed ?? splitExtension(fileNameOf(path)).base;
  });
}

/** The path a draft would have if it had been dropped like this. */
function pathFor({ from, channelLabel }: Draft): string {
  const [first = ''] = from;
  const fileName = fileNameOf(first);
  const folder = first.slice(0, first.length - fileName.length);
  const { base, extension } = splitExtension(fileName);
  const part = from.length === 2 ? base.replace(sideWord, '') || base : base;
  return folder + (channelLabel === '' ? part : `${part} ${channelLabel}`) + extension;
}

function handName({ from, channelLabel }: Draft, { names }: SessionInformation): string | null {
  const given = from.map((path) => names[path]).find((name) => name !== undefined && name !== '');
  if (given === undefined) return null;
  return channelLabel === '' ? given : `${given} ${channelLabel}`;
}
