/** File System Access (WICG): not in TypeScript's DOM library. */
interface Window {
  showDirectoryPicker?(options?: {
    mode?: 'read' | 'readwrite';
  }): Promise<FileSystemDirectoryHandle>;
}

interface DataTransferItem {
  /** Only in the drop event itself; null for what is no file. */
  getAsFileSystemHandle?(): Promise<FileSystemHandle | null>;
}

interface FileSystemHandle {
  requestPermission?(options: { mode: 'read' | 'readwrite' }): Promise<PermissionState>;
}
