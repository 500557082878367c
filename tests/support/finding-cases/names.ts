import type { FindingCode } from '#shared/findings/finding.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { measuredFile } from '../measure-builders.ts';
import { quietRules, type FindingCase } from './finding-case.ts';

/** A convention, and nothing to bring. */
const convention = (name: keyof typeof starterSets): HouseRules => ({
  ...starterSets[name],
  bring: quietRules.bring,
});
const numbered = (...stems: string[]) => stems.map((stem) => measuredFile({ path: `${stem}.wav` }));

export const nameCases = {
  'name-breaks-rule': {
    defect: {
      rules: convention('group-letter'),
      instead: numbered('D Kick In', 'B Bass', 'K Piano', 'V Lead Vocal', 'G tambourine', 'Organ'),
    },
    found: [
      {
        code: 'name-breaks-rule',
        level: 'look',
        files: ['G tambourine.wav'],
        args: {
          name: 'G tambourine',
          faults: [
            { token: 'group', reason: 'wrong', found: 'G', expected: 'P' },
            { token: 'name', reason: 'case', found: 'tambourine', expected: 'Tambourine' },
          ],
          proposedName: 'P Tambourine',
        },
        repairs: ['rename'],
      },
      {
        code: 'name-breaks-rule',
        level: 'look',
        files: ['Organ.wav'],
        args: {
          name: 'Organ',
          faults: [{ token: 'group', reason: 'missing', found: '', expected: 'K' }],
          proposedName: 'K Organ',
        },
      },
    ],
    clean: {
      rules: convention('group-letter'),
      instead: numbered('D Kick In', 'B Bass', 'K Piano', 'V Lead Vocal'),
    },
  },
  'name-unclear': {
    defect: { add: numbered('Audio 05', 'Stardust') },
    found: [
      {
        code: 'name-unclear',
        level: 'look',
        files: ['Audio 05.wav'],
        args: { name: 'Audio 05' },
        repairs: [],
      },
      // A word we do not know may tell people something, as long as no convention is in force.
      { code: 'name-unclear', level: 'note', files: ['Stardust.wav'], args: { name: 'Stardust' } },
    ],
    clean: { add: numbered('Tambourine') },
  },
  'number-repeated': {
    defect: {
      rules: convention('numbered'),
      instead: numbered('01 Kick In', '02 Bass', '02 Piano', '03 Lead Vocal'),
    },
    found: [
      {
        code: 'number-repeated',
        level: 'look',
        files: ['02 Bass.wav', '02 Piano.wav'],
        args: { number: 2 },
        repairs: ['rename'],
      },
    ],
    clean: {
      rules: convention('numbered'),
      instead: numbered('01 Kick In', '02 Bass', '03 Piano', '05 Lead Vocal'),
    },
  },
  'number-missing': {
    defect: {
      rules: { ...convention('numbered'), levels: { 'number-missing': { level: 'note' } } },
      instead: numbered('01 Kick In', '02 Bass', '04 Piano', '05 Lead Vocal'),
    },
    found: [{ code: 'number-missing', level: 'note', files: [], args: { numbers: [3] } }],
    clean: {
      rules: { ...convention('numbered'), levels: { 'number-missing': { level: 'note' } } },
      instead: numbered('03 Kick In', '04 Bass', '05 Piano', '06 Lead Vocal'),
    },
  },
  'name-too-long': {
    defect: {
      rules: { ...quietRules, names: { ...quietRules.names, maximumLength: 22 } },
      add: numbered('Backing Vocal Chorus 12'),
    },
    found: [
      {
        code: 'name-too-long',
        level: 'look',
        files: ['Backing Vocal Chorus 12.wav'],
        args: {
          name: 'Backing Vocal Chorus 12',
          characters: 23,
          maximumCharacters: 22,
        },
        repairs: ['rename'],
      },
    ],
    clean: {
      rules: { ...quietRules, names: { ...quietRules.names, maximumLength: 23 } },
      add: numbered('Backing Vocal Chorus 12'),
    },
  },
  'name-characters': {
    defect: { add: numbered('Organ: left', 'Violin?\u0007') },
    found: [
      {
        code: 'name-characters',
        level: 'look',
        files: ['Organ: left.wav'],
        args: { name: 'Organ: left', characters: [':'], ends: [] },
      },
      {
        code: 'name-characters',
        level: 'look',
        files: ['Violin?\u0007.wav'],
        args: { name: 'Violin?\u0007', characters: ['?', 'U+0007'], ends: [] },
      },
    ],
    clean: { add: numbered('Órgano (izq) #2 & más') },
  },
  'name-reserved': {
    // "AUX" is a device on Windows, also before an extension (Microsoft, Naming Files).
    defect: { add: numbered('Aux') },
    found: [
      { code: 'name-unclear', level: 'look', files: ['Aux.wav'], args: { name: 'Aux' } },
      { code: 'name-reserved', level: 'look', files: ['Aux.wav'], args: { name: 'Aux' } },
    ],
    clean: { add: numbered('Aux Percussion') },
  },
  'name-clash': {
    defect: {
      add: [
        ...numbered('Orgue Été', 'orgue e\u0301te\u0301'),
        measuredFile({ path: 'Drums/Tambourine.wav' }),
        measuredFile({ path: 'Percussion/tambourine.wav' }),
      ],
    },
    found: [
      {
        code: 'name-clash',
        level: 'must-fix',
        files: ['Orgue Été.wav', 'orgue e\u0301te\u0301.wav'],
        args: { name: 'Orgue Été' },
        repairs: ['rename'],
      },
      {
        code: 'name-clash',
        level: 'look',
        files: ['Drums/Tambourine.wav', 'Percussion/tambourine.wav'],
        args: { name: 'Tambourine' },
      },
    ],
    clean: { add: numbered('Organ 1', 'Organ 2') },
  },
  'export-leftover': {
    defect: { add: numbered('Organ_bip copy', 'Violin 48k24') },
    found: [
      {
        code: 'export-leftover',
        level: 'note',
        files: ['Organ_bip copy.wav'],
        args: { name: 'Organ_bip copy', leftovers: ['bip', 'copy'] },
        repairs: ['rename'],
      },
      {
        code: 'export-leftover',
        level: 'note',
        files: ['Violin 48k24.wav'],
        args: { name: 'Violin 48k24', leftovers: ['48k24'] },
      },
    ],
    // Numbers that tell files of one part from each other are no leftovers.
    clean: { add: numbered('Organ', 'Backing Vocal_01', 'Backing Vocal_02') },
  },
  'looks-like-takes': {
    defect: { add: numbered('Violin Take 1', 'Violin Take 3', 'Organ Take 2') },
    found: [
      {
        code: 'looks-like-takes',
        level: 'look',
        files: ['Violin Take 1.wav', 'Violin Take 3.wav'],
        args: { part: 'Violin', takes: 2 },
        repairs: ['leave-out'],
      },
    ],
    clean: {
      add: numbered(...[1, 2, 3, 4, 5, 6, 7, 8].map((number) => `Backing Vocal ${number}`)),
    },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
