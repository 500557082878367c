import { applyFades, type Fade } from './apply-fades.ts';
import { sampleChanger, startLevels } from './change-samples.ts';
import type { Operation } from './repair-plan.ts';
import { bytesPerSample, silenceByte, type SampleForm } from './sample-codec.ts';
import { formOf, sourceFrames, type TrackSource } from './source-frames.ts';

/** The audio a planned entry will have, before anything is read. */
export type RenderedAudio = {
  form: SampleForm;
  sampleRateHz: number;
  channels: number;
  frames: number;
  /** Frames of silence in front of the source's first frame; negative: source frames dropped. */
  movedByFrames: number;
  /** Whether samples, not only their places, differ from the source's. */
  samplesChange: boolean;
};

const find = <Kind extends Operation['kind']>(operations: readonly Operation[], kind: Kind) =>
  operations.find((one): one is Extract<Operation, { kind: Kind }> => one.kind === kind);

/** What the operations make of the sources; the first one decides rate and sample form. */
export function describeRender(
  operations: readonly Operation[],
  sources: readonly Pick<TrackSource, 'format'>[],
): RenderedAudio {
  const first = sources[0];
  if (!first) throw new Error('an entry needs a source');
  const join = find(operations, 'join') !== undefined;
  const one = find(operations, 'take-channel') !== undefined;
  const sourceLength = Math.max(...sources.map(({ format }) => format.frames));
  const movedByFrames = find(operations, 'move')?.byFrames ?? 0;
  const moved = Math.max(0, sourceLength + movedByFrames);
  return {
    form: formOf(first),
    sampleRateHz: first.format.sampleRateHz,
    channels: one ? 1 : join ? 2 : first.format.channels,
    frames: Math.max(moved, find(operations, 'pad')?.toFrames ?? 0),
    movedByFrames,
    samplesChange: operations.some(({ kind }) => ['gain', 'high-pass', 'fade'].includes(kind)),
  };
}

/** Silence is given out in pieces of this size. */
const silenceBytes = 1 << 18;

/**
 * The audio of an entry from `fromFrame` (of the output) to its end, block by block, as it stands
 * in a WAV file. In source frames and in this order: channels, high-pass, gain, fades, then
 * silence in front and behind. Throws AppError `file-changed` where a source has become shorter.
 */
export async function* renderFrames(
  operations: readonly Operation[],
  sources: readonly TrackSource[],
  fromFrame: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const audio = describeRender(operations, sources);
  const frameBytes = audio.channels * bytesPerSample(audio.form);
  let at = fromFrame;
  const inFront = Math.min(Math.max(0, audio.movedByFrames - at), audio.frames - at);
  yield* silence(inFront, frameBytes, audio.form, signal);
  at += inFront;
  for await (const block of processed(
    operations,
    sources,
    audio,
    at - audio.movedByFrames,
    signal,
  )) {
    const room = (audio.frames - at) * frameBytes;
    if (room <= 0) break;
    const kept = block.length > room ? block.subarray(0, room) : block;
    at += kept.length / frameBytes;
    yield kept;
  }
  yield* silence(audio.frames - at, frameBytes, audio.form, signal);
}

function* silence(
  frames: number,
  frameBytes: number,
  form: SampleForm,
  signal?: AbortSignal,
): Generator<Uint8Array, void, void> {
  const perBlock = Math.max(1, Math.floor(silenceBytes / frameBytes));
  if (frames <= 0) return;
  const block = new Uint8Array(Math.min(frames, perBlock) * frameBytes).fill(silenceByte(form));
  for (let left = frames; left > 0; left -= perBlock) {
    signal?.throwIfAborted();
    yield block.subarray(0, Math.min(left, perBlock) * frameBytes);
  }
}

/** The sources through channels, high-pass, gain and fades, from a source frame on. */
async function* processed(
  operations: readonly Operation[],
  sources: readonly TrackSource[],
  audio: RenderedAudio,
  fromFrame: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const fades = operations.filter((one): one is Fade => one.kind === 'fade');
  const cutoffHz = find(operations, 'high-pass')?.cutoffHz ?? null;
  const gainDb = find(operations, 'gain')?.gainDb ?? 0;
  const wanted = Math.max(0, fromFrame);
  // A filter needs everything before, a fade the whole of its window.
  const started =
    cutoffHz !== null
      ? 0
      : Math.min(wanted, ...fades.filter((f) => f.endFrame > wanted).map((f) => f.startFrame));

  let blocks = channelFrames(operations, sources, audio, started, signal);
  if (cutoffHz !== null || gainDb !== 0) {
    const { form, channels, sampleRateHz } = audio;
    const start = () => channelFrames(operations, sources, audio, 0, signal);
    const highPass =
      cutoffHz === null
        ? null
        : { cutoffHz, startLevels: await startLevels(start(), form, channels, sampleRateHz) };
    const change = sampleChanger({ gainDb, highPass }, form, channels, sampleRateHz, started);
    blocks = changed(blocks, change);
  }
  if (fades.length > 0) blocks = applyFades(blocks, fades, audio.form, audio.channels, started);

  let skip = (wanted - started) * audio.channels * bytesPerSample(audio.form);
  for await (const block of blocks) {
    if (skip >= block.length) skip -= block.length;
    else {
      yield skip > 0 ? block.subarray(skip) : block;
      skip = 0;
    }
  }
}

async function* changed(
  blocks: AsyncIterable<Uint8Array>,
  change: (bytes: Uint8Array) => void,
): AsyncGenerator<Uint8Array, void, void> {
  for await (const block of blocks) {
    change(block);
    yield block;
  }
}

/** The channels that stay: all of one source, one of it, or two sources side by side. */
async function* channelFrames(
  operations: readonly Operation[],
  sources: readonly TrackSource[],
  audio: RenderedAudio,
  fromFrame: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const first = sources[0]!;
  const one = find(operations, 'take-channel');
  const width = bytesPerSample(audio.form);
  if (one) {
    const { channels } = first.format;
    for await (const block of sourceFrames(first, fromFrame, signal)) {
      yield takeChannel(block, one.channel, channels, width);
    }
    return;
  }
  if (!find(operations, 'join')) {
    yield* sourceFrames(first, fromFrame, signal);
    return;
  }
  yield* joined(sources, audio.form, fromFrame, signal);
}

/** Moves the samples of one channel to the front of the block, over the others. */
function takeChannel(
  block: Uint8Array,
  channel: number,
  channels: number,
  width: number,
): Uint8Array {
  const frames = block.length / (channels * width);
  const step = channels * width;
  for (let to = 0, from = channel * width; to < frames * width; from += step - width) {
    for (const end = to + width; to < end;) block[to++] = block[from++]!;
  }
  return block.subarray(0, frames * width);
}

/** Left and right, taken in step; the shorter one goes on as silence. */
async function* joined(
  sources: readonly TrackSource[],
  form: SampleForm,
  fromFrame: number,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const width = bytesPerSample(form);
  const sides = sources.map((source) => sourceFrames(source, fromFrame, signal));
  const held: Uint8Array[] = sides.map(() => new Uint8Array(0));
  const ended = sides.map(() => false);
  let buffer = new Uint8Array(0);
  try {
    for (;;) {
      for (const [side, stream] of sides.entries()) {
        if (held[side]!.length > 0 || ended[side]) continue;
        const next = await stream.next();
        if (next.done) ended[side] = true;
        else held[side] = next.value;
      }
      const waiting = held.filter((block) => block.length > 0);
      if (waiting.length === 0) return;
      const frames = Math.min(...waiting.map((block) => block.length / width));
      if (buffer.length < 2 * frames * width) buffer = new Uint8Array(2 * frames * width);
      const both = buffer.subarray(0, 2 * frames * width).fill(silenceByte(form));
      for (const [side, block] of held.entries()) {
        if (block.length === 0) continue;
        for (let frame = 0; frame < frames; frame++) {
          for (let i = 0; i < width; i++) {
            both[(2 * frame + side) * width + i] = block[frame * width + i]!;
          }
        }
        held[side] = block.subarray(frames * width);
      }
      yield both;
    }
  } finally {
    await Promise.all(sides.map((stream) => stream.return()));
  }
}
