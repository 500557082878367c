import type { MeasuredFile } from '#shared/session/measured-file.ts';
import type { FileToRead } from './file-to-read.ts';

export type MeasureInput = FileToRead;
export type MeasureOutput = MeasuredFile;

/** What a measuring worker does: load the engine once, then one file at a time. */
export type MeasureApi = {
  load: { input: WebAssembly.Module; progress: never; output: null };
  /** Progress is bytes read so far. */
  measure: { input: MeasureInput; progress: number; output: MeasureOutput };
};
