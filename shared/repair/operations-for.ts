import type { Finding } from '../findings/finding.ts';
import type { TrackFormat } from '../wave/track-format.ts';
import type { ChosenRepair, Operation } from './repair-plan.ts';

/** A choice and the finding it answers. */
export type Repair = { choice: ChosenRepair; finding: Finding };

/** Length of a fade at the start or end of a file, and of one across an edit: 2 ms to each side. */
const edgeFadeMs = 3;
const crossFadeMs = 4;

/** Far below hearing, yet an offset is gone within a fifth of a second. */
const highPassHz = 5;

/** Room for dither and rounding under the peak a gain aims at: two steps of 16 bits, and more. */
const gainRoomDb = 0.005;

/** What a repair does to the samples of one file, in frames of that file. */
export function operationsFor({ choice, finding }: Repair, format: TrackFormat): Operation[] {
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
      if (typeof byFrames !== 'number' || byFrames === 0) return [];
      // Earlier by all of its length: nothing would be left.
      return byFrames > -format.frames ? [{ kind: 'move', byFrames }] : [];
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

/**
 * Down to the ceiling of the rule, or to 1 dB under full scale where the rule names none; in whole
 * tenths, so that the number can be said.
 */
function gainUnderCeiling({ args }: Finding): number {
  const { peakDbfs, ceilingDbfs } = args;
  if (typeof peakDbfs !== 'number') return 0;
  const target = typeof ceilingDbfs === 'number' ? ceilingDbfs : -1;
  return Math.floor((target - peakDbfs - gainRoomDb) * 10) / 10;
}

function fades(choice: ChosenRepair, finding: Finding, { frames, sampleRateHz }: TrackFormat) {
  const long = (ms: number) =>
    Math.min(Math.floor(frames / 2), Math.round((ms / 1000) * sampleRateHz));
  const window = (
    shape: 'in' | 'out' | 'cross',
    startFrame: number,
    endFrame: number,
  ): Operation => ({
    kind: 'fade',
    shape,
    startFrame,
    endFrame,
    channel: finding.channel,
  });
  if (finding.code === 'starts-on-sound') return [window('in', 0, long(edgeFadeMs))];
  if (finding.code === 'ends-on-sound') return [window('out', frames - long(edgeFadeMs), frames)];
  const places =
    choice.startFrame === undefined
      ? finding.ranges
      : finding.ranges.filter(({ startFrame }) => startFrame === choice.startFrame);
  return places.map(({ startFrame }) => {
    // As long on both sides of the edit: what is mirrored there is the edit itself.
    const half = Math.min(long(crossFadeMs / 2), startFrame, frames - startFrame);
    return window('cross', startFrame - half, startFrame + half);
  });
}
