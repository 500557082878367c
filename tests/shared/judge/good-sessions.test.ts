import { beforeAll, describe, expect, it } from 'vitest';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { goodSession } from '../../support/good-sessions.ts';
import { checkSounds, findingsOf, inShort } from '../../support/real-sounds.ts';

const rules = defaultRules;
const information = { tempo: { kind: 'fixed' as const, bpm: 112 } };

describe('a good session of 48 recordings', () => {
  let sounds: Record<string, string>;
  beforeAll(async () => {
    sounds = await goodSession();
  }, 240_000);

  it('has no must-fix and at most five looks', async () => {
    const findings = findingsOf(await checkSounds(sounds, { rules, information }));
    console.log(findings.map(inShort));
    expect(findings.filter(({ level }) => level === 'must-fix').map(inShort)).toEqual([]);
    expect(findings.filter(({ level }) => level === 'look').length).toBeLessThanOrEqual(5);
  }, 60_000);
});
