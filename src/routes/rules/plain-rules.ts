import type { HouseRules } from '#shared/rules/house-rules.ts';

export type PlainRule = {
  what: string;
  /** What to do, a sentence. */
  how: string;
  /** What it is good for, or the engineer's own why. */
  why?: string | undefined;
};

const list = new Intl.ListFormat('en-GB', { type: 'disjunction' });
const listAll = new Intl.ListFormat('en-GB', { type: 'conjunction' });

/** 44100 becomes "44.1 kHz". */
export function rateWords(rateHz: number): string {
  return `${String(rateHz / 1000)} kHz`;
}

/** Labels of the groups a rule names, in the order of the table. */
function groupWords(rules: HouseRules, ids: readonly string[]): string {
  const labels = rules.names.groups
    .filter((group) => ids.includes(group.id))
    .map((group) => group.label.toLowerCase());
  return listAll.format(labels);
}

/** Format, start, length and level, as things to do while exporting. */
export function exportRules(rules: HouseRules): PlainRule[] {
  const { sampleRatesHz, minimumBits } = rules.format;
  const toleranceFrames = rules.startAndLength.lengthToleranceFrames;
  return [
    {
      what: 'File type',
      how: 'WAV.',
      why: 'MP3 and its kin have lost sound that no mix brings back.',
    },
    {
      what: 'Sample rate',
      how:
        sampleRatesHz.length === 0
          ? 'The rate of your session, the same for every file.'
          : `${list.format(sampleRatesHz.map(rateWords))}.`,
      why:
        rules.levels['sample-rate-not-allowed']?.why ??
        'Never convert a file to another rate: say so, or export it again.',
    },
    {
      what: 'Bit depth',
      how: `${String(minimumBits)} bit or more.`,
      why: rules.levels['bit-depth-low']?.why,
    },
    {
      what: 'Start',
      how: 'Every file from the same start, even if a part comes in late.',
      why:
        rules.levels['not-consolidated']?.why ??
        'Then the whole set drops into a session and lines up.',
    },
    {
      what: 'Length',
      how:
        toleranceFrames === 0
          ? 'Every file equally long; let the last tail ring out.'
          : `Every file equally long, to within ${String(toleranceFrames)} samples; let the last tail ring out.`,
      why: rules.levels['length-differs']?.why,
    },
    {
      what: 'Room before distortion',
      how: `Peaks below ${String(rules.signal.ceilingDbfs).replace('-', '−')} dBFS; nothing clipped by the export.`,
      why: rules.levels.clipped?.why ?? rules.levels['above-ceiling']?.why,
    },
  ];
}

function needWords(need: 'required' | 'welcome' | 'not-needed', what: string): string | undefined {
  if (need === 'not-needed') return undefined;
  return need === 'required' ? `Send ${what}.` : `Welcome: ${what}.`;
}

/** What comes along beside the tracks; what is not asked for is not listed. */
export function bringRules(rules: HouseRules): PlainRule[] {
  const { bring, levels } = rules;
  const candidates: { what: string; how: string | undefined; why?: string | undefined }[] = [
    {
      what: 'Rough mix',
      how:
        bring.roughMix === 'required' && bring.orderInsteadOfRoughMix
          ? 'Send the mix you have been listening to, or say which parts matter most, in order.'
          : needWords(bring.roughMix, 'the mix you have been listening to'),
      why: levels['rough-mix-missing']?.why ?? 'It shows what you hear in the song.',
    },
    {
      what: 'Tempo',
      how: needWords(bring.tempo, 'the tempo'),
      why: levels['tempo-missing']?.why ?? '“No click” is a full answer.',
    },
    {
      what: 'References',
      how:
        bring.references === 0
          ? undefined
          : `${String(bring.references)} or more: a file or a link, the moment, and what to listen for.`,
      why:
        levels['reference-missing']?.why ?? 'Send only what you may share, for private listening.',
    },
    {
      what: 'What matters most',
      how: needWords(bring.orderOfImportance, 'a list of the parts, the most important first'),
      why: levels['order-missing']?.why,
    },
    {
      what: 'Session notes',
      how: needWords(bring.notes, 'who played, with which microphones, where'),
      why: levels['notes-missing']?.why,
    },
    {
      what: 'Clean signal (DI)',
      how:
        bring.diFor.length === 0
          ? undefined
          : `Beside the amp, for ${groupWords(rules, bring.diFor)}.`,
      why: levels['di-missing']?.why,
    },
    {
      what: 'Without effects',
      how:
        bring.dryFor.length === 0 ? undefined : `Also dry, for ${groupWords(rules, bring.dryFor)}.`,
      why: levels['dry-missing']?.why,
    },
    {
      what: 'Without tuning',
      how:
        bring.untunedFor.length === 0
          ? undefined
          : `Also untuned, for ${groupWords(rules, bring.untunedFor)}.`,
      why: levels['untuned-missing']?.why,
    },
  ];
  return candidates.flatMap(({ what, how, why }) =>
    how === undefined ? [] : [{ what, how, why }],
  );
}
