import { zipProblemWords } from '#shared/session/zip-problem-words.ts';
import { withoutCommonFolder } from '#shared/session/common-folder.ts';
import { isJunk } from '#shared/session/junk-files.ts';
import type { DroppedFolder } from '../browser/dropped-files.ts';
import type { FileToRead } from '../workers/file-to-read.ts';
import type { SessionWorker } from '../workers/session-link.ts';
import type { IntakeProblem } from './bench-state.ts';

type IntakeList = { folderName: string | null; files: FileToRead[]; problems: IntakeProblem[] };

/** Lists what was dropped: a folder, files, or the inside of a zip. Throws `zip-refused`. */
export async function listIntake(
  dropped: DroppedFolder,
  openWorker: () => Promise<SessionWorker>,
  signal: AbortSignal,
): Promise<IntakeList> {
  const { folderName, files } = dropped;
  const zipFile = zipAlone(dropped);
  if (!zipFile) {
    const listed = files.map(({ path, file }) => ({ path, size: file.size, file }));
    return { folderName, files: listed, problems: [] };
  }
  const worker = await openWorker();
  const zip = await worker.call('listZip', zipFile, { signal });
  const entries = zip.files.map(({ path, size }) => ({
    path,
    size,
    file: zipFile,
    zipPath: path,
  }));
  return {
    folderName: zipFile.name.replace(/\.zip$/i, ''),
    files: withoutCommonFolder(entries, isJunk),
    problems: zip.problems.map(({ path, reason }) => ({ path, reason: zipProblemWords[reason] })),
  };
}

/** The zip, where nothing else was dropped. */
export function zipAlone({ files }: DroppedFolder): File | null {
  const [only] = files;
  return files.length === 1 && only && /\.zip$/i.test(only.path) ? only.file : null;
}

/** Browsers number a download whose name is taken: `song.zip`, `song (1).zip`. */
export function isCopyOf(fileName: string, original: string): boolean {
  const bare = (name: string): string =>
    name
      .normalize('NFC')
      .replace(/\.zip$/i, '')
      .replace(/ ?\(\d+\)$/, '');
  return bare(fileName) === bare(original);
}
