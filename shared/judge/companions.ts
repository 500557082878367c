import type { ArgumentsOf } from '../findings/catalogue/definitions.ts';
import { found, type CheckedTrack, type TrackCheck } from './check.ts';
import { detailWords } from './part-kinds.ts';

type CompanionCode = 'di-missing' | 'dry-missing' | 'untuned-missing';
export type Companion = {
  code: CompanionCode;
  /** The word that marks the companion in a name, in the vocabulary's written form. */
  word: string;
  /** Groups for which the rules ask for it. */
  groups: readonly string[];
  /** A part that has no such companion by its nature. */
  needsNone: (track: CheckedTrack) => boolean;
};

/**
 * Holds one rule of the kind "beside each of these parts comes another version of it": the clean
 * signal, the dry one, the untuned one. Each part is reported once, at its first file.
 */
export function companionMissing(
  track: CheckedTrack,
  tracks: readonly CheckedTrack[],
  { code, word, groups, needsNone }: Companion,
): ReturnType<TrackCheck> {
  const { groupId, instrument, ordinal } = track.name;
  if (groupId === null || instrument === null || !groups.includes(groupId)) return null;
  if (track.role !== 'track' || needsNone(track)) return null;
  const alike = tracks.filter(
    ({ name, role }) =>
      role === 'track' &&
      name.groupId === groupId &&
      name.instrument === instrument &&
      (name.ordinal === null || ordinal === null || name.ordinal === ordinal),
  );
  if (alike.some(({ name }) => detailWords(name).includes(word))) return null;
  const first = alike.find(({ name }) => name.ordinal === ordinal);
  if (first !== track) return null;
  const part = ordinal === null ? instrument : `${instrument} ${ordinal}`;
  return found(code, { part } satisfies ArgumentsOf<CompanionCode>);
}
