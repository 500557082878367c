import { useEffect, useState } from 'react';
import { contrastPairs, contrastRatio, leastContrast, type Rgb } from '../../ui/contrast.ts';
import { onThemeChange, readTokenColor } from '../../ui/theme.ts';

const swatches = [
  'paper',
  'sheet',
  'well',
  'wash',
  'tape',
  'ink',
  'ink-2',
  'line',
  'edge',
  'case',
  'case-deep',
  'wave',
  'must',
  'must-wash',
  'look',
  'look-wash',
  'note',
  'note-wash',
] as const;

/** "rgb(13, 91, 75)" as the browser reports it, as numbers. */
function rgbOf(color: string): Rgb {
  const [red = 0, green = 0, blue = 0] = (color.match(/[\d.]+/g) ?? []).map(Number);
  return [red, green, blue];
}

function measure() {
  const colorOf = new Map(
    contrastPairs
      .flatMap(({ ink, ground }) => [ink, ground])
      .map((token) => [token, rgbOf(readTokenColor(token))]),
  );
  const black: Rgb = [0, 0, 0];
  return contrastPairs.map((pair) => ({
    ...pair,
    ratio: contrastRatio(colorOf.get(pair.ink) ?? black, colorOf.get(pair.ground) ?? black),
  }));
}

/** Every pair of colours that meets, measured on this page and this screen. */
export function Colours() {
  const [pairs, setPairs] = useState(measure);
  useEffect(
    () =>
      onThemeChange(() => {
        setPairs(measure());
      }),
    [],
  );
  return (
    <>
      <ul className="grid grid-cols-2 gap-3 sm:grid-cols-4 lg:grid-cols-6">
        {swatches.map((token) => (
          <li key={token} className="text-small">
            <span
              aria-hidden="true"
              className="block h-14 rounded border border-edge"
              style={{ background: `var(--${token})` }}
            />
            <span className="figures mt-1 block text-ink-2">{token}</span>
          </li>
        ))}
      </ul>
      <ul className="mt-6 grid gap-x-6 gap-y-1.5 text-small sm:grid-cols-2 xl:grid-cols-3">
        {pairs.map(({ ink, ground, need, ratio }) => {
          const enough = ratio >= leastContrast[need];
          return (
            <li
              key={`${ink} ${ground} ${need}`}
              className="flex items-center justify-between gap-3 rounded-slight px-2 py-1"
              style={{ background: `var(--${ground})`, color: `var(--${ink})` }}
            >
              <span>
                {need === 'text' ? `${ink} on ${ground}` : <Mark ink={ink} ground={ground} />}
              </span>
              <span
                className="figures"
                style={{ color: need === 'text' ? undefined : 'var(--ink)' }}
              >
                {ratio.toFixed(2)} {enough ? '≥' : '<'} {leastContrast[need]}
              </span>
            </li>
          );
        })}
      </ul>
    </>
  );
}

/** A mark need not be readable as text, so its name stands in ink beside it. */
function Mark({ ink, ground }: { ink: string; ground: string }) {
  return (
    <span className="inline-flex items-center gap-2 text-ink">
      <span
        aria-hidden="true"
        className="inline-block size-3 rounded-slight"
        style={{ background: `var(--${ink})` }}
      />
      {ink} mark on {ground}
    </span>
  );
}
