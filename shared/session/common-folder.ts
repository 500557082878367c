/**
 * A zip of a folder has that folder's name in front of every path; what was dropped is then the
 * folder. Paths lose the one folder that all of them lie in; junk beside it does not count.
 */
export function withoutCommonFolder<File extends { path: string }>(
  files: readonly File[],
  isJunk: (path: string) => boolean,
): File[] {
  const telling = files.filter(({ path }) => !isJunk(path));
  const first = telling[0]?.path ?? '';
  const folder = first.slice(0, first.indexOf('/') + 1);
  if (folder === '' || !telling.every(({ path }) => path.startsWith(folder))) return [...files];
  return files.map((file) =>
    file.path.startsWith(folder) ? { ...file, path: file.path.slice(folder.length) } : file,
  );
}
