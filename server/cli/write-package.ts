import { randomBytes } from 'node:crypto';
import { open, realpath, rename, stat, unlink } from 'node:fs/promises';
import { rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { AppError } from '#shared/errors.ts';
import type { Package } from '#shared/pack/pack-entries.ts';

/** Files that must not stay behind when the program is stopped from outside. */
const halfWritten = new Set<string>();

/** Removes what is half written; synchronous, so that it can run while the process ends. */
export function removeHalfWritten(): void {
  for (const path of halfWritten) rmSync(path, { force: true });
  halfWritten.clear();
}

/**
 * Writes the package beside its target under another name and renames it when it is complete and
 * on the disk, so that there is never half a zip under the name somebody asked for. A link is
 * followed; what is no ordinary file (a device, a pipe) is written to directly.
 * Throws AppError `disk-full`, `no-access` and what the package's stream throws.
 */
export async function writePackage(
  target: string,
  pack: Package,
  onBytes: (bytes: number) => void,
  signal: AbortSignal,
): Promise<void> {
  const existing = await stat(target).catch(() => null);
  if (existing && !existing.isFile()) {
    await writeTo(target, 'w', target, pack, onBytes, signal);
    return;
  }
  const place = existing ? await realpath(target) : target;
  const partial = join(dirname(place), `.${randomBytes(6).toString('hex')}.part`);
  halfWritten.add(partial);
  try {
    await writeTo(partial, 'wx', target, pack, onBytes, signal);
    await rename(partial, place).catch((error: unknown) => {
      throw writeProblem(error, target);
    });
  } catch (error) {
    await unlink(partial).catch(() => undefined);
    throw error;
  } finally {
    halfWritten.delete(partial);
  }
}

async function writeTo(
  path: string,
  flags: 'w' | 'wx',
  target: string,
  pack: Package,
  onBytes: (bytes: number) => void,
  signal: AbortSignal,
): Promise<void> {
  const handle = await open(path, flags).catch((error: unknown) => {
    throw writeProblem(error, target);
  });
  try {
    let written = 0;
    for await (const block of pack.stream(signal)) {
      await writeAll(handle, block, target);
      written += block.length;
      onBytes(written);
    }
    // Devices and pipes cannot be synchronised, and need not be.
    await handle.sync().catch((error: unknown) => {
      if ((error as { code?: unknown }).code !== 'EINVAL') throw writeProblem(error, target);
    });
  } finally {
    await handle.close();
  }
}

async function writeAll(
  handle: Awaited<ReturnType<typeof open>>,
  block: Uint8Array,
  target: string,
): Promise<void> {
  for (let at = 0; at < block.length;) {
    const { bytesWritten } = await handle
      .write(block, at, block.length - at)
      .catch((error: unknown) => {
        throw writeProblem(error, target);
      });
    at += bytesWritten;
  }
}

function writeProblem(error: unknown, path: string): unknown {
  const code = (error as { code?: unknown } | null)?.code;
  if (code === 'ENOSPC' || code === 'EDQUOT' || code === 'EFBIG') {
    return new AppError('disk-full', { path });
  }
  return typeof code === 'string' ? new AppError('no-access', { path, reason: code }) : error;
}
