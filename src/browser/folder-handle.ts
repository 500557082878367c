import { AppError } from '#shared/errors.ts';
import { readDrop, type DroppedFile, type DroppedFolder } from './dropped-files.ts';

/** What was dropped or picked, with the folder itself where the browser lets it be read again. */
export type HeldFolder = DroppedFolder & { handle: FileSystemDirectoryHandle | null };

/** Reads a drop and keeps hold of its folder. Must be called in the drop event itself. */
export async function readDropAndHold(transfer: DataTransfer): Promise<HeldFolder> {
  // Both look at the items, which are gone once the event is over.
  const holding = holdFolder(transfer);
  const reading = readDrop(transfer);
  return { ...(await reading), handle: await holding };
}

async function holdFolder(transfer: DataTransfer): Promise<FileSystemDirectoryHandle | null> {
  const items = Array.from(transfer.items).filter(({ kind }) => kind === 'file');
  const [only] = items;
  if (items.length !== 1 || !only?.getAsFileSystemHandle) return null;
  const handle = await only.getAsFileSystemHandle().catch(() => null);
  return handle instanceof FileSystemDirectoryHandle ? handle : null;
}

/** Whether the browser has a folder picker whose folder can be read again later. */
export function hasFolderPicker(): boolean {
  return 'showDirectoryPicker' in window;
}

/**
 * Asks for a folder and reads it; null when the person closed the picker. Must be the first thing
 * a click does. Throws AppError `no-access`.
 */
export async function pickFolder(): Promise<HeldFolder | null> {
  let handle: FileSystemDirectoryHandle;
  try {
    handle = await window.showDirectoryPicker!({ mode: 'read' });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') return null;
    throw cause;
  }
  return readFolder(handle);
}

/**
 * Reads what is in the folder now. Browsers may ask the person once more whether that is allowed,
 * so it begins in a click. Throws AppError `no-access` when it is not, or the folder is gone.
 */
export async function readFolder(handle: FileSystemDirectoryHandle): Promise<HeldFolder> {
  const refused = (reason: string) => new AppError('no-access', { path: handle.name, reason });
  const permission = (await handle.requestPermission?.({ mode: 'read' })) ?? 'granted';
  if (permission !== 'granted') throw refused('NotAllowedError');
  const files: DroppedFile[] = [];
  try {
    await walk(handle, '', files);
  } catch (cause) {
    throw cause instanceof DOMException ? refused(cause.name) : cause;
  }
  return { folderName: handle.name, files, handle };
}

async function walk(
  folder: FileSystemDirectoryHandle,
  parent: string,
  files: DroppedFile[],
): Promise<void> {
  for await (const entry of folder.values()) {
    const path = parent + entry.name;
    if (entry.kind === 'directory') {
      await walk(entry, `${path}/`, files);
      continue;
    }
    const file = await entry.getFile().catch((cause: unknown) => {
      // Gone between the listing and the look at it: it is not in the folder any more.
      if (cause instanceof DOMException && cause.name === 'NotFoundError') return null;
      throw cause;
    });
    if (file) files.push({ path, file });
  }
}
