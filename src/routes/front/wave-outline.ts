import type { IllustratedStrip } from './illustrated-set.ts';

/** The same small noise for the same strip, so that the picture never changes. */
function seededNoise(seed: number): () => number {
  let state = seed * 2654435761;
  return () => {
    state = (state ^ (state << 13)) >>> 0;
    state = (state ^ (state >>> 17)) >>> 0;
    state = (state ^ (state << 5)) >>> 0;
    return state / 4294967296;
  };
}

const columns = 560;
const hitsPerSong = 36;

/** How loud the strip is at `at` (0 to 1 of the song), 0 to 1. */
function loudnessAt(wave: IllustratedStrip['wave'], at: number, noise: number): number {
  switch (wave) {
    case 'hits': {
      const phase = (at * hitsPerSong) % 1;
      return (
        Math.min(1, phase / 0.04) * (0.16 + 0.74 * Math.exp(-4.2 * phase)) * (0.85 + 0.3 * noise)
      );
    }
    case 'steady':
      return (
        (0.4 + 0.14 * Math.sin(at * 61) + 0.1 * Math.sin(at * 347)) *
        (0.62 + 0.66 * noise) *
        (at < 0.5 ? 0.9 : 1.1)
      );
    case 'phrases':
      return (0.22 + 0.42 * Math.abs(Math.sin(at * 113))) * (0.55 + 0.6 * noise);
    case 'none':
      return 0;
  }
}

/** Sound rises and falls at the ends of a span instead of being cut. */
function edge(at: number, [from, to]: readonly [number, number]): number {
  const ease = 0.008;
  return Math.max(0, Math.min(1, (at - from) / ease, (to - at) / ease));
}

/** SVG path of a strip's outline in a box of 1000 × 40, mirrored about the middle. */
export function waveOutline(strip: IllustratedStrip, seed: number): string {
  const noise = seededNoise(seed + 7);
  const end = strip.endsAt ?? 1;
  const upper: string[] = [];
  const lower: string[] = [];
  for (let column = 0; column <= columns; column += 1) {
    const at = column / columns;
    const span = strip.spans.find(([from, to]) => at >= from && at <= to);
    const share = noise();
    const gain = span === undefined || at > end ? 0 : edge(at, [span[0], Math.min(span[1], end)]);
    const half = 0.35 + 18 * gain * loudnessAt(strip.wave, at, share);
    if (at > end) continue;
    const x = (at * 1000).toFixed(1);
    upper.push(`${x} ${(20 - half).toFixed(1)}`);
    lower.push(`${x} ${(20 + half).toFixed(1)}`);
  }
  return `M${upper.join('L')}L${lower.reverse().join('L')}Z`;
}
