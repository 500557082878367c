import { apart } from '../findings/shared-line.ts';
import type { Finding } from '../findings/finding.ts';
import type { ChosenRepair, Operation } from './repair-plan.ts';
import type { TrackFormat } from '../wave/track-format.ts';

/** A track on its way to becoming an entry, before it has a name. */
export type Draft = {
  from: string[];
  operations: Operation[];
  rewriteAsWav: boolean;
  /** Of the output. */
  channels: number;
  /** A proper name was asked for. */
  rename: boolean;
  /** Says which channel of a split file this is; empty for all others. */
  channelLabel: string;
};

export type DraftedTrack = { path: string; format: TrackFormat; channelMask: number | null };

export type Drafts = {
  drafts: Draft[];
  leftOut: { path: string; reason: 'chosen' | 'duplicate' }[];
};

/** Length of a fade at the start or end of a file, and of one across an edit: 2 ms to each side. */
const edgeFadeMs = 3;
const crossFadeMs = 4;

/** Far below hearing, yet an offset is gone within a fifth of a second. */
const highPassHz = 5;

/** Room for dither and rounding under the peak a gain aims at, dB. */
const gainStepDb = 0.1;

const operationOrder: readonly Operation['kind'][] = [
  'take-channel',
  'join',
  'high-pass',
  'gain',
  'fade',
  'move',
  'pad',
];

/**
 * What the chosen repairs make of the tracks. A choice whose finding is no longer there changes
 * nothing: whoever chose it has the repair already.
 */
export function draftEntries(
  tracks: readonly DraftedTrack[],
  findings: readonly Finding[],
  chosen: readonly ChosenRepair[],
): Drafts {
  const repairs = chosen.flatMap((choice) =>
    findings
      .flatMap(apart)
      .flatMap((finding) => (answers(choice, finding) ? [{ choice, finding }] : [])),
  );
  const leftOut = repairs
    .filter(({ choice }) => choice.repair === 'leave-out')
    .flatMap(({ choice, finding }) => leaveOut(choice, finding));
  const gone = new Set(leftOut.map(({ path }) => path));
  const staying = new Map(
    tracks.filter(({ path }) => !gone.has(path)).map((track) => [track.path, track]),
  );

  const joins = repairs
    .filter(({ choice }) => choice.repair === 'join')
    .map(({ finding }) => sidesOf(finding))
    .filter((sides) => canJoin(sides, staying));
  const joined = new Map(joins.flatMap((sides) => sides.map((side) => [side, sides] as const)));

  const drafts: Draft[] = [];
  for (const track of staying.values()) {
    const sides = joined.get(track.path);
    if (sides && sides[0] !== track.path) continue;
    const from = sides ?? [track.path];
    const mine = repairs.filter(({ finding }) => finding.files.some((path) => from.includes(path)));
    drafts.push(...draftTrack(track, from, mine));
  }
  return { drafts, leftOut };
}

type Repair = { choice: ChosenRepair; finding: Finding };

/** A choice names the files of one finding, or of many of the same code at once. */
function answers(choice: ChosenRepair, finding: Finding): boolean {
  if (finding.code !== choice.code || !finding.repairs.includes(choice.repair)) return false;
  const among = (some: readonly string[], all: readonly string[]) =>
    some.every((path) => all.includes(path));
  return (
    finding.files.length > 0 &&
    (among(finding.files, choice.files) ||
      (choice.repair === 'leave-out' && among(choice.files, finding.files)))
  );
}

/** The files that were named; of files that are the same, the first stays if all were named. */
function leaveOut(choice: ChosenRepair, { code, files }: Finding): Drafts['leftOut'] {
  const named = files.filter((path) => choice.files.includes(path));
  const going = named.length > 1 && named.length === files.length ? named.slice(1) : named;
  const reason = code === 'same-audio' ? 'duplicate' : 'chosen';
  return going.map((path) => ({ path, reason }));
}

function sidesOf(finding: Finding): string[] {
  const { left, right } = finding.args;
  return typeof left === 'string' && typeof right === 'string' ? [left, right] : finding.files;
}

/** Only what is the same in rate and sample form can stand side by side bit for bit. */
function canJoin(sides: string[], tracks: ReadonlyMap<string, DraftedTrack>): boolean {
  const [left, right] = sides.map((path) => tracks.get(path)?.format);
  return (
    sides.length === 2 &&
    left !== undefined &&
    right !== undefined &&
    left.channels === 1 &&
    right.channels === 1 &&
    left.sampleRateHz === right.sampleRateHz &&
    left.encoding === right.encoding &&
    left.bits === right.bits &&
    left.containerBits === right.containerBits
  );
}

function draftTrack(track: DraftedTrack, from: string[], repairs: readonly Repair[]): Draft[] {
  const operations = repairs.flatMap((repair) => operationsFor(repair, track));
  if (from.length === 2) operations.push({ kind: 'join' });
  const isMono = operations.some(({ kind }) => kind === 'take-channel');
  const draft: Draft = {
    from,
    operations: inOrder(operations, track.format.frames),
    channels: from.length === 2 ? 2 : isMono ? 1 : track.format.channels,
    rewriteAsWav: repairs.some(({ choice }) => choice.repair === 'rewrite-container'),
    rename: repairs.some(({ choice }) => choice.repair === 'rename' || choice.repair === 'join'),
    channelLabel: '',
  };
  if (!repairs.some(({ choice }) => choice.repair === 'split') || track.format.channels < 2) {
    return [draft];
  }
  return channelLabels(track).map((channelLabel, channel) => ({
    ...draft,
    operations: [{ kind: 'take-channel', channel }, ...draft.operations],
    channels: 1,
    channelLabel,
  }));
}

function operationsFor({ choice, finding }: Repair, { format }: DraftedTrack): Operation[] {
  const { args } = finding;
  switch (choice.repair) {
    case 'keep-one-side': {
      const { silentSide, gainDb } = args;
      const right = silentSide === 'left' || (typeof gainDb === 'number' && gainDb > 0);
      return [{ kind: 'take-channel', channel: choice.channel ?? (right ? 1 : 0) }];
    }
    case 'add-silence': {
      const difference = args['differenceFrames'];
      return typeof difference === 'number' && difference < 0
        ? [{ kind: 'pad', toFrames: format.frames - difference }]
        : [];
    }
    case 'move': {
      const byFrames = choice.byFrames ?? args['differenceFrames'];
      return typeof byFrames === 'number' && byFrames !== 0 ? [{ kind: 'move', byFrames }] : [];
    }
    case 'gain': {
      const gainDb = choice.gainDb ?? gainUnderCeiling(finding);
      return gainDb === 0 ? [] : [{ kind: 'gain', gainDb }];
    }
    case 'high-pass':
      return [{ kind: 'high-pass', cutoffHz: highPassHz }];
    case 'fade':
      return fades(choice, finding, format);
    case 'rename':
    case 'rewrite-container':
    case 'split':
    case 'join':
    case 'leave-out':
      return [];
  }
}

/** Down to the ceiling of the rule, or to 1 dB under full scale where the rule names none. */
function gainUnderCeiling({ args }: Finding): number {
  const { peakDbfs, ceilingDbfs } = args;
  if (typeof peakDbfs !== 'number') return 0;
  const target = typeof ceilingDbfs === 'number' ? ceilingDbfs : -1;
  return Math.floor((target - peakDbfs) / gainStepDb) * gainStepDb;
}

function fades(choice: ChosenRepair, finding: Finding, { frames, sampleRateHz }: TrackFormat) {
  const long = (ms: number) => Math.min(frames, Math.round((ms / 1000) * sampleRateHz));
  const window = (
    shape: 'in' | 'out' | 'cross',
    startFrame: number,
    endFrame: number,
  ): Operation => ({
    kind: 'fade',
    shape,
    startFrame: Math.max(0, startFrame),
    endFrame: Math.min(frames, endFrame),
    channel: finding.channel,
  });
  if (finding.code === 'starts-on-sound') return [window('in', 0, long(edgeFadeMs))];
  if (finding.code === 'ends-on-sound') return [window('out', frames - long(edgeFadeMs), frames)];
  const half = long(crossFadeMs / 2);
  const places =
    choice.startFrame === undefined
      ? finding.ranges
      : finding.ranges.filter(({ startFrame }) => startFrame === choice.startFrame);
  return places.map(({ startFrame }) => window('cross', startFrame - half, startFrame + half));
}

/** One operation of a kind (fades: any number that do not overlap), in the order of rendering. */
function inOrder(operations: readonly Operation[], frames: number): Operation[] {
  const kept: Operation[] = [];
  for (const operation of operations) {
    const clash = kept.findIndex((other) => excludes(other, operation));
    if (clash < 0) kept.push(operation);
    else if (operation.kind === 'gain') kept[clash] = quieter(kept[clash]!, operation);
  }
  return kept
    .map((operation) => padded(operation, kept, frames))
    .sort((a, b) => operationOrder.indexOf(a.kind) - operationOrder.indexOf(b.kind));
}

function excludes(a: Operation, b: Operation): boolean {
  if (a.kind !== 'fade' || b.kind !== 'fade') return a.kind === b.kind;
  const sameChannel = a.channel === null || b.channel === null || a.channel === b.channel;
  return sameChannel && a.startFrame < b.endFrame && b.startFrame < a.endFrame;
}

function quieter(a: Operation, b: Operation): Operation {
  return a.kind === 'gain' && b.kind === 'gain' && b.gainDb > a.gainDb ? a : b;
}

/** A moved file has its silence in front already counted in the length it is padded to. */
function padded(operation: Operation, all: readonly Operation[], frames: number): Operation {
  if (operation.kind !== 'pad') return operation;
  const moved = all.find((other) => other.kind === 'move')?.byFrames ?? 0;
  return { kind: 'pad', toFrames: Math.max(operation.toFrames, frames + moved) };
}

/** Speaker positions of WAVE_FORMAT_EXTENSIBLE, in the order of their bits (mmreg.h). */
const speakers = ['L', 'R', 'C', 'LFE', 'Ls', 'Rs'] as const;

function channelLabels({ format, channelMask }: DraftedTrack): string[] {
  const named = speakers.filter((_, bit) => ((channelMask ?? 0) >> bit) & 1);
  const all = named.length === format.channels && (channelMask ?? 0) < 2 ** speakers.length;
  return Array.from({ length: format.channels }, (_, channel) =>
    all ? named[channel]! : String(channel + 1),
  );
}
