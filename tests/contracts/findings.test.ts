import { readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  describeFinding,
  hasItsArguments,
  nextStep,
} from '#shared/findings/catalogue/describe-finding.ts';
import { findingDefinitions } from '#shared/findings/catalogue/definitions.ts';
import { englishWords } from '#shared/findings/catalogue/english/english-words.ts';
import { findingCodes, findingSchema, repairKinds } from '#shared/findings/finding.ts';
import { houseRulesSchema } from '#shared/rules/house-rules.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import { findingCases } from '../support/finding-cases/all-cases.ts';
import { findingsOf } from '../support/finding-cases/finding-case.ts';

/** Every finding the defect cases give, once. */
const findings = findingCodes.flatMap((code) => findingsOf(findingCases[code].defect));

describe('every code', () => {
  it('has a definition, words, a defect case and a clean case', () => {
    const all = [...findingCodes].sort();
    expect(Object.keys(findingDefinitions).sort()).toEqual(all);
    expect(Object.keys(englishWords).sort()).toEqual(all);
    expect(Object.keys(findingCases).sort()).toEqual(all);
    for (const code of findingCodes) {
      expect(
        findingsOf(findingCases[code].defect).some((finding) => finding.code === code),
        code,
      ).toBe(true);
      expect(
        findingsOf(findingCases[code].clean).some(
          (finding) =>
            finding.code === code &&
            !findingCases[code].foundInClean?.some((expected) => expected.code === code),
        ),
        code,
      ).toBe(false);
    }
  });

  it('has a check in a file of its own name', () => {
    const files = readdirSync(new URL('../../shared/judge/checks', import.meta.url));
    expect(files.sort()).toEqual(findingCodes.map((code) => `${code}.ts`).sort());
  });

  it('names a place in the house rules that exists, or its own level', () => {
    const rules = houseRulesSchema.parse(starterSets.plain) as Record<string, unknown>;
    for (const code of findingCodes) {
      const { rule, repairs } = findingDefinitions[code];
      if (rule === `levels.${code}`) continue;
      const [section = '', key = ''] = rule.split('.');
      expect(rules[section], rule).toHaveProperty(key);
      for (const repair of repairs) expect(repairKinds).toContain(repair);
    }
  });
});

describe('every finding', () => {
  it.each(findings.map((finding) => [finding.code, finding] as const))(
    '%s keeps to its schema and can be put into words',
    (_code, finding) => {
      expect(findingSchema.parse(finding)).toEqual(finding);
      expect(hasItsArguments(finding)).toBe(true);
      const words = describeFinding(finding);
      for (const text of Object.values(words)) {
        expect(text).not.toMatch(/undefined|null|NaN|Infinity|\[object|\{|\$|\s{2}|^\s|\s$/);
        expect(text.length).toBeGreaterThan(4);
      }
      expect(words.title).not.toMatch(/[.!]$/);
      for (const sentence of [words.what, words.why, words.how]) expect(sentence).toMatch(/[.?”]$/);
    },
  );

  it('refuses arguments of another code', () => {
    const [finding] = findingsOf(findingCases.clipped.defect);
    expect(hasItsArguments({ code: 'silent', args: finding!.args })).toBe(false);
    expect(hasItsArguments({ code: 'clipped', args: {} })).toBe(false);
  });

  it('says what to do next', () => {
    const steps = new Map(
      findings.map((finding) => [`${finding.code} ${finding.level}`, nextStep(finding)]),
    );
    expect(steps.get('cut-short must-fix')).toBe('export-again');
    expect(steps.get('dual-mono look')).toBe('we-can-fix');
    expect(steps.get('dual-mono note')).toBe('know');
    expect(steps.get('silent look')).toBe('decide');
    expect(steps.get('length-differs look')).toBe('decide');
    expect(steps.get('length-differs must-fix')).toBe('export-again');
    expect(steps.get('name-breaks-rule look')).toBe('we-can-fix');
    expect(steps.get('name-unclear look')).toBe('decide');
  });
});

describe('a line that stands for many files', () => {
  it('has words for every code that is about one file', () => {
    const onlyTogether = new Set(
      findings.filter(({ files }) => files.length !== 1).map(({ code }) => code),
    );
    for (const code of findingCodes) {
      if (onlyTogether.has(code)) continue;
      expect(englishWords[code].several?.(12), code).toMatch(/12/);
    }
  });

  it('counts the files in its title and names some of them', () => {
    const [finding] = findingsOf(findingCases['tail-cut'].defect);
    const files = ['Drums/Kick In.wav', 'Snare.wav', 'Bass.wav', 'Piano.wav', 'Organ.wav'];
    const words = describeFinding({ ...finding!, files, perFile: [] });
    expect(words.title).toBe('5 files end while they still ring');
    expect(words.what).toBe('Kick In, Snare and 3 more.');
  });
});
