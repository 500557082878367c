import { describe, expect, it } from 'vitest';
import { englishFormat as format } from '#shared/findings/catalogue/format-arguments.ts';

describe('englishFormat', () => {
  it.each([
    [0, '0:00'],
    [59.4, '0:59'],
    [59.6, '1:00'],
    [205, '3:25'],
    [3_745, '1:02:25'],
    [-12, '0:12'],
  ])('writes %d s as %s', (seconds, written) => expect(format.time(seconds)).toBe(written));

  it.each([
    [1.25, '0:01.250'],
    [59.9996, '1:00'],
    [3_599.9999, '1:00:00'],
    [62.345, '1:02.345'],
  ])('writes %d s to the millisecond as %s', (seconds, written) =>
    expect(format.time(seconds, true)).toBe(written),
  );

  it.each([
    [0.0833, '0.08 ms'],
    [0.4, '0.4 ms'],
    [9.96, '10 ms'],
    [12.4, '12 ms'],
    [1_200, '1,200 ms'],
  ])('writes %d as %s', (ms, written) => expect(format.milliseconds(ms)).toBe(written));

  it('writes levels with their sign where they are above full scale, and no negative zero', () => {
    expect(format.dbfs(-9.27)).toBe('-9.3 dBFS');
    expect(format.dbfs(2.34)).toBe('+2.3 dBFS');
    // 32767/32768 is -0.000265 dBFS.
    expect(format.dbfs(-0.000265)).toBe('0.0 dBFS');
    expect(format.dbtp(0.61)).toBe('+0.6 dBTP');
    expect(format.decibels(-3)).toBe('3.0 dB');
  });

  it('writes rates, depths, shares and counts as people do', () => {
    expect([44_100, 48_000, 88_200, 11_025, 100].map((rate) => format.rate(rate))).toEqual([
      '44.1 kHz',
      '48 kHz',
      '88.2 kHz',
      '11.025 kHz',
      '0.1 kHz',
    ]);
    expect(format.depth(24)).toBe('24-bit');
    expect(format.depth(32, 'float')).toBe('32-bit float');
    expect(format.percent(-2.34)).toBe('2.3 %');
    expect(format.percent(100)).toBe('100 %');
    expect(format.count(1, 'place', 'places')).toBe('1 place');
    expect(format.count(1_204_000, 'place', 'places')).toBe('1,204,000 places');
    expect(format.count(0, 'place', 'places')).toBe('0 places');
  });

  it('writes lists of files by their names', () => {
    expect(format.files(['Drums/Kick In.wav'])).toBe('Kick In');
    expect(format.files(['a.wav', 'b.wav'])).toBe('a and b');
    expect(format.files(['a.wav', 'b.wav', 'c.wav'])).toBe('a, b and c');
    expect(format.files(['Kick In.wav', 'Snare.wav', 'c.wav', 'd.wav', 'e.wav'])).toBe(
      'Kick In, Snare and 3 more',
    );
    expect(format.file('.hidden')).toBe('.hidden');
    expect(format.list(['48 kHz', '96 kHz'], 'or')).toBe('48 kHz or 96 kHz');
    expect(format.list([], 'or')).toBe('');
  });
});
