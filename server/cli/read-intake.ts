import { realpath, stat } from 'node:fs/promises';
import { basename, relative, resolve, sep } from 'node:path';
import type { DroppedFile } from '#shared/bytes/byte-source.ts';
import { isZip, openZip, type ZipProblemReason } from '#shared/bytes/zip-source.ts';
import { AppError } from '#shared/errors.ts';
import { zipProblemWords } from '#shared/session/zip-problem-words.ts';
import { withoutCommonFolder } from '#shared/session/common-folder.ts';
import { isJunk } from '#shared/session/junk-files.ts';
import { listFolder, openNodeFile, type FolderProblem } from './node-files.ts';

export type Intake = {
  files: DroppedFile[];
  /** What is there and could not be taken in, with a reason. */
  problems: { path: string; reason: string }[];
  /** Real path of the folder or zip. */
  root: string;
  isFolder: boolean;
  /** Path of the rough mix among `files`; null where none was named. */
  roughMix: string | null;
};

const folderReasons: Record<FolderProblem['reason'], string> = {
  'no-access': 'there is no permission to read it',
  symlink: 'a link is not followed',
  'special-file': 'it is no ordinary file',
};

/**
 * Lists what is to be checked. `out` is not part of it: a package that was saved into the folder
 * it comes from is no track.
 * Throws AppError `no-access`, `zip-refused` and `nothing-to-check`.
 */
export async function readIntake(
  target: string,
  roughMix: string | null,
  out: string | null,
  signal: AbortSignal,
): Promise<Intake> {
  const info = await stat(target).catch((error: unknown) => {
    throw noAccess(target, error);
  });
  const root = await realpath(target);
  const intake = info.isDirectory() ? await readFolder(root, out, signal) : await readZip(root);
  if (intake.files.length === 0) throw new AppError('nothing-to-check', { path: target });
  return roughMix === null ? { ...intake, roughMix } : await withRoughMix(intake, roughMix);
}

async function readFolder(
  root: string,
  out: string | null,
  signal: AbortSignal,
): Promise<Omit<Intake, 'roughMix'>> {
  const { files, problems } = await listFolder(root, signal);
  // Only a zip: whatever else lies there under that name must not be written over.
  const own = out?.endsWith('.zip') ? relative(root, resolve(out)).split(sep).join('/') : null;
  return {
    files: files.filter(({ path }) => path !== own),
    problems: problems.map(({ path, reason }) => ({ path, reason: folderReasons[reason] })),
    root,
    isFolder: true,
  };
}

/** Entries that are there and cannot be read: one of them may be a track, so they are checked. */
const closedReasons = new Set<ZipProblemReason>([
  'encrypted',
  'unknown-compression',
  'damaged-entry',
]);

function closedFile({ path }: { path: string }): DroppedFile {
  return { path, size: 0, open: () => Promise.reject(new AppError('no-access', { path })) };
}

/** The zip stays open while its files are used, which is as long as the program runs. */
async function readZip(root: string): Promise<Omit<Intake, 'roughMix'>> {
  const source = await openNodeFile(root);
  if (!(await isZip(source)))
    throw new AppError('zip-refused', { reason: 'not-a-zip', path: root });
  const { files, problems } = await openZip(source);
  const closed = problems.filter(({ reason }) => closedReasons.has(reason)).map(closedFile);
  return {
    files: withoutCommonFolder([...files, ...closed], isJunk),
    problems: problems.map(({ path, reason }) => ({ path, reason: zipProblemWords[reason] })),
    root,
    isFolder: false,
  };
}

/** The rough mix is named by its path in the folder, by its bare name, or lies anywhere else. */
async function withRoughMix(intake: Omit<Intake, 'roughMix'>, named: string): Promise<Intake> {
  const wanted = named.split(sep).join('/').replace(/^\.\//, '');
  const real = await realpath(named).catch(() => null);
  const inside = real && intake.isFolder ? relative(intake.root, real).split(sep).join('/') : null;
  const byName = intake.files.filter(({ path }) => basename(path) === wanted);
  const found =
    intake.files.find(({ path }) => path === wanted || path === inside) ??
    (byName.length === 1 ? byName[0] : undefined);
  if (found) return { ...intake, roughMix: found.path };
  const info = await stat(named).catch((error: unknown) => {
    throw noAccess(named, error);
  });
  if (!info.isFile()) throw new AppError('no-access', { path: named, reason: 'EISDIR' });
  const path = `Rough mix/${basename(named)}`;
  const taken = new Set(intake.files.map((file) => file.path));
  const free = taken.has(path) ? `Rough mix (from outside)/${basename(named)}` : path;
  const file = { path: free, size: info.size, open: () => openNodeFile(resolve(named)) };
  return { ...intake, files: [...intake.files, file], roughMix: free };
}

function noAccess(path: string, error: unknown): AppError {
  const code = (error as { code?: unknown } | null)?.code;
  return new AppError('no-access', { path, reason: typeof code === 'string' ? code : null });
}
