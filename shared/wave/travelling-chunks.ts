import { editBext } from './edit-bext.ts';
import { editIxml } from './edit-ixml.ts';
import { editList } from './edit-lists.ts';
import { editCue, editSmpl } from './edit-markers.ts';
import { tellsPersonalBytes } from './personal-text.ts';

/** What happens to the audio a chunk speaks about. */
export type ChunkChange = {
  /** Any sample differs from the source, or there are more or fewer of them. */
  audioChanged: boolean;
  channelsChanged: boolean;
  /** Silence in front (positive) or frames dropped from the front (negative). */
  moveByFrames: number;
  /** Frames of the output. */
  frames: number;
  /** Frames since midnight the output begins at; null where the source's time stands, or has none. */
  timeReferenceFrames: number | null;
  /** The rate that time is counted at. */
  sampleRateHz: number;
  /** Cue points that are cut off, by id: their labels go with them. */
  droppedCues: ReadonlySet<number>;
};

/** Answers the contents that travel, or null where the chunk stays behind. */
type Treatment = (bytes: Uint8Array, change: ChunkChange) => Uint8Array | null;

const keep: Treatment = (bytes) => bytes;
const leave: Treatment = () => null;
/** Room a writer reserved; what programs leave in it is nobody's business. */
const blank: Treatment = (bytes) =>
  bytes.some((byte) => byte !== 0) ? new Uint8Array(bytes.length) : bytes;
/** Says something about the samples that is wrong once they change. */
const unlessChanged: Treatment = (bytes, change) => (change.audioChanged ? null : bytes);
const unlessMoved: Treatment = (bytes, change) => (change.moveByFrames === 0 ? bytes : null);
const unlessPersonal: Treatment = (bytes) => (tellsPersonalBytes(bytes) ? null : bytes);
/** Nobody can correct what nobody understands, so it stays only beside untouched audio. */
const unknown: Treatment = (bytes, change) =>
  change.audioChanged || tellsPersonalBytes(bytes) ? null : bytes;

/**
 * Which metadata travels with a track, and why.
 *
 * | chunk | travels | why |
 * |---|---|---|
 * | bext | corrected | the time stamp lines files up; names and paths in it go |
 * | iXML | corrected | track names and time; names, places and paths in it go |
 * | cue, LIST adtl, smpl | moved | markers and loops belong to the music |
 * | LIST INFO | without people | title, date and comment help, the names of people do not |
 * | plst | unless moved | it counts in frames that no longer fit |
 * | inst, acid, strc, DISP, axml, chna | as they are | pitch, tempo, loop and channel descriptions |
 * | PEAK, levl | unless the audio changes | peak values and drawings of the old samples |
 * | r64m | unless moved | 64-bit markers of RF64, rarely written |
 * | JUNK, junk, PAD, FLLR | emptied | room for a larger header, often full of old memory |
 * | cart, id3, ID3, _PMX, aXML | never | made for broadcast and listeners: people, pictures, histories |
 * | link, qlty | never | names of other files, names of operators |
 * | anything else | beside untouched audio | kept if no path and no address is in it |
 */
const treatments: Readonly<Record<string, Treatment>> = {
  bext: editBext,
  iXML: editIxml,
  LIST: editList,
  'cue ': editCue,
  smpl: editSmpl,
  plst: unlessMoved,
  inst: keep,
  acid: keep,
  strc: unlessPersonal,
  DISP: unlessPersonal,
  axml: unlessPersonal,
  chna: keep,
  PEAK: unlessChanged,
  levl: unlessChanged,
  r64m: unlessMoved,
  JUNK: blank,
  junk: blank,
  'PAD ': blank,
  FLLR: blank,
  cart: leave,
  'id3 ': leave,
  'ID3 ': leave,
  _PMX: leave,
  aXML: leave,
  link: leave,
  qlty: leave,
};

/** The contents of a metadata chunk as they travel; the same array where nothing is to be done. */
export function travellingContents(
  id: string,
  bytes: Uint8Array,
  change: ChunkChange,
): Uint8Array | null {
  const treat = Object.hasOwn(treatments, id) ? treatments[id]! : unknown;
  const edited = treat(bytes, change);
  return edited !== null && sameBytes(edited, bytes) ? bytes : edited;
}

function sameBytes(a: Uint8Array, b: Uint8Array): boolean {
  return a === b || (a.length === b.length && a.every((byte, index) => byte === b[index]));
}
