import type { GroupNature } from '../rules/naming-rules.ts';
import type { FileRole } from '../session/session-information.ts';

/** L, R and centre of a spaced pair; M and S of a mid/side pair; stereo where the name says so. */
export const sides = ['L', 'R', 'C', 'M', 'S', 'stereo'] as const;
export type Side = (typeof sides)[number];

/** Why a piece of a name says nothing about the part; `unknown` may still mean something to people. */
export const leftoverKinds = [
  'copy',
  'counter',
  'export-word',
  'version',
  'date',
  'tempo',
  'key',
  'format',
  'artist',
  'title',
  'unknown',
] as const;
export type LeftoverKind = (typeof leftoverKinds)[number];

/** `text` as it stands in the name, at UTF-16 offsets [start, end) of its last path segment. */
export type Leftover = { kind: LeftoverKind; text: string; start: number; end: number };

export type NameSpanKind =
  | 'number'
  | 'group'
  | 'instrument'
  | 'ordinal'
  | 'detail'
  | 'side'
  | 'take'
  | 'role'
  | LeftoverKind;

export type NameSpan = { kind: NameSpanKind; text: string; start: number; end: number };

/** What a file name says, as far as it can be read. Nothing in it comes from the audio. */
export type ParsedName = {
  /** Running number in front of the name (or where the convention has it). */
  number: number | null;
  /** Group of the naming table; null if the instrument is unknown or the table has no such group. */
  groupId: string | null;
  nature: GroupNature | null;
  /** Written form from the vocabulary (`Lead Vocal`) or a word of the table's own; null: unknown. */
  instrument: string | null;
  /** Understood, but not written as anybody should: `Kik`. */
  misspelt: boolean;
  /** Which of several alike: 2 in `Tom 2`. */
  ordinal: number | null;
  /** Written forms in the order of the name; a number behind one belongs to it: `Verse 2`. */
  detail: string[];
  side: Side | null;
  /** Only where a word for take stands before the number. */
  take: number | null;
  /** `_01`, `-02`, `(3)`, `copy 2`: added by programs; tells files apart where nothing else does. */
  counter: number | null;
  role: FileRole;
  leftovers: Leftover[];
  /** Of instrument and role together. `unknown`: neither was recognised. */
  confidence: 'certain' | 'guess' | 'unknown';
  /** Every piece that was understood or left over, in the order of the name. */
  spans: NameSpan[];
};
