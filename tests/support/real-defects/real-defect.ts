import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { SessionInformation } from '#shared/session/session-information.ts';
import { songSeconds } from '../good-sessions.ts';
import { recording, sox } from '../real-sounds.ts';

/** A defect made on real sound. */
export type RealDefect = {
  /** Files by their names, added to twenty clean ones unless `alone`. */
  files: () => Promise<Record<string, string>>;
  alone?: true;
  rules?: HouseRules;
  information?: Partial<SessionInformation>;
  /** Everything that is found, as inShort() writes it, in order. */
  found: string[];
};

/** A recording placed in the song like the clean ones, with effects of its own in between. */
export function placed(name: string, effects: readonly string[] = [], channels: 1 | 2 = 1) {
  return sox(
    [recording(name)],
    [
      ...['gain', '-4', 'rate', '48000', 'remix', ...(channels === 1 ? ['1'] : ['1', '2'])],
      ...effects,
      ...inSong,
    ],
  );
}

/** One second of silence, the sound, silence to the common end. */
export const inSong = ['pad', '1', String(songSeconds), 'trim', '0', String(songSeconds)];
