import { englishFormat as format } from '../findings/catalogue/format-arguments.ts';
import type { TrackFormat } from '../wave/track-format.ts';
import type { Operation } from './repair-plan.ts';

/** What is done to a file, in a few words: `turned down by 4.3 dB`. `source` is the file it is done to. */
export function describeOperation(operation: Operation, source: TrackFormat): string {
  const seconds = (frames: number) => format.time(frames / source.sampleRateHz, true);
  switch (operation.kind) {
    case 'take-channel':
      return source.channels === 2
        ? `only its ${operation.channel === 0 ? 'left' : 'right'} side, as mono`
        : `channel ${operation.channel + 1} of ${source.channels}`;
    case 'join':
      return 'left and right joined to one stereo file';
    case 'high-pass':
      return `offset taken out (high-pass at ${operation.cutoffHz} Hz)`;
    case 'gain':
      return operation.gainDb < 0
        ? `turned down by ${format.decibels(operation.gainDb)}`
        : `turned up by ${format.decibels(operation.gainDb)}`;
    case 'fade': {
      const ms = ((operation.endFrame - operation.startFrame) / source.sampleRateHz) * 1000;
      const short = `${format.milliseconds(ms)} fade`;
      if (operation.shape === 'in') return `${short} in at its start`;
      if (operation.shape === 'out') return `${short} out at its end`;
      return `${short} across the edit at ${seconds(operation.startFrame)}`;
    }
    case 'move':
      return operation.byFrames > 0
        ? `moved later by ${seconds(operation.byFrames)}`
        : `moved earlier by ${seconds(-operation.byFrames)}`;
    case 'pad':
      return `silence added at its end, to ${seconds(operation.toFrames)}`;
  }
}
