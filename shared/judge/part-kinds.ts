import type { FileName } from './file-names.ts';

/** The details of a name without the numbers that may stand behind them: `DI` of `DI 2`. */
export function detailWords({ detail }: Pick<FileName, 'detail'>): string[] {
  return detail.map((word) => word.replace(/ \d+$/, ''));
}

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
export function isReturnOrEffect(name: FileName): boolean {
  return name.nature === 'effects' || detailWords(name).some((word) => effectDetails.has(word));
}
