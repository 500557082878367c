import { decodeChunkText } from './chunk-text.ts';
import type { Marker } from './track-format.ts';

/** More markers than anybody sets in a song; the rest is not shown. */
export const maxMarkers = 2048;

/** One 24-byte point of a `cue ` chunk: id, position, chunk id, chunk start, block start, sample. */
export type CuePoint = { id: number; startFrame: number };

/** The points of a `cue ` chunk (RIFF specification, Microsoft and IBM 1991, "cue-points chunk"). */
export function readCuePoints(cue: Uint8Array): CuePoint[] {
  if (cue.length < 4) return [];
  const view = new DataView(cue.buffer, cue.byteOffset, cue.length);
  const count = Math.min(view.getUint32(0, true), Math.floor((cue.length - 4) / 24), maxMarkers);
  return Array.from({ length: count }, (_, index) => {
    const at = 4 + index * 24;
    // Without a playlist both fields say the same; some writers fill only the first.
    const startFrame = view.getUint32(at + 20, true) || view.getUint32(at + 4, true);
    return { id: view.getUint32(at, true), startFrame };
  });
}

/** The labels of a `LIST` chunk of type `adtl`, by cue id; a label wins over a note. */
export function readCueLabels(list: Uint8Array): Map<number, string> {
  const labels = new Map<number, string>();
  const view = new DataView(list.buffer, list.byteOffset, list.length);
  const type = (at: number) => String.fromCharCode(...list.subarray(at, at + 4));
  if (type(0) !== 'adtl') return labels;
  for (let at = 4; at + 12 <= list.length;) {
    const bytes = view.getUint32(at + 4, true);
    const id = view.getUint32(at + 8, true);
    const text = decodeChunkText(list.subarray(at + 12, Math.max(at + 12, at + 8 + bytes)));
    if (type(at) === 'labl' || (type(at) === 'note' && !labels.has(id))) labels.set(id, text);
    at += 8 + bytes + (bytes % 2);
  }
  return labels;
}

/** Points and labels as markers in the order of time; points beyond the audio are left out. */
export function joinMarkers(
  points: readonly CuePoint[],
  labels: ReadonlyMap<number, string>,
  frames: number,
): Marker[] {
  return points
    .filter(({ startFrame }) => startFrame <= frames)
    .map(({ id, startFrame }) => ({ startFrame, label: labels.get(id) ?? '' }))
    .sort((a, b) => a.startFrame - b.startFrame);
}

/** The markers of an AIFF `MARK` chunk (Apple AIFF 1.3): u16 count, then id, position, name. */
export function readAiffMarkers(mark: Uint8Array, frames: number): Marker[] {
  if (mark.length < 2) return [];
  const view = new DataView(mark.buffer, mark.byteOffset, mark.length);
  const count = Math.min(view.getUint16(0), maxMarkers);
  const markers: Marker[] = [];
  for (let at = 2; markers.length < count && at + 7 <= mark.length;) {
    const nameBytes = view.getUint8(at + 6);
    markers.push({
      startFrame: view.getUint32(at + 2),
      label: decodeChunkText(mark.subarray(at + 7, at + 7 + nameBytes)),
    });
    // A Pascal string: its length byte and its text take an even number of bytes together.
    at += 6 + 1 + nameBytes + ((nameBytes + 1) % 2);
  }
  return markers
    .filter(({ startFrame }) => startFrame <= frames)
    .sort((a, b) => a.startFrame - b.startFrame);
}
