import axe from 'axe-core';
import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { contrastPairs, contrastRatio, leastContrast, type Rgb } from '../../../src/ui/contrast.ts';

const css = await readFile('src/ui/tokens.css', 'utf8');
const tokens = new Map(
  [...css.matchAll(/--([a-z0-9-]+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)].map(
    ([, name = '', light = '', dark = '']) => [name, { light, dark }],
  ),
);

/** axe-core's own arithmetic, which its type declarations leave out. */
const { Color, getContrast } = (
  axe.commons as unknown as {
    color: {
      Color: new (red: number, green: number, blue: number) => object;
      getContrast: (ground: object, ink: object) => number;
    };
  }
).color;

function rgbOf(hex: string): Rgb {
  const value = Number.parseInt(hex.slice(1), 16);
  return [value >> 16, (value >> 8) & 255, value & 255];
}

function colorOf(token: string, theme: 'light' | 'dark'): Rgb {
  const values = tokens.get(token);
  if (values === undefined) throw new Error(`tokens.css has no colour --${token}`);
  return rgbOf(values[theme]);
}

describe('contrastRatio', () => {
  it('spans 1 to 21, the range WCAG 2.2 names in its definition of contrast ratio', () => {
    expect(contrastRatio([0, 0, 0], [255, 255, 255])).toBeCloseTo(21, 10);
    expect(contrastRatio([90, 98, 91], [90, 98, 91])).toBe(1);
  });

  it('agrees with axe-core on every pair of the product', () => {
    for (const { ink, ground } of contrastPairs)
      for (const theme of ['light', 'dark'] as const) {
        const one = colorOf(ink, theme);
        const other = colorOf(ground, theme);
        // axe-core compares against 0.03928, the threshold of older editions; 8-bit colours
        // fall on the same side of both.
        expect(contrastRatio(one, other)).toBeCloseTo(
          getContrast(new Color(...other), new Color(...one)),
          8,
        );
      }
  });
});

describe.each(['light', 'dark'] as const)('colours in the %s theme', (theme) => {
  it.each(contrastPairs)('$ink on $ground is enough for $need', ({ ink, ground, need }) => {
    const ratio = contrastRatio(colorOf(ink, theme), colorOf(ground, theme));
    expect(ratio).toBeGreaterThanOrEqual(leastContrast[need]);
  });
});

describe('tailwind.config.ts', () => {
  it('names every colour of tokens.css and no other', async () => {
    const config = await readFile('tailwind.config.ts', 'utf8');
    const named = [...config.matchAll(/'var\(--([a-z0-9-]+)\)'/g)].map(([, name = '']) => name);
    const written = [...css.matchAll(/--([a-z0-9-]+): light-dark/g)].map(([, name = '']) => name);
    expect([...new Set(named)].sort()).toEqual(written.sort());
  });
});
