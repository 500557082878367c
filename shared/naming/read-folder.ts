import { chooseHead } from './choose-head.ts';
import type { Instrument, Lexicon } from './lexicon.ts';
import { readWords } from './read-words.ts';

/** What the folders around a file say: an instrument, or one that stands for its whole group. */
export type FolderHint = { instrument: Instrument | null };

const none: FolderHint = { instrument: null };

/** A session has few folders and many files: every folder is read once a lexicon. */
const known = new WeakMap<Lexicon, Map<string, FolderHint>>();
const mostKnown = 1000;

function readFolderName(name: string, lexicon: Lexicon): Instrument | null {
  const { words } = readWords(name.normalize('NFC'), lexicon.tries);
  const strange = words.some((word) => word.meanings.length === 0 && word.digits === null);
  if (strange) return null;
  const head = chooseHead(words, null);
  return head?.sure ? head.instrument : null;
}

/** The nearest folder whose name is an instrument or a group and nothing else. */
export function readFolder(path: string, lexicon: Lexicon): FolderHint {
  const end = path.lastIndexOf('/');
  if (end < 0) return none;
  const folder = path.slice(0, end);
  let hints = known.get(lexicon);
  if (!hints) known.set(lexicon, (hints = new Map<string, FolderHint>()));
  let hint = hints.get(folder);
  if (!hint) {
    const instrument =
      folder
        .split('/')
        .reverse()
        .map((name) => readFolderName(name, lexicon))
        .find((found) => found !== null) ?? null;
    hint = { instrument };
    if (hints.size >= mostKnown) hints.clear();
    hints.set(folder, hint);
  }
  return hint;
}
