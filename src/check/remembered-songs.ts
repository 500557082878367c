import {
  sessionInformationSchema,
  type SessionInformation,
} from '#shared/session/session-information.ts';

/** Songs kept in this browser, the latest first; the oldest make room. */
const storageKey = 'flightcase.songs';
const mostSongs = 40;

type Remembered = { folderName: string; information: SessionInformation };

/** Keeps what was said about the song in this folder, in this browser only. */
export function rememberSong(folderName: string | null, information: SessionInformation): void {
  if (folderName === null) return;
  const others = readSongs().filter((song) => song.folderName !== folderName);
  writeSongs([{ folderName, information }, ...others].slice(0, mostSongs));
}

/** What was said the last time this folder was on the bench. */
export function recallSong(folderName: string | null): SessionInformation | null {
  return readSongs().find((song) => song.folderName === folderName)?.information ?? null;
}

/** Clears what this browser knows of the song. */
export function forgetSong(folderName: string): void {
  writeSongs(readSongs().filter((song) => song.folderName !== folderName));
}

function readSongs(): Remembered[] {
  let stored: unknown;
  try {
    stored = JSON.parse(localStorage.getItem(storageKey) ?? '[]');
  } catch {
    return [];
  }
  if (!Array.isArray(stored)) return [];
  return stored.flatMap((song: Partial<Remembered> | null) => {
    const information = sessionInformationSchema.safeParse(song?.information);
    return typeof song?.folderName === 'string' && information.success
      ? [{ folderName: song.folderName, information: information.data }]
      : [];
  });
}

function writeSongs(songs: readonly Remembered[]): void {
  try {
    localStorage.setItem(storageKey, JSON.stringify(songs));
  } catch {
    // A full or forbidden storage forgets; the check itself does not depend on it.
  }
}
