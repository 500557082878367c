import { describe, expect, it } from 'vitest';
import { judgedSessionSchema } from '#shared/judge/judged-session.ts';
import { judgeSession } from '#shared/judge/judge-session.ts';
import { findingCodes } from '#shared/findings/finding.ts';
import { defaultRules, starterSets } from '#shared/rules/starter-sets.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { goodNames, goodTracks } from '../../support/finding-cases/finding-case.ts';
import { clippedChannel } from '../../support/finding-cases/signal.ts';
import { measuredFile, session } from '../../support/measure-builders.ts';

const information = emptySessionInformation();

/** Files with something found in most of them. */
function sixtyFiles() {
  const parts = ['Kick In', 'Snare Top', 'Bass DI', 'Gtr', 'Piano', 'BV', 'Lead Vox', 'Strings'];
  return Array.from({ length: 60 }, (_, index) =>
    measuredFile({
      path: `Song/${String(index).padStart(2, '0')}_${parts[index % parts.length]}_${index}.wav`,
      format: { channels: (index % 2) + 1, frames: index % 7 === 0 ? 8_000_000 : 8_640_000 },
      channel: { ...(index % 3 === 0 ? clippedChannel(200) : {}), soundingDcOffset: 0.001 },
    }),
  );
}

describe('judgeSession', () => {
  it('finds nothing in files that agree, and says what they agree on', () => {
    const judgement = judgeSession(session(goodTracks()), defaultRules, information);
    expect(judgement.files.map(({ path, findings }) => [path, findings])).toEqual(
      goodNames.map((path) => [path, []]),
    );
    expect(judgement.session).toMatchObject({
      sampleRateHz: 48_000,
      bits: 24,
      frames: 8_640_000,
      startsProven: true,
    });
    expect(judgement.files.map(({ group }) => group)).toEqual([
      'drums',
      'bass',
      'guitars',
      'keys',
      'vocals',
    ]);
  });

  it('takes plain data: what has been stored is judged alike', () => {
    const measured = session(sixtyFiles());
    const stored: unknown = JSON.parse(JSON.stringify(measured));
    const again = judgedSessionSchema.parse(stored);
    expect(judgeSession(again, defaultRules, information)).toEqual(
      judgeSession(measured, defaultRules, information),
    );
  });

  it('gives plain data, in the order of the codes', () => {
    const judgement = judgeSession(session(sixtyFiles()), starterSets.numbered, information);
    expect(JSON.parse(JSON.stringify(judgement))).toEqual(judgement);
    for (const { findings } of [...judgement.files, judgement.session]) {
      const order = findings.map(({ code }) => findingCodes.indexOf(code));
      expect(order).toEqual([...order].sort((a, b) => a - b));
    }
  });

  it('judges nothing at all, and files of which none is audio', () => {
    expect(judgeSession(session([]), defaultRules, information).session).toMatchObject({
      sampleRateHz: null,
      frames: null,
      startsProven: false,
    });
    const lyrics = {
      path: 'Lyrics.txt',
      bytes: 3,
      reading: { kind: 'not-audio' as const },
      format: null,
      measures: null,
    };
    expect(judgeSession(session([lyrics]), defaultRules, information).verdict).toBe('ready');
  });

  it('judges sixty measured files again in a moment', () => {
    const measured = session(sixtyFiles());
    judgeSession(measured, starterSets.numbered, information);
    const times = Array.from({ length: 9 }, (_, index) => {
      // A changed rule is a new object, as it comes from a form or from a database.
      const rules = structuredClone(starterSets.numbered);
      rules.signal.ceilingDbfs = -1 - index;
      const start = process.cpuUsage();
      judgeSession(measured, rules, information);
      const { user, system } = process.cpuUsage(start);
      return (user + system) / 1000;
    });
    const [, , , , median = Infinity] = times.sort((a, b) => a - b);
    expect(median).toBeLessThan(50);
  });
});
