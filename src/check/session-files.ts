import type { MeasuredFile } from '#shared/session/measured-file.ts';
import type { FileToRead } from '../workers/file-to-read.ts';

/** The same path, length and time of change: the same file, as far as anybody can tell unread. */
export function stampOf({ path, size, file, zipPath }: FileToRead): string {
  return [path, size, file.lastModified, zipPath ?? ''].join('\n');
}

/** Whether reading the same file again would only give the same again. */
export function isTrusted({ reading, measures }: MeasuredFile): boolean {
  const failed = reading.kind === 'unreadable' && reading.reason === 'could-not-be-read';
  return !failed && measures?.changedWhileRead !== true;
}

/** Loose files replace those of the same name, wherever these lie in the folder; others join. */
export function joinFiles(
  before: readonly FileToRead[],
  loose: readonly FileToRead[],
): FileToRead[] {
  const joined = [...before];
  for (const file of loose) {
    const at = joined.findIndex(({ path }) => nameOf(path) === nameOf(file.path));
    if (at < 0) joined.push(file);
    else joined[at] = { ...file, path: joined[at]!.path };
  }
  return joined;
}

/** A folder read again, with the loose files that were dropped beside it and are not older. */
export function joinOlder(
  folder: readonly FileToRead[],
  loose: readonly FileToRead[],
): FileToRead[] {
  const inFolder = new Map(folder.map((file) => [nameOf(file.path), file]));
  return joinFiles(
    folder,
    loose.filter((file) => {
      const twin = inFolder.get(nameOf(file.path));
      return !twin || twin.file.lastModified < file.file.lastModified;
    }),
  );
}

/** What a second reading of a session found: how many files it has, and how many of them it read. */
export type ReadAgain = { files: number; changed: number; gone: number };

/** What is different from the files that were there before. */
export function compareFileLists(
  before: readonly FileToRead[],
  now: readonly FileToRead[],
): ReadAgain {
  const stamps = new Set(before.map(stampOf));
  const paths = new Set(now.map(({ path }) => path));
  return {
    files: now.length,
    changed: now.filter((file) => !stamps.has(stampOf(file))).length,
    gone: before.filter(({ path }) => !paths.has(path)).length,
  };
}

/** "2 of 40 files were new or changed, and 1 is gone." */
export function readAgainWords({ files, changed, gone }: ReadAgain): string {
  const count = (number: number): string => (number === 1 ? '1 file' : `${String(number)} files`);
  const left = gone === 0 ? '' : ` ${count(gone)} ${gone === 1 ? 'is' : 'are'} no longer there.`;
  if (changed === 0) {
    return gone === 0
      ? `Nothing changed: ${count(files)}, the same as before.`
      : `None of the ${count(files)} changed.${left}`;
  }
  const verb = changed === 1 ? 'was' : 'were';
  return `${String(changed)} of ${count(files)} ${verb} new or changed, and only ${changed === 1 ? 'that' : 'those'} ${verb} read again.${left}`;
}

function nameOf(path: string): string {
  return path.slice(path.lastIndexOf('/') + 1).toLowerCase();
}
