import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson, hashRules } from '#shared/rules/canonical-json.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { defaultRules, starterSets } from '#shared/rules/starter-sets.ts';

/** Any JSON value in the place of rules: the function is defined for all of them. */
const canonical = (value: unknown): string => canonicalJson(value as HouseRules);

describe('canonicalJson', () => {
  // RFC 8785, section 3.2.3: the sample of sorting, expected order from there (from memory).
  it('sorts members by UTF-16 code units', () => {
    const sample = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    const order = [...canonical(sample).matchAll(/:"([^"]+)"/g)].map(([, value]) => value);
    expect(order).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });

  it('does not depend on the order of keys, nor on members that are undefined', () => {
    expect(canonical({ b: 1, a: { d: [1, { f: 2, e: 3 }], c: undefined } })).toBe(
      '{"a":{"d":[1,{"e":3,"f":2}]},"b":1}',
    );
    expect(canonical({ 10: 1, 9: 2 })).toBe('{"10":1,"9":2}');
  });

  it('means the same value', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(JSON.parse(canonical(value))).toEqual(JSON.parse(JSON.stringify(value)));
      }),
    );
  });

  it('is what Python writes with sorted keys and without spaces', () => {
    const python = spawnSync(
      'python3',
      [
        '-c',
        'import json,sys; print(json.dumps(json.load(sys.stdin), sort_keys=True, separators=(",", ":"), ensure_ascii=False), end="")',
      ],
      { input: JSON.stringify(starterSets.numbered), encoding: 'utf8' },
    );
    expect(python.status).toBe(0);
    expect(canonicalJson(starterSets.numbered)).toBe(python.stdout);
  });
});

describe('hashRules', () => {
  it('is the SHA-256 of the canonical JSON in UTF-8', async () => {
    const rules = { ...defaultRules, title: 'Übung — 録音' };
    const expected = createHash('sha256').update(canonicalJson(rules), 'utf8').digest('hex');
    expect(await hashRules(rules)).toBe(expected);
  });
});
