import type { Level } from '../../ui/level-mark.tsx';

/**
 * The example on the front page: eight files of an invented song, as they were exported and as
 * they are packed. Everything on it is something the check finds and the repairs do.
 */
export type IllustratedStrip = {
  exportedName: string;
  packedName: string;
  /** How the sound is drawn; see wave-outline.ts. */
  wave: 'hits' | 'steady' | 'phrases' | 'none';
  /** Where there is sound, as shares of the length of the song. */
  spans: readonly (readonly [number, number])[];
  finding?: {
    level: Level;
    /** Place along the strip, 0 to 1. */
    at: number;
    found: string;
    /** What packing does about it; undefined where only the artist can. */
    repaired?: string;
    remains?: string;
  };
  /** The file ends here, before the others. */
  endsAt?: number;
};

export const illustratedSet: readonly IllustratedStrip[] = [
  {
    exportedName: 'Track 01 (3) KikIn',
    packedName: 'D Kick In',
    wave: 'hits',
    spans: [[0.02, 1]],
  },
  {
    exportedName: 'snr top',
    packedName: 'D Snare Top',
    wave: 'hits',
    spans: [[0.02, 1]],
    finding: {
      level: 'must-fix',
      at: 0.55,
      found:
        'Clipped in 41 places. If it was the export and not the recording: turn the track down and export it again.',
      remains: 'Still to export again. Exported anew, only this file is measured once more.',
    },
  },
  {
    exportedName: 'Bass DI_03',
    packedName: 'B Bass DI',
    wave: 'steady',
    spans: [[0.055, 1]],
    endsAt: 0.92,
    finding: {
      level: 'note',
      at: 0.92,
      found: 'Ends 16 seconds before the others.',
      repaired: 'Silence added: all files are equally long.',
    },
  },
  {
    exportedName: 'EGtr Rhy L',
    packedName: 'G Guitar Rhythm L',
    wave: 'steady',
    spans: [
      [0.055, 0.47],
      [0.655, 1],
    ],
  },
  {
    exportedName: 'Pno stereo',
    packedName: 'K Piano',
    wave: 'steady',
    spans: [
      [0.055, 0.47],
      [0.655, 1],
    ],
    finding: {
      level: 'look',
      at: 0.08,
      found: 'Both sides are identical.',
      repaired: 'One side kept: half the size, the same sound.',
    },
  },
  {
    exportedName: 'LV comp tuned',
    packedName: 'V Lead Vocal',
    wave: 'phrases',
    spans: [
      [0.11, 0.165],
      [0.245, 0.41],
      [0.49, 0.655],
      [0.735, 0.9],
      [0.975, 1],
    ],
  },
  {
    exportedName: 'BGV hi',
    packedName: 'V Harmony High',
    wave: 'phrases',
    spans: [
      [0.33, 0.41],
      [0.575, 0.655],
      [0.82, 0.9],
    ],
  },
  {
    exportedName: 'tamb',
    packedName: 'P Tambourine',
    wave: 'none',
    spans: [],
    finding: {
      level: 'look',
      at: 0.02,
      found: 'Nothing is in this file. Was the track muted?',
      remains: 'Left out, because you said so.',
    },
  },
];

/** The ruler: 96 bars at 112 BPM in 4/4 last 205.7 s. */
export const illustratedRuler = [
  { at: 0, label: '1', time: '0:00' },
  { at: 0.25, label: '25', time: '0:51' },
  { at: 0.5, label: '49', time: '1:42' },
  { at: 0.75, label: '73', time: '2:34' },
] as const;
