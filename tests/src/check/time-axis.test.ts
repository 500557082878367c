import { describe, expect, it } from 'vitest';
import { clockTime, rulerMarks, secondsPerBar } from '../../../src/check/time-axis.ts';

const fourFour = { bpm: 112, beatsPerBar: 4, beatUnit: 4, startBar: 1 };

describe('clock times', () => {
  it('counts minutes and seconds, and milliseconds where asked', () => {
    expect(clockTime(0)).toBe('0:00');
    expect(clockTime(59.9)).toBe('0:59');
    expect(clockTime(61)).toBe('1:01');
    expect(clockTime(600.25, true)).toBe('10:00.250');
  });

  it('carries what rounds up over to the next minute', () => {
    expect(clockTime(59.9996, true)).toBe('1:00.000');
  });
});

describe('bars', () => {
  it('last as long as their quarter notes', () => {
    // 112 quarters a minute: four of them last 240/112 s; a bar of 6/8 has three.
    expect(secondsPerBar(fourFour)).toBeCloseTo(240 / 112, 12);
    expect(secondsPerBar({ ...fourFour, bpm: 96, beatsPerBar: 6, beatUnit: 8 })).toBeCloseTo(
      180 / 96,
      12,
    );
  });
});

describe('marks on the ruler', () => {
  it('stand at whole bars, numbered from the bar at the start line', () => {
    const grid = { ...fourFour, bpm: 120, startBar: 5 };
    // A bar lasts two seconds: 16 bars, a mark at every second one.
    const marks = rulerMarks({ startSeconds: 0, endSeconds: 32 }, grid);
    expect(marks.map(({ label }) => label)).toEqual(['5', '7', '9', '11', '13', '15', '17', '19']);
    expect(marks[1]).toEqual({ at: 0.125, label: '7', time: '0:04' });
  });

  it('stand at round times without a tempo, and where less than two bars are in view', () => {
    const withoutTempo = rulerMarks({ startSeconds: 0, endSeconds: 240 }, null);
    expect(withoutTempo[1]).toEqual({ at: 0.125, label: '0:30' });
    const close = rulerMarks({ startSeconds: 10, endSeconds: 11 }, { ...fourFour, bpm: 60 });
    expect(close[0]).toEqual({ at: 0, label: '0:10.000' });
  });

  it('never run over the right edge, whatever is in view', () => {
    for (const span of [0.1, 0.7, 3, 59, 240, 7_200]) {
      for (const startSeconds of [0, 0.3, 1234.5]) {
        for (const grid of [null, fourFour]) {
          const marks = rulerMarks({ startSeconds, endSeconds: startSeconds + span }, grid);
          expect(marks.length).toBeLessThanOrEqual(10);
          for (const { at } of marks) {
            expect(at).toBeGreaterThanOrEqual(-1e-6);
            expect(at).toBeLessThanOrEqual(0.94);
          }
        }
      }
    }
  });

  it('are not there while nothing is in view', () => {
    expect(rulerMarks({ startSeconds: 0, endSeconds: 0 }, fourFour)).toEqual([]);
  });
});
