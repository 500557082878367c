import { bytesSource } from '#shared/bytes/byte-source.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import type { WaveReading } from '#shared/wave/track-format.ts';

export type TrackReading = Extract<WaveReading, { kind: 'track' }>;

export function readBytes(bytes: Uint8Array, name = 'track.wav'): Promise<WaveReading> {
  return readWave(bytesSource(bytes), name);
}

/** The reading of bytes that must be a track; fails with what was said instead. */
export async function readTrack(bytes: Uint8Array, name = 'track.wav'): Promise<TrackReading> {
  const reading = await readBytes(bytes, name);
  if (reading.kind !== 'track') throw new Error(`not a track: ${JSON.stringify(reading)}`);
  return reading;
}
