import type { Dirent } from 'node:fs';
import { open, readdir, realpath, stat } from 'node:fs/promises';
import { Buffer } from 'node:buffer';
import type { DroppedFile, OpenByteSource } from '#shared/bytes/byte-source.ts';
import { AppError } from '#shared/errors.ts';

/** Large enough that reading costs little, small enough that memory stays flat. */
const streamBlockBytes = 1 << 20;

/** A path whose bytes are no UTF-8 can only be opened by those bytes. */
type SystemPath = string | Buffer;

/**
 * A ByteSource over a file handle. Close it when done.
 * Throws AppError `no-access` when the file cannot be opened or is not a regular file.
 */
export async function openNodeFile(path: SystemPath): Promise<OpenByteSource> {
  const failed = (error: unknown) =>
    new AppError('no-access', { path: path.toString(), reason: systemCode(error) });
  const handle = await open(path, 'r').catch((error: unknown) => {
    throw failed(error);
  });
  const closeAndFail = async (error: unknown) => {
    await handle.close();
    throw failed(error);
  };
  const info = await handle.stat().catch(closeAndFail);
  if (!info.isFile()) return closeAndFail({ code: 'EISDIR' });

  /** Fills the buffer from `offset`; fewer bytes only at the end of the file. */
  async function fill(buffer: Uint8Array, offset: number): Promise<number> {
    let filled = 0;
    while (filled < buffer.length) {
      const { bytesRead } = await handle
        .read(buffer, filled, buffer.length - filled, offset + filled)
        .catch((error: unknown) => {
          throw failed(error);
        });
      if (bytesRead === 0) break;
      filled += bytesRead;
    }
    return filled;
  }

  return {
    size: info.size,
    async read(offset, length) {
      const buffer = new Uint8Array(Math.max(0, Math.min(length, info.size - offset)));
      return buffer.subarray(0, await fill(buffer, offset));
    },
    async *stream(offset, signal) {
      // Two buffers in turn: the next block is read while the last one is being measured.
      const buffers = [new Uint8Array(streamBlockBytes), new Uint8Array(streamBlockBytes)];
      let at = offset;
      let turn = 0;
      let next = fill(buffers[0]!, at);
      try {
        for (;;) {
          const filled = await next;
          signal?.throwIfAborted();
          if (filled === 0) return;
          const block = buffers[turn]!.subarray(0, filled);
          at += filled;
          turn = 1 - turn;
          next = filled < streamBlockBytes ? Promise.resolve(0) : fill(buffers[turn]!, at);
          yield block;
        }
      } finally {
        // A reader that stops early leaves a read on its way: nobody else will look at it.
        await next.catch(() => 0);
      }
    },
    close: () => handle.close(),
  };
}

/** Something in a folder that is not offered as a file, and why. */
export type FolderProblem = { path: string; reason: 'no-access' | 'symlink' | 'special-file' };

export type FolderListing = { files: DroppedFile[]; problems: FolderProblem[] };

/**
 * All regular files below a folder, sorted by path. Links are named but not followed (a loop of
 * links would never end, and what lies elsewhere was not dropped); the folder itself may be a
 * link. One folder that cannot be opened does not stop the others.
 * Throws AppError `no-access` when the folder itself cannot be listed.
 */
export async function listFolder(root: string, signal?: AbortSignal): Promise<FolderListing> {
  const files: DroppedFile[] = [];
  const problems: FolderProblem[] = [];
  const top = await realpath(root).catch((error: unknown) => {
    throw new AppError('no-access', { path: root, reason: systemCode(error) });
  });

  async function walk(folder: Buffer, prefix: string): Promise<void> {
    signal?.throwIfAborted();
    const entries = await readdir(folder, { withFileTypes: true, encoding: 'buffer' });
    for (const entry of entries as unknown as Dirent<Buffer>[]) {
      const path = prefix + entry.name.toString('utf8');
      const place = Buffer.concat([folder, Buffer.from('/'), entry.name]);
      if (entry.isSymbolicLink()) problems.push({ path, reason: 'symlink' });
      else if (entry.isDirectory()) {
        await walk(place, `${path}/`).catch((error: unknown) => {
          if (systemCode(error) === null) throw error;
          problems.push({ path, reason: 'no-access' });
        });
      } else if (entry.isFile()) {
        const size = await stat(place).then(
          (info) => info.size,
          () => null,
        );
        if (size === null) problems.push({ path, reason: 'no-access' });
        else files.push({ path, size, open: () => openNodeFile(place) });
      } else problems.push({ path, reason: 'special-file' });
    }
  }

  await walk(Buffer.from(top), '').catch((error: unknown) => {
    if (systemCode(error) === null) throw error;
    throw new AppError('no-access', { path: root, reason: systemCode(error) });
  });
  const byPath = (a: { path: string }, b: { path: string }) =>
    a.path < b.path ? -1 : a.path > b.path ? 1 : 0;
  return { files: files.sort(byPath), problems: problems.sort(byPath) };
}

/** The system's own code (ENOENT, EACCES ...), null for anything else. */
function systemCode(error: unknown): string | null {
  const code = (error as { code?: unknown } | null)?.code;
  return typeof code === 'string' && /^E[A-Z0-9]+$/.test(code) ? code : null;
}
