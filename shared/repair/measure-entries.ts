import type { DroppedFile } from '../bytes/byte-source.ts';
import { crc32, crc32Hex, cutHeadCrc32, cutTailCrc32, joinCrc32 } from '../bytes/crc32.ts';
import { measureAll, type MeasureAllOptions } from '../session/measure-all.ts';
import type { MeasureFile } from '../session/measure-file.ts';
import type { MeasuredFile } from '../session/measured-file.ts';
import { keepsSamples, renderEntry, type ReadTrack, type RenderedFile } from './render-entry.ts';
import type { PlannedEntry, RepairPlan } from './repair-plan.ts';

/** What a plan's entries are, in its order. */
export type MeasuredEntries = {
  /** `path` is the entry's `to`; length and CRC are those of the packed file. */
  files: MeasuredFile[];
  /** Where the samples that `files` speak of can be read again. */
  sources: DroppedFile[];
};

/** The files of a check, to look them up by path. */
export type DroppedTracks = {
  files: ReadonlyMap<string, DroppedFile>;
  measured: ReadonlyMap<string, MeasuredFile>;
};

export function droppedTracks(
  files: readonly DroppedFile[],
  measured: readonly MeasuredFile[],
): DroppedTracks {
  return {
    files: new Map(files.map((file) => [file.path, file])),
    measured: new Map(measured.map((file) => [file.path, file])),
  };
}

/** The entry as a file of its own; null where its source is no track and travels as it is. */
export async function renderPlanned(
  entry: PlannedEntry,
  dropped: DroppedTracks,
): Promise<RenderedFile | null> {
  const tracks: ReadTrack[] = [];
  for (const path of entry.from) {
    const file = dropped.files.get(path);
    const measured = dropped.measured.get(path);
    if (!file || measured?.reading.kind !== 'track') continue;
    const { reading, measures } = measured;
    tracks.push({ file, reading, crc32: measures?.crc32 ?? null });
  }
  return tracks.length === entry.from.length ? renderEntry(entry, tracks) : null;
}

/**
 * Measures what a plan makes. Only what a repair changes is rendered, once, through the meters;
 * everything else keeps its measures.
 */
export async function measureEntries(
  plan: RepairPlan,
  dropped: DroppedTracks,
  measureFile: MeasureFile,
  options: MeasureAllOptions,
): Promise<MeasuredEntries> {
  const rendered = new Map<PlannedEntry, RenderedFile>();
  for (const entry of plan.entries) {
    options.signal?.throwIfAborted();
    const file = await renderPlanned(entry, dropped);
    if (file) rendered.set(entry, file);
  }
  const changed = plan.entries.flatMap((entry) => {
    const file = rendered.get(entry);
    return file && !keepsSamples(entry) ? [file] : [];
  });
  const measured = new Map(
    (await measureAll(changed, measureFile, options)).map((file) => [file.path, file]),
  );

  const files: MeasuredFile[] = [];
  const sources: DroppedFile[] = [];
  for (const entry of plan.entries) {
    const file = rendered.get(entry);
    const before = dropped.measured.get(entry.from[0] ?? '');
    const source = dropped.files.get(entry.from[0] ?? '');
    if (!before || !source) throw new Error(`${entry.to} comes from no dropped file`);
    const after = measured.get(entry.to);
    files.push(after ?? { ...(await rewrapped(before, file)), path: entry.to });
    sources.push(after && file ? file : { ...source, path: entry.to });
  }
  return { files, sources };
}

/** The measures of a file whose samples stay, with length and CRC of its new surroundings. */
async function rewrapped(
  before: MeasuredFile,
  file: RenderedFile | undefined,
): Promise<MeasuredFile> {
  const { measures, reading } = before;
  if (!file?.envelope || !measures || reading.kind !== 'track') return before;
  const { dataOffset, dataBytes } = reading.layout;
  const source = await file.tracks[0]!.file.open();
  let data: number;
  try {
    // The CRC of the samples alone follows from that of the whole file; they need no second read.
    const afterData = dataOffset + dataBytes;
    const head = await crcOfRange(source, 0, dataOffset);
    const tail = await crcOfRange(source, afterData, source.size - afterData);
    const whole = parseInt(measures.crc32, 16);
    data = cutHeadCrc32(cutTailCrc32(whole, tail, source.size - afterData), head, dataBytes);
  } finally {
    await source.close();
  }
  const { before: head, after: tail } = file.envelope;
  const crc = joinCrc32(joinCrc32(crc32(head), data, dataBytes), crc32(tail), tail.length);
  return {
    ...before,
    bytes: file.size,
    measures: { ...measures, crc32: crc32Hex(crc), fileBytes: file.size },
  };
}

const pieceBytes = 1 << 18;

async function crcOfRange(
  source: { read(offset: number, length: number): Promise<Uint8Array> },
  offset: number,
  bytes: number,
): Promise<number> {
  let crc = 0;
  for (let at = 0; at < bytes; at += pieceBytes) {
    crc = crc32(await source.read(offset + at, Math.min(pieceBytes, bytes - at)), crc);
  }
  return crc;
}
