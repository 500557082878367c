import { expect, it } from 'vitest';
import { editionFromLink } from '../../../src/check/check-rules.ts';
import { isCopyOf } from '../../../src/check/intake-list.ts';
import { readAgainWords } from '../../../src/check/session-files.ts';

it.each([
  ['https://flightcase.example/rules/harbour-lane-mixing/2', 2],
  ['flightcase.example/rules/harbour-lane-mixing', 'latest'],
  ['/rules/harbour-lane-mixing/', 'latest'],
  ['https://flightcase.example/check?rules=harbour-lane-mixing%2F3', 3],
  ['harbour-lane-mixing/1', 1],
])('finds the edition in %s', (link, number) => {
  expect(editionFromLink(link)).toEqual({ slug: 'harbour-lane-mixing', number });
});

it.each(['', 'https://flightcase.example/', 'Harbour Lane', '/reports/17'])(
  'finds none in "%s"',
  (link) => {
    expect(editionFromLink(link)).toBeNull();
  },
);

it('knows a download that the browser numbered', () => {
  expect(isCopyOf('Paper Ferry - 96 BPM (2).zip', 'Paper Ferry - 96 BPM.zip')).toBe(true);
  expect(isCopyOf('Paper Ferry - 96 BPM old.zip', 'Paper Ferry - 96 BPM.zip')).toBe(false);
});

it('says what a second reading found', () => {
  expect(readAgainWords({ files: 40, changed: 2, gone: 0 })).toBe(
    '2 of 40 files were new or changed, and only those were read again.',
  );
  expect(readAgainWords({ files: 1, changed: 1, gone: 2 })).toBe(
    '1 of 1 file was new or changed, and only that was read again. 2 files are no longer there.',
  );
});
