/** A file with its place in the dropped folder: `path` is relative to it, with `/`. */
export type DroppedFile = { path: string; file: File };

/** What a drop or a picker brought: the folder's own name (null for loose files) and its files. */
export type DroppedFolder = { folderName: string | null; files: DroppedFile[] };

/**
 * Reads a drop to the end, folders in folders too. Must be called in the drop event itself: the
 * entries are gone once it returns, so they are taken first and walked afterwards.
 */
export async function readDrop(transfer: DataTransfer): Promise<DroppedFolder> {
  const entries = Array.from(transfer.items)
    .map((item) => (item.kind === 'file' ? item.webkitGetAsEntry() : null))
    .filter((entry) => entry !== null);
  const files: DroppedFile[] = [];
  for (const entry of entries) await walk(entry, '', files);
  return relativeToSingleFolder(
    files,
    entries.length === 1 && entries[0]!.isDirectory ? entries[0]!.name : null,
  );
}

/** What `<input type="file">` gave, with `webkitdirectory` or without. */
export function readPicked(list: FileList): DroppedFolder {
  const files = Array.from(list, (file) => ({ path: file.webkitRelativePath || file.name, file }));
  const tops = new Set(files.map(({ path }) => (path.includes('/') ? path.split('/')[0]! : '')));
  const [only] = tops;
  return relativeToSingleFolder(files, tops.size === 1 && only ? only : null);
}

async function walk(entry: FileSystemEntry, parent: string, files: DroppedFile[]): Promise<void> {
  const path = parent + entry.name;
  if (entry.isDirectory) {
    const reader = (entry as FileSystemDirectoryEntry).createReader();
    // readEntries hands out at most 100 at a time and says it is done with an empty list.
    for (;;) {
      const batch = await new Promise<FileSystemEntry[]>((resolve, reject) =>
        reader.readEntries(resolve, reject),
      );
      if (batch.length === 0) return;
      for (const child of batch) await walk(child, `${path}/`, files);
    }
  }
  const file = await new Promise<File>((resolve, reject) =>
    (entry as FileSystemFileEntry).file(resolve, reject),
  );
  files.push({ path, file });
}

function relativeToSingleFolder(files: DroppedFile[], folderName: string | null): DroppedFolder {
  if (folderName === null) return { folderName, files };
  const prefix = `${folderName}/`;
  return {
    folderName,
    files: files.map(({ path, file }) => ({
      path: path.startsWith(prefix) ? path.slice(prefix.length) : path,
      file,
    })),
  };
}
