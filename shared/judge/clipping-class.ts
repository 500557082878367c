import type { FileName } from './file-names.ts';

/** How likely clipping belongs to the sound of a part. */
export type ClippingClass = 'never-wanted' | 'often-wanted' | 'unknown';

/**
 * Voices, acoustic instruments, keys and clean signals are never better for it; drums, amps,
 * synthesisers and effects often are (common practice, no source).
 */
export function clippingClass({ nature, isAcoustic, isDi }: FileName): ClippingClass {
  if (isDi || isAcoustic) return 'never-wanted';
  switch (nature) {
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
