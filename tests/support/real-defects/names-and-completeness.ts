import { starterSets } from '#shared/rules/starter-sets.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { quietRules } from '../finding-cases/finding-case.ts';
import { placed, type RealDefect } from './real-defect.ts';

/** Different real sounds under these names. */
async function named(...names: string[]): Promise<Record<string, string>> {
  const sounds = ['tabla_tun2', 'tabla_tas2', 'tabla_na_o', 'tabla_tun1', 'tabla_tas1'];
  const made = await Promise.all(
    names.map(async (name, index) => [
      `${name}.wav`,
      await placed(sounds[index] ?? 'tabla_te1', index < 2 ? [] : ['pad', '0.1']),
    ]),
  );
  return Object.fromEntries(made) as Record<string, string>;
}

const convention = (name: keyof typeof starterSets): HouseRules => ({
  ...starterSets[name],
  bring: quietRules.bring,
});
const bring = (asked: Partial<HouseRules['bring']>): HouseRules => ({
  ...quietRules,
  bring: { ...quietRules.bring, ...asked },
});

export const realNames = {
  'name-breaks-rule': {
    files: () => named('kik in', 'Hat Open'),
    rules: convention('plain'),
    found: ['look name-breaks-rule kik in'],
  },
  'name-unclear': { files: () => named('Audio 05'), found: ['look name-unclear Audio 05'] },
  'number-repeated': {
    alone: true,
    files: () => named('01 Kick', '02 Bass', '02 Organ', '03 Violin'),
    rules: convention('numbered'),
    found: ['look number-repeated 02 Bass + 02 Organ'],
  },
  'number-missing': {
    alone: true,
    files: () => named('01 Kick', '02 Bass', '04 Organ', '05 Violin'),
    rules: { ...convention('numbered'), levels: { 'number-missing': { level: 'note' } } },
    found: ['note number-missing'],
  },
  'name-too-long': {
    files: () => named(`Organ ${'Chorus '.repeat(12)}Left`),
    found: [`look name-too-long Organ ${'Chorus '.repeat(12)}Left`],
  },
  'name-characters': {
    files: () => named('Organ: wet?'),
    found: ['look name-characters Organ: wet?'],
  },
  'name-reserved': {
    files: () => named('Aux'),
    found: ['look name-unclear Aux', 'look name-reserved Aux'],
  },
  'name-clash': {
    files: () => named('Organ', 'ORGAN'),
    found: ['must-fix name-clash ORGAN + Organ'],
  },
  'export-leftover': {
    files: () => named('Organ_bip copy'),
    found: ['note export-leftover Organ_bip copy'],
  },
  'looks-like-takes': {
    files: () => named('Organ Take 1', 'Organ Take 2'),
    found: ['look looks-like-takes Organ Take 1 + Organ Take 2'],
  },
} satisfies Record<string, RealDefect>;

export const realCompleteness = {
  'rough-mix-missing': {
    files: () => named('Organ'),
    rules: bring({ roughMix: 'required' }),
    found: ['must-fix rough-mix-missing'],
  },
  'reference-missing': {
    files: () => named('Organ', 'Reference'),
    rules: bring({ references: 2 }),
    found: ['look reference-missing'],
  },
  'order-missing': {
    files: () => named('Organ', 'Rough Mix'),
    rules: bring({ roughMix: 'required', orderOfImportance: 'required' }),
    found: ['look order-missing'],
  },
  'notes-missing': {
    files: () => named('Organ'),
    rules: bring({ notes: 'required' }),
    found: ['look notes-missing'],
  },
  'di-missing': {
    files: () => named('Electric Guitar 2 Amp', 'Electric Guitar 2 DI', 'Baritone Guitar Amp'),
    rules: bring({ diFor: ['guitars'] }),
    found: ['look di-missing Baritone Guitar Amp', 'look di-missing Guitar Fifths'],
  },
  'dry-missing': {
    files: () => named('Lead Vocal', 'Backing Vocal Wet', 'Backing Vocal Dry'),
    rules: bring({ dryFor: ['vocals'] }),
    found: ['look dry-missing Choir', 'look dry-missing Lead Vocal'],
  },
  'untuned-missing': {
    files: () => named('Lead Vocal Tuned', 'Backing Vocal', 'Backing Vocal Untuned'),
    rules: bring({ untunedFor: ['vocals'] }),
    found: ['look untuned-missing Choir', 'look untuned-missing Lead Vocal Tuned'],
  },
  'tempo-missing': {
    files: () => named('Organ'),
    rules: bring({ tempo: 'required' }),
    found: ['look tempo-missing'],
  },
} satisfies Record<string, RealDefect>;
