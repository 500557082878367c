import { copyFileSync, truncateSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import type { DroppedFile } from '#shared/bytes/byte-source.ts';
import { checkSession } from '#shared/check.ts';
import { findingCodes } from '#shared/findings/finding.ts';
import { measureHere } from '#shared/session/measure-file.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { loadMeters } from '../../../server/cli/load-meters.ts';
import { openNodeFile } from '../../../server/cli/node-files.ts';
import { quietRules } from '../../support/finding-cases/finding-case.ts';
import { cleanParts, goodSession } from '../../support/good-sessions.ts';
import { realDefects } from '../../support/real-defects/all-defects.ts';
import { placed } from '../../support/real-defects/real-defect.ts';
import { checkSounds, findingsOf, inShort } from '../../support/real-sounds.ts';

/*
 * Every code on real recordings with the defect made by sox or ffmpeg, among twenty clean ones on
 * which nothing else may be found.
 */

let clean: Record<string, string>;
beforeAll(async () => {
  clean = await goodSession(cleanParts);
}, 240_000);

it('finds nothing in twenty clean recordings', async () => {
  expect(Object.keys(clean)).toHaveLength(20);
  const check = await checkSounds(clean, { rules: quietRules });
  expect(findingsOf(check).map(inShort)).toEqual([]);
  expect(check.judgement.session.startsProven).toBe(true);
  expect(check.judgement.verdict).toBe('ready');
}, 60_000);

const codes = findingCodes.filter((code) => code !== 'changed-while-read');
describe.each(codes)('%s', (code) => {
  it('is found on real sound, and nothing else is', async () => {
    const { files, alone, rules = quietRules, information, found } = realDefects[code];
    const sounds = { ...(alone ? {} : clean), ...(await files()) };
    const options = { rules, ...(information && { information }) };
    const findings = findingsOf(await checkSounds(sounds, options)).map(inShort);
    const expected = found.map((line) =>
      line.replace(
        '*',
        Object.keys(sounds)
          .sort()
          .map((path) => path.replace(/\.\w+$/, ''))
          .join(' + '),
      ),
    );
    expect(findings).toEqual(expected);
    expect(findings.some((line) => line.split(' ')[1] === code)).toBe(true);
  }, 60_000);
});

describe('changed-while-read', () => {
  it('is found on a recording that somebody shortens meanwhile', async () => {
    const whole = await placed('ambi_glass_rub', [], 2);
    const place = whole.replace('.wav', '-shrinking.wav');
    copyFileSync(whole, place);
    const dropped = async (path: string, from: string): Promise<DroppedFile> => {
      const source = await openNodeFile(from);
      return { path, size: source.size, open: () => Promise.resolve(source) };
    };
    const organ = await dropped('Organ.wav', place);
    const shrinking: DroppedFile = {
      ...organ,
      open: async () => {
        const source = await organ.open();
        return {
          ...source,
          stream: (offset, signal) => {
            truncateSync(place, source.size - 600_000);
            return source.stream(offset, signal);
          },
        };
      },
    };
    const check = await checkSession({
      files: [shrinking, await dropped('Piano.wav', clean['Piano.wav']!)],
      rules: quietRules,
      information: emptySessionInformation(),
      measureFile: measureHere(await loadMeters()),
    });
    expect(findingsOf(check).map(inShort)).toContain('must-fix changed-while-read Organ');
  }, 60_000);
});
