import { expect, it } from 'vitest';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import {
  allFindings,
  findingKey,
  inGroupOrder,
  keepUnchanged,
  type ViewedFile,
  type ViewedSession,
} from '../../../src/check/viewed-session.ts';

const format = { sampleRateHz: 48_000, frames: 96_000 } as ViewedFile['format'];

function viewedFile(path: string, change: Partial<ViewedFile> = {}): ViewedFile {
  return {
    ...{ path, bytes: 3, role: 'track', format, group: null, proposedName: null, findings: [] },
    ...change,
  };
}

function session(...files: ViewedFile[]): ViewedSession {
  return {
    information: emptySessionInformation(),
    files,
    session: { sampleRateHz: 48_000, bits: 24, frames: 96_000, findings: [] },
  };
}

const clipped = {
  code: 'clipped',
  level: 'look',
  channel: 0,
  files: [],
} as unknown as ViewedFile['findings'][number];

it('keeps the objects of files that show the same, so that they are not drawn again', () => {
  const before = session(viewedFile('a.wav'), viewedFile('b.wav'), viewedFile('c.wav'));
  const after = keepUnchanged(
    before,
    session(
      viewedFile('a.wav'),
      viewedFile('b.wav', { findings: [clipped] }),
      viewedFile('c.wav', { proposedName: 'Choir' }),
      viewedFile('d.wav'),
    ),
  );
  expect(after.files.map((file, index) => file === before.files[index])).toEqual([
    true,
    false,
    false,
    false,
  ]);
  expect(after.files[1]!.findings).toEqual([clipped]);
});

it('takes a file that was measured again for another', () => {
  const before = session(viewedFile('a.wav'));
  const again = { ...format! };
  const after = keepUnchanged(before, session(viewedFile('a.wav', { format: again })));
  expect(after.files[0]!.format).toBe(again);
});

it('lays files out by the groups of the rules, then by name, unknown parts last', () => {
  const [first, second] = defaultRules.names.groups;
  const ordered = inGroupOrder(
    [
      viewedFile('z.wav'),
      viewedFile('b.wav', { group: second!.id }),
      viewedFile('9.wav', { group: first!.id, proposedName: 'Snare' }),
      viewedFile('y.wav', { group: first!.id, proposedName: 'Kick' }),
    ],
    defaultRules,
  );
  expect(ordered.map(({ path }) => path)).toEqual(['y.wav', '9.wav', 'b.wav', 'z.wav']);
});

it('names the file in every finding of a file, and tells findings apart by channel', () => {
  const other = { ...clipped, channel: 1 };
  const findings = allFindings(session(viewedFile('a.wav', { findings: [clipped, other] })));
  expect(findings.map(({ files }) => files)).toEqual([['a.wav'], ['a.wav']]);
  expect(new Set(findings.map(findingKey)).size).toBe(2);
});
