import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Finding } from '#shared/findings/finding.ts';
import { clashKey } from '#shared/naming/fold-name.ts';
import { safeRepairs, unaskedRepairs } from '#shared/repair/choose-repairs.ts';
import { starterNames, starterSets } from '#shared/rules/starter-sets.ts';
import { writeTestAiff } from '../../support/audio-writer.ts';
import {
  cleanPart,
  droppedZip,
  storyFrames,
  storyRateHz,
  tellStory,
  waveOf,
  type Story,
} from '../../support/story.ts';

/** Ways in which a part can arrive; each asks for safe repairs, or for none. */
const arrivals = ['plain', 'short', 'dual-mono', 'aiff', 'four channels', 'pair'] as const;

const names = [
  'Kick In',
  'kick_out_02',
  'SNARE top copy',
  'BassDI',
  'Gtr Verse (L)',
  'Lead Vox - Dbl 1',
  'Audio 12',
  'ΜΠΑΣΟ',
  'Hi-Hat%20',
  'con',
];

function arrive(name: string, kind: (typeof arrivals)[number], seed: number) {
  const part = cleanPart({ seed });
  const wave = `${name}.wav`;
  switch (kind) {
    case 'plain':
      return { [wave]: waveOf([part]) };
    case 'short':
      return { [wave]: waveOf([part.slice(0, storyFrames - 3000)]) };
    case 'dual-mono':
      return { [wave]: waveOf([part, part]) };
    case 'four channels':
      return { [wave]: waveOf([1, 2, 3, 4].map((n) => cleanPart({ seed: 10 * seed + n }))) };
    case 'pair':
      return {
        [`${name} L.wav`]: waveOf([part]),
        [`${name} R.wav`]: waveOf([part.map((x) => 0.7 * x)]),
      };
    case 'aiff':
      return {
        [`${name}.aif`]: writeTestAiff({
          sampleRateHz: storyRateHz,
          encoding: 'pcm',
          bits: 24,
          channels: [part.map((x) => Math.round(x * 2 ** 23))],
        }),
      };
  }
}

/** Recipes, not files: a failure then prints what was made and not what it is made of. */
const recipes = fc.uniqueArray(
  fc.record({ name: fc.constantFrom(...names), kind: fc.constantFrom(...arrivals) }),
  { selector: ({ name }) => name, minLength: 1, maxLength: 4 },
);

type Recipe = { name: string; kind: (typeof arrivals)[number] }[];

const sessionOf = (recipe: Recipe): Record<string, Buffer> =>
  Object.fromEntries(
    recipe.flatMap(({ name, kind }, index) => Object.entries(arrive(name, kind, index + 2))),
  );

const ruleSets = fc.constantFrom(...starterNames);

/** Every file is packed or left out, under names that are safe and differ on any disk. */
function expectWholePlan({ plan }: Story, paths: readonly string[]): void {
  const keys = plan.entries.map(({ to }) => clashKey(to));
  expect(new Set(keys).size).toBe(keys.length);
  const told = [
    ...plan.entries.flatMap(({ from }) => from),
    ...plan.leftOut.map(({ path }) => path),
  ];
  expect([...new Set(told)].sort()).toEqual([...paths].sort());
  for (const { to } of plan.entries) expect(to).not.toMatch(/[\\%\n<>:"|?*]|[. ](\/|$)/);
}

describe('safe repairs', () => {
  it('leave nothing that a second round of them would change', { timeout: 120_000 }, async () => {
    await fc.assert(
      fc.asyncProperty(recipes, ruleSets, async (recipe, ruleSet) => {
        const files = sessionOf(recipe);
        const rules = starterSets[ruleSet];
        const first = await tellStory(files, { rules, choose: safeRepairs });
        expectWholePlan(first, Object.keys(files));
        const choose = (findings: readonly Finding[]) => [
          ...safeRepairs(findings),
          ...unaskedRepairs(findings),
        ];
        const second = await tellStory(await droppedZip(first.zip), { rules, choose });
        const changed = second.report.package.entries.filter(({ repairs }) => repairs.length > 0);
        expect(changed.map(({ to, repairs }) => ({ to, repairs }))).toEqual([]);
        const tracks = (report: typeof first.report) =>
          report.package.entries.map(({ to, crc32, bytes }) => ({ to, crc32, bytes }));
        expect(tracks(second.report)).toEqual(tracks(first.report));
      }),
      { numRuns: 10 },
    );
  });
});
