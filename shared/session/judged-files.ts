import type { JudgedFile, JudgedReading } from '../judge/judged-session.ts';
import type { WaveReading } from '../wave/track-format.ts';
import type { MeasuredFile } from './measured-file.ts';

/** Measured files as the judge takes them: without where things lie in the file, and pictures. */
export function judgedFiles(files: readonly MeasuredFile[]): JudgedFile[] {
  return files.map(({ path, bytes, reading, measures }) => ({
    path,
    bytes,
    reading: judgedReading(reading),
    format: reading.kind === 'track' ? reading.format : null,
    measures,
  }));
}

function judgedReading(reading: WaveReading): JudgedReading {
  if (reading.kind !== 'track') return reading;
  const { promisedDataBytes, bytesPerFrame } = reading.layout;
  return {
    kind: 'track',
    promisedFrames:
      promisedDataBytes === null ? null : Math.floor(promisedDataBytes / bytesPerFrame),
  };
}
