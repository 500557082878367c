import { z } from 'zod';
import { overviewColumns, type Overview } from '../measure/overview.ts';

/*
 * The pictures of a report's files as one run of bytes: a line of JSON that says what follows,
 * a line feed, then for every file and channel its columns as int8 pairs (see overview.ts).
 */

const headSchema = z.strictObject({
  overviews: z.literal(1),
  files: z
    .array(
      z.strictObject({
        path: z.string(),
        framesPerColumn: z.number().int().min(1),
        channels: z.number().int().min(1).max(64),
        columns: z.number().int().min(0).max(overviewColumns),
      }),
    )
    .max(10_000),
});

const lineFeed = 10;

/** Packs overviews for storing, in the order given. */
export function writeOverviews(overviews: ReadonlyMap<string, Overview>): Uint8Array<ArrayBuffer> {
  const files = [...overviews].map(([path, { framesPerColumn, channels }]) => ({
    path,
    framesPerColumn,
    channels: channels.length,
    columns: (channels[0]?.length ?? 0) / 2,
  }));
  const head = new TextEncoder().encode(`${JSON.stringify({ overviews: 1, files })}\n`);
  const parts = [...overviews.values()].flatMap(({ channels }) => channels);
  const bytes = new Uint8Array(parts.reduce((sum, part) => sum + part.length, head.length));
  bytes.set(head);
  let at = head.length;
  for (const part of parts) {
    bytes.set(new Uint8Array(part.buffer, part.byteOffset, part.length), at);
    at += part.length;
  }
  return bytes;
}

/** Reads what writeOverviews wrote; null for anything else, because it comes from outside. */
export function readOverviews(bytes: Uint8Array): Map<string, Overview> | null {
  const end = bytes.indexOf(lineFeed);
  if (end < 0) return null;
  let json: unknown;
  try {
    json = JSON.parse(new TextDecoder().decode(bytes.subarray(0, end)));
  } catch {
    return null;
  }
  const head = headSchema.safeParse(json);
  if (!head.success) return null;
  const overviews = new Map<string, Overview>();
  let at = end + 1;
  for (const { path, framesPerColumn, channels, columns } of head.data.files) {
    const length = columns * 2;
    if (at + length * channels > bytes.length) return null;
    const ofChannels = Array.from({ length: channels }, (_, channel) =>
      Int8Array.from(new Int8Array(bytes.buffer, bytes.byteOffset + at + channel * length, length)),
    );
    overviews.set(path, { framesPerColumn, channels: ofChannels });
    at += length * channels;
  }
  return overviews;
}
