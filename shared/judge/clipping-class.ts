import type { FileName } from './file-names.ts';
import { detailWords } from './part-kinds.ts';

/** How likely clipping belongs to the sound of a part. */
export type ClippingClass = 'never-wanted' | 'often-wanted' | 'came-so' | 'unknown';

/** Strings that a microphone picks up without an amp, whatever group they are listed in. */
const acoustic: ReadonlySet<string> = new Set([
  'Acoustic Guitar',
  'Nylon Guitar',
  'Resonator Guitar',
  'Banjo',
  'Mandolin',
  'Ukulele',
  'Bouzouki',
  'Oud',
  'Sitar',
  'Double Bass',
]);

/** States of a part that are distorted by what they are. */
const distorted: ReadonlySet<string> = new Set(['Amp', 'Crunch', 'Distorted', 'Fuzz', 'Crush']);

/**
 * Voices, acoustic instruments, keys and clean signals are never better for it; drums, amps,
 * synthesisers, effects and whatever is called distorted often are. Loops and samples came the way
 * they are, so there is no recording to go back to (common practice, no source).
 */
export function clippingClass(name: FileName): ClippingClass {
  const details = detailWords(name);
  if (isSample(name)) return 'came-so';
  if (details.some((word) => distorted.has(word))) return 'often-wanted';
  if (details.includes('DI') || isAcoustic(name)) return 'never-wanted';
  switch (name.nature) {
    case 'vocals':
    case 'orchestra':
    case 'keys':
      return 'never-wanted';
    case 'drums':
    case 'percussion':
    case 'bass':
    case 'guitars':
    case 'synths':
    case 'effects':
      return 'often-wanted';
    case null:
      return 'unknown';
  }
}

/** Cut from a record or a library: a loop, a sample, a chop; of drums a break as well. */
function isSample(name: FileName): boolean {
  const words = [name.instrument ?? '', ...detailWords(name)].join(' ');
  const isBeat = name.nature === null || name.nature === 'drums' || name.nature === 'percussion';
  return /\b(Loop|Sample|Chops?)\b/.test(words) || (isBeat && /\bBreak\b/.test(words));
}

export function isAcoustic({ instrument }: Pick<FileName, 'instrument'>): boolean {
  return instrument !== null && acoustic.has(instrument);
}
