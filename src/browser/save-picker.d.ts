/** File System Access (WICG), "showSaveFilePicker": not in TypeScript's DOM library. */
interface Window {
  showSaveFilePicker(options: {
    suggestedName?: string;
    types?: { description: string; accept: Record<string, string[]> }[];
  }): Promise<FileSystemFileHandle>;
}
