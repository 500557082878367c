import type { BoundedReader } from '../bytes/bounded-reader.ts';
import { readTimeReference } from './read-bext.ts';
import { maxIxmlBytes, readIxml } from './read-ixml.ts';
import { joinMarkers, maxMarkers, readCueLabels, readCuePoints } from './read-markers.ts';
import type { ChunkPlace, Marker } from './track-format.ts';
import { chunkContents } from './walk-chunks.ts';

const maxListBytes = 512 * 1024;

export type RiffMetadata = {
  timeReferenceFrames: number | null;
  trackName: string | null;
  markers: Marker[];
};

/**
 * What the chunks around the audio say about it. bext is asked for the time first: it is the
 * published standard, iXML repeats it. Damaged metadata is as good as none.
 */
export async function readRiffMetadata(
  reader: BoundedReader,
  chunks: readonly ChunkPlace[],
  audio: { sampleRateHz: number; frames: number },
): Promise<RiffMetadata> {
  const contents = (id: string, limit: number) => chunkContents(reader, chunks, id, limit);

  const bext = await contents('bext', 602);
  const ixmlBytes = await contents('iXML', maxIxmlBytes);
  const ixml = ixmlBytes ? readIxml(ixmlBytes, audio.sampleRateHz) : null;
  const cue = await contents('cue ', 4 + maxMarkers * 24);
  const labels = new Map<number, string>();
  // Several LIST chunks are usual; only one of type adtl is looked for, among the first few.
  for (const list of cue ? chunks.filter(({ id }) => id === 'LIST').slice(0, 8) : []) {
    const bytes = await reader.readUpTo(list.contentOffset, list.contentBytes, maxListBytes);
    for (const [id, label] of readCueLabels(bytes)) labels.set(id, label);
  }
  return {
    timeReferenceFrames: (bext && readTimeReference(bext)) ?? ixml?.timeReferenceFrames ?? null,
    trackName: ixml?.trackName ?? null,
    markers: cue ? joinMarkers(readCuePoints(cue), labels, audio.frames) : [],
  };
}
