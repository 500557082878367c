import { apart } from '../findings/shared-line.ts';
import type { Finding, RepairKind } from '../findings/finding.ts';
import { operationsFor, type Repair } from './operations-for.ts';
import { inOrder } from './order-operations.ts';
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
  const leftOut = new Map(
    repairs
      .filter(({ choice }) => choice.repair === 'leave-out')
      .flatMap(({ choice, finding }) => leaveOut(choice, finding)),
  );
  const staying = new Map(
    tracks.filter(({ path }) => !leftOut.has(path)).map((track) => [track.path, track]),
  );

  const joined = new Map<string, string[]>();
  for (const { choice, finding } of repairs) {
    const sides = sidesOf(finding);
    if (choice.repair !== 'join' || !canJoin(sides, staying)) continue;
    // A file can be one side of one pair only.
    if (sides.some((path) => joined.has(path))) continue;
    for (const side of sides) joined.set(side, sides);
  }

  const drafts: Draft[] = [];
  for (const track of staying.values()) {
    const sides = joined.get(track.path);
    if (sides && sides[0] !== track.path) continue;
    const sources = (sides ?? [track.path]).map((path) => staying.get(path)!);
    drafts.push(...draftTrack(sources, repairs));
  }
  return { drafts, leftOut: [...leftOut].map(([path, reason]) => ({ path, reason })) };
}

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
function leaveOut(
  choice: ChosenRepair,
  { code, files }: Finding,
): [string, Drafts['leftOut'][number]['reason']][] {
  const named = files.filter((path) => choice.files.includes(path));
  const going = named.length > 1 && named.length === files.length ? named.slice(1) : named;
  const reason = code === 'same-audio' ? 'duplicate' : 'chosen';
  return going.map((path) => [path, reason]);
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

/** Drafts of one track, or of a left and a right one. */
function draftTrack(sources: readonly DraftedTrack[], repairs: readonly Repair[]): Draft[] {
  const track = sources[0]!;
  const mine = repairs.filter(({ finding }) =>
    sources.some(({ path }) => finding.files.includes(path)),
  );
  const isJoin = sources.length === 2;
  const takes = (repair: RepairKind) => mine.some(({ choice }) => choice.repair === repair);
  const operations = sources.flatMap((source, side) =>
    repairs
      .filter(({ finding }) => finding.files.includes(source.path))
      .flatMap((repair) => operationsFor(repair, source.format))
      .map((operation) => (isJoin ? onChannel(operation, side) : operation)),
  );
  const frames = Math.max(...sources.map(({ format }) => format.frames));
  const draft = {
    from: sources.map(({ path }) => path),
    rewriteAsWav: takes('rewrite-container'),
    rename: takes('rename') || isJoin,
  };
  if (takes('split') && track.format.channels > 1) {
    return channelLabels(track).map((channelLabel, channel) => ({
      ...draft,
      operations: inOrder([{ kind: 'take-channel', channel }, ...operations], frames),
      channels: 1,
      channelLabel,
    }));
  }
  const all: Operation[] = isJoin ? [{ kind: 'join' }, ...operations] : operations;
  const isMono = all.some(({ kind }) => kind === 'take-channel');
  return [
    {
      ...draft,
      operations: inOrder(all, frames),
      channels: isJoin ? 2 : isMono ? 1 : track.format.channels,
      channelLabel: '',
    },
  ];
}

/** A fade in a mono file that becomes one side of a stereo file. */
const onChannel = (operation: Operation, channel: number): Operation =>
  operation.kind === 'fade' ? { ...operation, channel } : operation;

/** Speaker positions of WAVE_FORMAT_EXTENSIBLE, in the order of their bits (mmreg.h). */
const speakers = ['L', 'R', 'C', 'LFE', 'Ls', 'Rs'] as const;

function channelLabels({ format, channelMask }: DraftedTrack): string[] {
  const named = speakers.filter((_, bit) => ((channelMask ?? 0) >> bit) & 1);
  const all = named.length === format.channels && (channelMask ?? 0) < 2 ** speakers.length;
  return Array.from({ length: format.channels }, (_, channel) =>
    all ? named[channel]! : String(channel + 1),
  );
}
