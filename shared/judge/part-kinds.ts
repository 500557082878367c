import type { FileName } from './file-names.ts';

/** Details that make a file what comes back from an effect, whatever instrument went in. */
const effectDetails: ReadonlySet<string> = new Set([
  'Reverb',
  'Delay',
  'Modulation',
  'FX',
  'Return',
  'Send',
  'Ambience',
  'Noise',
  'Room',
]);

/** A return or an effect: often very quiet, and ringing long. */
export function isReturnOrEffect({ nature, detail }: FileName): boolean {
  return nature === 'effects' || detail.some((word) => effectDetails.has(word));
}
