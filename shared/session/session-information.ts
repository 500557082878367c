import { z } from 'zod';

/** What a file is for. Given by hand, or recognised by name. */
export const fileRoles = [
  'track',
  'click',
  'guide',
  'rough-mix',
  'reference',
  'note',
  'leave-out',
] as const;
export type FileRole = (typeof fileRoles)[number];

/** What the artist says about a finding. */
export const answerKinds = ['on-purpose', 'all-there-is', 'cannot-export-again'] as const;
export type AnswerKind = (typeof answerKinds)[number];

const bpm = z.number().min(10).max(999);

export const tempoSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('fixed'), bpm }),
  /** A list of changes, the first at bar 1. */
  z.strictObject({
    kind: z.literal('changes'),
    changes: z
      .array(z.strictObject({ bar: z.number().int(), bpm }))
      .min(1)
      .max(1000),
  }),
  /** A tempo map that travels along as a MIDI file. */
  z.strictObject({ kind: z.literal('map'), path: z.string() }),
  /** Played without a click: a full answer. */
  z.strictObject({ kind: z.literal('no-click') }),
]);
export type Tempo = z.infer<typeof tempoSchema>;

/**
 * Everything a person says about a song that no file can show. One typed input of the judge, the
 * packer and the command line. `path` is relative to the dropped folder, with `/`.
 */
export const sessionInformationSchema = z.strictObject({
  artist: z.string().max(200).nullable().default(null),
  title: z.string().max(200).nullable().default(null),
  tempo: tempoSchema.nullable().default(null),
  metre: z
    .strictObject({
      beats: z.number().int().min(1).max(32),
      unit: z.union([z.literal(2), z.literal(4), z.literal(8), z.literal(16)]),
    })
    .default({ beats: 4, unit: 4 }),
  /** The bar number at the common start of the files, and bars of count-in before the song. */
  startBar: z.number().int().default(1),
  countInBars: z.number().int().min(0).default(0),
  /** Roles set by hand; they win over what the name suggests. */
  roles: z.record(z.string(), z.enum(fileRoles)).default({}),
  /** Names set by hand, without extension; a proposal never overwrites them. */
  names: z.record(z.string(), z.string().max(255)).default({}),
  /** Paths, the most important first; null if not given. */
  orderOfImportance: z.array(z.string()).nullable().default(null),
  referenceLinks: z
    .array(
      z.strictObject({
        url: z.string().max(2000),
        moment: z.string().max(100),
        listenFor: z.string().max(500),
      }),
    )
    .default([]),
  /** Ids from the rules' confirmations that were ticked. */
  confirmations: z.array(z.string()).default([]),
  /** path is null for a finding about the whole session. */
  answers: z
    .array(
      z.strictObject({
        code: z.string(),
        path: z.string().nullable(),
        answer: z.enum(answerKinds),
        remark: z.string().max(500).optional(),
      }),
    )
    .default([]),
  notes: z.string().max(20_000).nullable().default(null),
});
export type SessionInformation = z.infer<typeof sessionInformationSchema>;

/** Nothing said yet. */
export function emptySessionInformation(): SessionInformation {
  return {
    artist: null,
    title: null,
    tempo: null,
    metre: { beats: 4, unit: 4 },
    startBar: 1,
    countInBars: 0,
    roles: {},
    names: {},
    orderOfImportance: null,
    referenceLinks: [],
    confirmations: [],
    answers: [],
    notes: null,
  };
}
