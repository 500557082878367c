import { describe, expect, it } from 'vitest';
import { explainName } from '#shared/naming/explain-name.ts';
import { groupNatures } from '#shared/rules/naming-rules.ts';
import { namingClashes } from '#shared/rules/naming-clashes.ts';
import { parseHouseRules } from '#shared/rules/parse-house-rules.ts';
import { defaultRules, starterNames, starterSets } from '#shared/rules/starter-sets.ts';

describe('starter sets', () => {
  it.each([...starterNames])('%s is complete and without conflicts', (name) => {
    expect(parseHouseRules(starterSets[name])).toEqual({ rules: starterSets[name] });
  });

  it('write a name as they promise', () => {
    const promised = { numbered: '01 Kick In', 'group-letter': 'D Kick In', plain: 'Kick In' };
    for (const name of starterNames) {
      expect(explainName(promised[name], starterSets[name].names)).toEqual({ ok: true });
    }
  });

  it('have the nine groups, each with its own letter and its own nature', () => {
    const { groups } = starterSets['group-letter'].names;
    expect(groups.map(({ letter }) => letter).join('')).toBe('DPBGKSOVX');
    expect(groups.map(({ nature }) => nature)).toEqual([...groupNatures]);
    expect(namingClashes(groups)).toEqual([]);
  });

  it('ask for what no file can show', () => {
    expect(starterSets.plain.confirm.map(({ id }) => id)).toEqual([
      'mix-bus-bypassed',
      'mix-rides-removed',
      'editing-done',
      'takes-chosen',
      'arrangement-final',
    ]);
  });
});

describe('default rules', () => {
  it('hold nobody to a convention that nobody published', () => {
    expect(defaultRules.levels['name-breaks-rule']).toEqual({ level: 'off' });
    expect(defaultRules.confirm).toEqual([]);
    expect(defaultRules.format.sampleRatesHz).toEqual([]);
    expect(Object.values(defaultRules.bring)).not.toContain('required');
    expect(parseHouseRules(defaultRules)).toEqual({ rules: defaultRules });
  });
});
