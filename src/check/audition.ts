/** Auditions never peak above this: -12 dBFS. */
const peakLimit = 10 ** (-12 / 20);

/** They begin this far below and rise over a third of a second, so that nothing jumps out. */
const startGain = 10 ** (-24 / 20);
const riseSeconds = 0.35;
const endFadeSeconds = 0.02;

/**
 * The gain that brings an excerpt under the limit. Never above 1: what is quiet stays quiet.
 * Samples that are no numbers count as silence.
 */
export function auditionGain(channels: readonly Float32Array[]): number {
  let peak = 0;
  for (const channel of channels)
    for (const sample of channel)
      if (Number.isFinite(sample)) peak = Math.max(peak, Math.abs(sample));
  return peak === 0 ? 1 : Math.min(1, peakLimit / peak);
}

let playing: { context: AudioContext; stop: () => void } | null = null;

/** Stops whatever is being listened to. */
export function stopAudition(): void {
  playing?.stop();
  playing = null;
}

/**
 * Plays an excerpt, limited and with soft edges; one at a time. Resolves when it is over or was
 * stopped by another.
 */
export async function audition(
  channels: readonly Float32Array[],
  sampleRateHz: number,
): Promise<void> {
  stopAudition();
  const frames = channels[0]?.length ?? 0;
  if (frames === 0) return;
  const context = new AudioContext();
  const buffer = context.createBuffer(Math.min(2, channels.length), frames, sampleRateHz);
  const gain = auditionGain(channels);
  for (const [index, channel] of channels.slice(0, 2).entries()) {
    buffer.copyToChannel(
      channel.map((sample) => (Number.isFinite(sample) ? sample : 0)),
      index,
    );
  }
  const source = new AudioBufferSourceNode(context, { buffer });
  const level = new GainNode(context, { gain: 0 });
  const now = context.currentTime;
  const end = now + buffer.duration;
  level.gain.setValueAtTime(gain * startGain, now);
  level.gain.exponentialRampToValueAtTime(gain, now + Math.min(riseSeconds, buffer.duration / 2));
  level.gain.setValueAtTime(gain, Math.max(now, end - endFadeSeconds));
  level.gain.linearRampToValueAtTime(0, end);
  source.connect(level).connect(context.destination);
  await new Promise<void>((resolve) => {
    const finish = (): void => {
      void context.close();
      resolve();
    };
    playing = { context, stop: () => source.stop() };
    source.addEventListener('ended', finish);
    source.start();
  });
}
