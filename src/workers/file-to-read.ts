import type { DroppedFile } from '#shared/bytes/byte-source.ts';
import { openZip, type ZipListing, type ZippedFile } from '#shared/bytes/zip-source.ts';
import { AppError } from '#shared/errors.ts';
import { fileOnDisk, fileSource } from '../browser/file-source.ts';

/**
 * A dropped file as it crosses to a worker. The File is only a handle; for a file inside a
 * dropped zip it is the zip, and `zipPath` names the entry.
 */
export type FileToRead = { path: string; size: number; file: File; zipPath?: string };

/** The zip that was listed last in this thread; a session comes in one zip. */
let lastZip: { key: string; listing: Promise<ZipListing> } | null = null;

/** Lists a zip, once a thread. Throws AppError `zip-refused`. */
export function listZip(file: File): Promise<ZipListing> {
  // Every message brings the File as another object, so it is known by what identifies it.
  const key = `${file.name} ${String(file.size)} ${String(file.lastModified)}`;
  if (lastZip?.key !== key) lastZip = { key, listing: openZip(fileSource(file, file.name)) };
  return lastZip.listing;
}

/**
 * The file as the core reads it. Once it is open, one from a zip carries the checksum that the zip
 * claims for it.
 */
export function droppedFile({ path, size, file, zipPath }: FileToRead): DroppedFile {
  if (zipPath === undefined) return fileOnDisk(path, file);
  const zipped: DroppedFile & Partial<ZippedFile> = {
    path,
    size,
    async open() {
      const { files } = await listZip(file);
      const entry = files.find((candidate) => candidate.path === zipPath);
      if (!entry) throw new AppError('zip-refused', { reason: 'damaged-entry', entry: zipPath });
      zipped.crc32 = entry.crc32;
      return entry.open();
    },
  };
  return zipped;
}
