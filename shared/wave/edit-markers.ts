import { writeList } from './edit-lists.ts';
import { maxMarkers } from './read-markers.ts';
import type { Marker } from './track-format.ts';
import type { ChunkChange } from './travelling-chunks.ts';
import { ascii, joinBytes, uint32, type Chunk } from './write-wave-header.ts';

const cueBytes = 24;
const loopBytes = 24;

/** Where a frame of the source stands in the output; null where it is cut off. */
function movedFrame(frame: number, change: ChunkChange): number | null {
  if (!change.audioChanged) return frame;
  const moved = frame + change.moveByFrames;
  return moved >= 0 && moved <= Math.min(change.frames, 0xffffffff) ? moved : null;
}

/** Ids of the cue points that lie outside the audio after the change. */
export function findDroppedCues(cue: Uint8Array, change: ChunkChange): Set<number> {
  const dropped = new Set<number>();
  for (const { id, frame } of cuePoints(cue)) {
    if (movedFrame(frame, change) === null) dropped.add(id);
  }
  return dropped;
}

/** A `cue ` chunk moved with the audio; null where no point is left. */
export function editCue(cue: Uint8Array, change: ChunkChange): Uint8Array | null {
  const points: Uint8Array[] = [];
  for (const { at, frame } of cuePoints(cue)) {
    const moved = movedFrame(frame, change);
    if (moved === null) continue;
    const point = new Uint8Array(cue.subarray(at, at + cueBytes));
    const view = new DataView(point.buffer);
    if (moved !== frame) {
      view.setUint32(4, moved, true);
      view.setUint32(20, moved, true);
    }
    points.push(point);
  }
  return points.length === 0 ? null : joinBytes([uint32(points.length), ...points]);
}

/** A sampler's loops (`smpl`: 36 bytes, then 24 a loop) moved with the audio. */
export function editSmpl(smpl: Uint8Array, change: ChunkChange): Uint8Array | null {
  if (smpl.length < 36) return null;
  const view = new DataView(smpl.buffer, smpl.byteOffset, smpl.length);
  const count = Math.min(view.getUint32(28, true), Math.floor((smpl.length - 36) / loopBytes));
  const loops: Uint8Array[] = [];
  for (let i = 0; i < count; i++) {
    const at = 36 + i * loopBytes;
    const startFrame = movedFrame(view.getUint32(at + 8, true), change);
    const endFrame = movedFrame(view.getUint32(at + 12, true), change);
    if (startFrame === null || endFrame === null) continue;
    const loop = new Uint8Array(smpl.subarray(at, at + loopBytes));
    new DataView(loop.buffer).setUint32(8, startFrame, true);
    new DataView(loop.buffer).setUint32(12, endFrame, true);
    loops.push(loop);
  }
  const head = new Uint8Array(smpl.subarray(0, 36));
  new DataView(head.buffer).setUint32(28, loops.length, true);
  return joinBytes([head, ...loops, smpl.subarray(36 + count * loopBytes)]);
}

/** Markers written from nothing, for a source that kept them in another form. */
export function writeMarkers(markers: readonly Marker[], change: ChunkChange): Chunk[] {
  const points: Uint8Array[] = [];
  const labels: Chunk[] = [];
  for (const { startFrame, label } of markers) {
    const frame = movedFrame(startFrame, change);
    if (frame === null) continue;
    const id = uint32(points.length + 1);
    points.push(joinBytes([id, uint32(frame), ascii('data'), uint32(0), uint32(0), uint32(frame)]));
    const text = new TextEncoder().encode(`${label}\0`);
    labels.push({ id: 'labl', bytes: joinBytes([id, text]) });
  }
  if (points.length === 0) return [];
  return [
    { id: 'cue ', bytes: joinBytes([uint32(points.length), ...points]) },
    { id: 'LIST', bytes: writeList('adtl', labels) },
  ];
}

function* cuePoints(cue: Uint8Array): Generator<{ at: number; id: number; frame: number }> {
  if (cue.length < 4) return;
  const view = new DataView(cue.buffer, cue.byteOffset, cue.length);
  const fitting = Math.floor((cue.length - 4) / cueBytes);
  const count = Math.min(view.getUint32(0, true), fitting, maxMarkers);
  for (let i = 0; i < count; i++) {
    const at = 4 + i * cueBytes;
    // As in reading: some writers fill only the first of the two.
    const frame = view.getUint32(at + 20, true) || view.getUint32(at + 4, true);
    yield { at, id: view.getUint32(at, true), frame };
  }
}
