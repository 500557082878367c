import { describe, expect, it } from 'vitest';
import { centredOn, panned, withinSong, zoomed } from '../../../src/check/time-view.ts';

const song = 200;
const whole = { startSeconds: 0, endSeconds: song };

describe('the stretch in view', () => {
  it('keeps the moment under the pointer where it is while zooming', () => {
    const closer = zoomed(whole, 0.5, 0.25, song);
    expect(closer).toEqual({ startSeconds: 25, endSeconds: 125 });
    // A quarter across was and is the second 50.
    expect(closer.startSeconds + 0.25 * 100).toBe(50);
  });

  it('is never wider than the song nor closer than a tenth of a second', () => {
    expect(zoomed(whole, 3, 0.5, song)).toEqual(whole);
    const closest = zoomed(whole, 1e-9, 0.5, song);
    expect(closest.endSeconds - closest.startSeconds).toBeCloseTo(0.1, 9);
  });

  it('moves by a part of itself and stops at both ends', () => {
    const middle = { startSeconds: 80, endSeconds: 120 };
    expect(panned(middle, 0.25, song)).toEqual({ startSeconds: 90, endSeconds: 130 });
    expect(panned(middle, 50, song)).toEqual({ startSeconds: 160, endSeconds: 200 });
    expect(panned(middle, -50, song)).toEqual({ startSeconds: 0, endSeconds: 40 });
  });

  it('goes to a place at the same width, and to the edge where the place is near it', () => {
    const view = { startSeconds: 0, endSeconds: 40 };
    expect(centredOn(view, 100, song)).toEqual({ startSeconds: 80, endSeconds: 120 });
    expect(centredOn(view, 199, song)).toEqual({ startSeconds: 160, endSeconds: 200 });
  });

  it('lies within a song that is shorter than any view', () => {
    expect(withinSong({ startSeconds: 3, endSeconds: 4 }, 0.05)).toEqual({
      startSeconds: 0,
      endSeconds: 0.05,
    });
  });
});
