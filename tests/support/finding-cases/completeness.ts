import type { FindingCode } from '#shared/findings/finding.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { measuredFile } from '../measure-builders.ts';
import { quietRules, type FindingCase } from './finding-case.ts';

const bring = (bring: Partial<HouseRules['bring']>): HouseRules => ({
  ...quietRules,
  bring: { ...quietRules.bring, ...bring },
});

export const completenessCases = {
  'rough-mix-missing': {
    defect: { rules: bring({ roughMix: 'required', orderInsteadOfRoughMix: true }) },
    found: [
      { code: 'rough-mix-missing', level: 'must-fix', files: [], args: { orderWouldDo: true } },
    ],
    clean: {
      rules: bring({ roughMix: 'required', orderInsteadOfRoughMix: true }),
      information: { orderOfImportance: ['Lead Vocal.wav'] },
    },
  },
  'reference-missing': {
    defect: {
      rules: bring({ references: 2 }),
      add: [measuredFile({ path: 'Reference.wav', format: { sampleRateHz: 44_100 } })],
    },
    found: [{ code: 'reference-missing', level: 'look', files: [], args: { wanted: 2, given: 1 } }],
    clean: {
      rules: bring({ references: 2 }),
      add: [measuredFile({ path: 'Reference.wav' })],
      information: {
        referenceLinks: [
          { url: 'https://music.example/song', moment: '1:02', listenFor: 'the snare' },
        ],
      },
    },
  },
  'order-missing': {
    defect: { rules: bring({ orderOfImportance: 'required' }) },
    found: [{ code: 'order-missing', level: 'look', files: [], args: {} }],
    clean: {
      rules: bring({ orderOfImportance: 'required' }),
      information: { orderOfImportance: ['Lead Vocal.wav', 'Piano.wav'] },
    },
  },
  'notes-missing': {
    defect: { rules: bring({ notes: 'welcome' }), information: { notes: '  ' } },
    found: [{ code: 'notes-missing', level: 'note', files: [], args: {} }],
    clean: { rules: bring({ notes: 'required' }), information: { notes: 'Juno sings.' } },
  },
  'di-missing': {
    defect: {
      rules: bring({ diFor: ['guitars', 'bass'] }),
      add: [measuredFile({ path: 'Acoustic Guitar.wav' })],
    },
    // The bass has its DI, the acoustic guitar has no amp.
    found: [
      {
        code: 'di-missing',
        level: 'look',
        files: ['Electric Guitar.wav'],
        args: { part: 'Electric Guitar' },
      },
    ],
    clean: {
      rules: bring({ diFor: ['guitars', 'bass'] }),
      add: [measuredFile({ path: 'Electric Guitar DI.wav' })],
    },
  },
  'dry-missing': {
    defect: {
      rules: bring({ dryFor: ['vocals'] }),
      add: [
        measuredFile({ path: 'Backing Vocal 1.wav' }),
        measuredFile({ path: 'Backing Vocal 1 Dry.wav' }),
      ],
    },
    found: [
      {
        code: 'dry-missing',
        level: 'look',
        files: ['Lead Vocal.wav'],
        args: { part: 'Lead Vocal' },
      },
    ],
    clean: {
      rules: bring({ dryFor: ['vocals'] }),
      add: [measuredFile({ path: 'Lead Vocal Dry.wav' })],
    },
  },
  'untuned-missing': {
    defect: {
      rules: bring({ untunedFor: ['vocals'] }),
      add: [measuredFile({ path: 'Backing Vocal 2.wav' })],
    },
    found: [
      {
        code: 'untuned-missing',
        level: 'look',
        files: ['Lead Vocal.wav'],
        args: { part: 'Lead Vocal' },
      },
      {
        code: 'untuned-missing',
        level: 'look',
        files: ['Backing Vocal 2.wav'],
        args: { part: 'Backing Vocal 2' },
      },
    ],
    clean: {
      rules: bring({ untunedFor: ['vocals'] }),
      add: [measuredFile({ path: 'Lead Vocal Untuned.wav' })],
    },
  },
  'tempo-missing': {
    defect: { rules: bring({ tempo: 'required' }) },
    found: [{ code: 'tempo-missing', level: 'look', files: [], args: {} }],
    clean: {
      rules: bring({ tempo: 'required' }),
      information: { tempo: { kind: 'no-click' } },
    },
  },
} satisfies Partial<Record<FindingCode, FindingCase>>;
