import type { Operation } from './repair-plan.ts';
import { bytesPerSample, decodeSamples, encodeSamples, type SampleForm } from './sample-codec.ts';

export type Fade = Extract<Operation, { kind: 'fade' }>;

/**
 * Applies short fades to blocks of whole frames that come in order from `fromFrame` on; samples
 * outside the windows keep their bits. A block is held back while a window is still open.
 * Windows must not overlap in one channel, and each is given as [startFrame, endFrame).
 */
export async function* applyFades(
  blocks: AsyncIterable<Uint8Array>,
  fades: readonly Fade[],
  form: SampleForm,
  channels: number,
  fromFrame: number,
): AsyncGenerator<Uint8Array, void, void> {
  const frameBytes = channels * bytesPerSample(form);
  const waiting = [...fades].sort((a, b) => a.startFrame - b.startFrame);
  let held = new Uint8Array(0);
  let heldFrom = fromFrame;
  for await (const block of blocks) {
    const joined = held.length === 0 ? block : joinBytes(held, block);
    const end = heldFrom + joined.length / frameBytes;
    while (waiting[0] && waiting[0].endFrame <= end) {
      const fade = waiting.shift() as Fade;
      if (fade.startFrame >= heldFrom) applyFade(joined, fade, form, channels, heldFrom);
    }
    const open = Math.max(heldFrom, Math.min(end, waiting[0]?.startFrame ?? end));
    const done = (open - heldFrom) * frameBytes;
    held = joined.slice(done);
    heldFrom = open;
    if (done > 0) yield joined.subarray(0, done);
  }
  // A window beyond the end of the audio closes where the audio does.
  if (held.length > 0) yield held;
}

function joinBytes(first: Uint8Array, second: Uint8Array): Uint8Array {
  const both = new Uint8Array(first.length + second.length);
  both.set(first);
  both.set(second, first.length);
  return both;
}

/** Raised cosine: no corner at either end. 0 at `part` 0, 1 at `part` 1. */
const rising = (part: number): number => (1 - Math.cos(Math.PI * part)) / 2;

function applyFade(
  bytes: Uint8Array,
  fade: Fade,
  form: SampleForm,
  channels: number,
  bytesFrom: number,
): void {
  const width = bytesPerSample(form);
  const frames = fade.endFrame - fade.startFrame;
  const at = (fade.startFrame - bytesFrom) * channels * width;
  const window = bytes.subarray(at, at + frames * channels * width);
  const before = new Float64Array(frames * channels);
  decodeSamples(window, form, before);
  const after = before.slice();
  for (let channel = 0; channel < channels; channel++) {
    if (fade.channel !== null && fade.channel !== channel) continue;
    for (let frame = 0; frame < frames; frame++) {
      const i = frame * channels + channel;
      after[i] = faded(fade.shape, before, frame, frames, channel, channels);
    }
  }
  const original = window.slice();
  encodeSamples(after, after.length, form, window);
  // A channel that is left alone keeps its bits, whatever rounding would make of them.
  for (let i = 0; i < after.length; i++) {
    if (fade.channel === null || i % channels === fade.channel) continue;
    window.set(original.subarray(i * width, (i + 1) * width), i * width);
  }
}

/**
 * In and out run from and to exact silence. Across an edit each side goes on as its own mirror
 * image while the other takes over, so the level holds and the jump is gone.
 */
function faded(
  shape: Fade['shape'],
  samples: Float64Array,
  frame: number,
  frames: number,
  channel: number,
  channels: number,
): number {
  const here = samples[frame * channels + channel]!;
  if (shape === 'in') return here * rising(frame / frames);
  if (shape === 'out') return here * rising((frames - 1 - frame) / frames);
  const mirrored = samples[(frames - 1 - frame) * channels + channel]!;
  const weight = rising((frame + 0.5) / frames);
  const isLeft = frame < frames / 2;
  const left = isLeft ? here : mirrored;
  const right = isLeft ? mirrored : here;
  return left * (1 - weight) + right * weight;
}
