import { describe, expect, it } from 'vitest';
import { emptyComparison, type Comparison, type Match } from '#shared/compare/comparison.ts';
import { sessionFormat } from '#shared/compare/session-format.ts';
import { speedRatio } from '#shared/compare/speed.ts';
import { looksLikeLooseClips, startEvidence, type TrackForStart } from '#shared/compare/starts.ts';
import { measuredFile, type BuiltFile } from '../../support/measure-builders.ts';

const song = 8_640_000;
const rules = { lengthToleranceFrames: 0, silentEndDbfs: -60 };

function track(file: BuiltFile = {}): TrackForStart {
  const { path, format, measures } = measuredFile(file);
  if (!format || !measures) throw new Error('a built track has both');
  return { path, format, measures };
}

function evidence(tracks: TrackForStart[], comparison: Partial<Comparison> = {}) {
  const formats = tracks.map(({ format }) => format);
  return startEvidence(
    tracks,
    sessionFormat(formats, [], 0),
    { ...emptyComparison(), ...comparison },
    rules,
  );
}

const full = (count: number, file: BuiltFile = {}) =>
  Array.from({ length: count }, () => track(file));

describe('sessionFormat', () => {
  const formatOf = (...files: BuiltFile['format'][]) =>
    sessionFormat(
      files.map((format) => track({ format: { ...format } }).format),
      [44_100],
      0,
    );

  it('takes what most tracks have', () => {
    expect(formatOf({}, {}, { sampleRateHz: 96_000, bits: 16 })).toMatchObject({
      sampleRateHz: 48_000,
      sampleRateEvenlySplit: false,
      bits: 24,
      encoding: 'pcm',
    });
  });

  it('takes an allowed rate on a tie, else the higher, and says that it is one', () => {
    expect(formatOf({}, { sampleRateHz: 44_100 })).toMatchObject({
      sampleRateHz: 44_100,
      sampleRateEvenlySplit: true,
    });
    expect(formatOf({}, { sampleRateHz: 96_000 })).toMatchObject({
      sampleRateHz: 96_000,
      sampleRateEvenlySplit: true,
    });
    expect(formatOf({ bits: 16 }, { bits: 24 })).toMatchObject({ bits: 24 });
  });

  it('is as long as most tracks, or as the longest where hardly two agree', () => {
    expect(formatOf({ frames: 100 }, { frames: 100 }, { frames: 200 })).toMatchObject({
      frames: 100,
      tracksWithThatLength: 2,
    });
    const lengths = [100, 200, 300, 400, 500, 600, 700, 700, 800];
    expect(formatOf(...lengths.map((frames) => ({ frames })))).toMatchObject({
      frames: 800,
      tracksWithThatLength: 1,
    });
  });

  it('counts lengths within the tolerance as one', () => {
    const formats = [1000, 1003, 1004, 2000].map((frames) => track({ format: { frames } }).format);
    expect(sessionFormat(formats, [], 3)).toMatchObject({ frames: 1003, tracksWithThatLength: 3 });
  });

  it('knows nothing of no tracks', () => {
    expect(sessionFormat([], [], 0)).toEqual({
      sampleRateHz: null,
      sampleRateEvenlySplit: false,
      bits: null,
      encoding: null,
      frames: null,
      tracksWithThatLength: 0,
    });
  });
});

describe('startEvidence', () => {
  it('proves starts by equal length', () => {
    expect(evidence(full(3)).map(({ proof }) => proof)).toEqual(Array(3).fill('equal-length'));
  });

  it('proves a start by a silent end, up to -60 dBFS', () => {
    const shorter = (tailPeakDbfs: number) =>
      track({ format: { frames: song - 1 }, channel: { tailPeakDbfs } });
    expect(evidence([...full(3), shorter(-60)]).at(-1)?.proof).toBe('silent-end');
    expect(evidence([...full(3), shorter(-59.9)]).at(-1)?.proof).toBeNull();
  });

  it('does not where fewer than half of the tracks share a length', () => {
    const lengths = [song, song, song - 10, song - 20, song - 30].map((frames) =>
      track({ format: { frames } }),
    );
    expect(evidence(lengths).every(({ proof }) => proof === null)).toBe(true);
  });

  it('does not where it sounds at once and the others do not', () => {
    const atOnce = (firstSoundFrame: number) =>
      track({ format: { frames: song - 96_000 }, channel: { firstSoundFrame } });
    // 10 ms at 48 kHz are 480 frames.
    expect(evidence([...full(3), atOnce(479)]).at(-1)).toMatchObject({
      proof: null,
      soundsAtOnce: true,
    });
    expect(evidence([...full(3), atOnce(480)]).at(-1)?.proof).toBe('silent-end');
    const beat = full(3, { channel: { firstSoundFrame: 0 } });
    expect(evidence([...beat, atOnce(0)]).at(-1)?.proof).toBe('silent-end');
  });

  it('does not where it keeps time with the others at their end', () => {
    const short = track({ path: 'Short.wav', format: { frames: song - 96_000 } });
    const agree = (agreementFromStart: number, agreementFromEnd: number) =>
      evidence([...full(3), short], {
        alignments: [
          { path: 'Short.wav', lackingFrames: 96_000, agreementFromStart, agreementFromEnd },
        ],
      }).at(-1);
    expect(agree(0.1, 0.25)).toMatchObject({ proof: null, fitsAtEnd: true });
    expect(agree(0.11, 0.25)).toMatchObject({ proof: 'silent-end', fitsAtEnd: false });
    expect(agree(0, 0.24)).toMatchObject({ proof: 'silent-end', fitsAtEnd: false });
  });

  it('does not where it is silent at its end for as long as others are at theirs', () => {
    // Full tracks: 8,639,999 - 8,400,000 frames, 5 s.
    const silentFor = (seconds: number) =>
      track({
        format: { frames: song - 96_000 },
        channel: { lastSoundFrame: song - 96_000 - 1 - Math.round(seconds * 48_000) },
      });
    expect(evidence([...full(3), silentFor(5.29)]).at(-1)?.proof).toBeNull();
    expect(evidence([...full(3), silentFor(5.31)]).at(-1)?.proof).toBe('silent-end');
    expect(evidence([...full(3), silentFor(0.1)]).at(-1)?.proof).toBe('silent-end');
  });

  it('proves starts by the time stamp most tracks carry, whatever their lengths', () => {
    const stamped = [song, song - 10, song - 20, song - 30].map((frames) =>
      track({ format: { frames, timeReferenceFrames: 172_800_000 } }),
    );
    expect(evidence(stamped).every(({ proof }) => proof === 'time-reference')).toBe(true);
  });

  it('compares stamps in seconds where rates differ', () => {
    // One hour: 172,800,000 frames at 48 kHz, 158,760,000 at 44.1 kHz.
    const tracks = [
      ...full(3, { format: { timeReferenceFrames: 172_800_000 } }),
      track({
        format: { sampleRateHz: 44_100, frames: 7_938_000, timeReferenceFrames: 158_760_000 },
      }),
    ];
    expect(evidence(tracks).at(-1)).toMatchObject({
      proof: 'time-reference',
      stampDifferenceFrames: 0,
    });
  });

  it('sees a cut start in a later stamp that ends inside the session', () => {
    const stamped = full(3, { format: { timeReferenceFrames: 0 } });
    const later = (frames: number) => track({ format: { frames, timeReferenceFrames: 960_000 } });
    expect(evidence([...stamped, later(song - 960_000)]).at(-1)).toMatchObject({
      proof: null,
      shiftFrames: 960_000,
    });
    // 50 ms at 48 kHz are 2,400 frames.
    expect(evidence([...stamped, later(song - 957_600)]).at(-1)?.shiftFrames).toBe(960_000);
    expect(evidence([...stamped, later(song - 957_599)]).at(-1)?.shiftFrames).toBeNull();
  });

  it('sees a cut start in the same sound later in a full file', () => {
    const short = track({ path: 'Copy.wav', format: { frames: song - 48_000 } });
    const tracks = [track({ path: 'Whole.wav' }), ...full(2), short];
    const match = (shiftFrames: number): Match => ({
      first: 'Whole.wav',
      second: 'Copy.wav',
      gainDb: 0,
      shiftFrames,
      inverted: false,
      differenceUnderDb: 80,
    });
    expect(evidence(tracks, { matches: [match(-48_000)] }).at(-1)?.shiftFrames).toBe(48_000);
    expect(evidence(tracks, { matches: [match(-40_000)] }).at(-1)?.shiftFrames).toBeNull();
  });
});

describe('looksLikeLooseClips', () => {
  const loose = (seconds: number[], soundingAtOnce: number, late = 0) => {
    const tracks = seconds.map((length, index) =>
      track({
        format: { frames: length * 48_000 },
        channel: {
          firstSoundFrame:
            index < soundingAtOnce ? 0 : index < seconds.length - late ? 480 : 250_000,
        },
      }),
    );
    return looksLikeLooseClips(
      tracks,
      sessionFormat(
        tracks.map(({ format }) => format),
        [],
        0,
      ),
    );
  };

  it('needs lengths that spread by more than a fifth', () => {
    expect(loose([80, 85, 90, 100], 4)).toBe(false);
    expect(loose([79, 85, 90, 100], 4)).toBe(true);
  });

  it('needs half of the files to sound at once', () => {
    expect(loose([50, 60, 70, 100], 1)).toBe(false);
    expect(loose([50, 60, 70, 100], 2)).toBe(true);
  });

  it('is refuted by a common length, by many late entries, and by equal stamps', () => {
    expect(loose([50, 60, 100, 100], 4)).toBe(false);
    expect(loose([50, 60, 70, 80, 100], 3, 2)).toBe(false);
    const stamped = [50, 60, 70, 100].map((seconds) =>
      track({
        format: { frames: seconds * 48_000, timeReferenceFrames: 48_000 },
        channel: { firstSoundFrame: 0 },
      }),
    );
    const session = sessionFormat(
      stamped.map(({ format }) => format),
      [],
      0,
    );
    expect(looksLikeLooseClips(stamped, session)).toBe(false);
  });
});

describe('speedRatio', () => {
  const session = {
    ...sessionFormat(
      full(4).map(({ format }) => format),
      [],
      0,
    ),
  };

  // 44.1/48 = 0.91875, its inverse 1.0884354 (arithmetic), half and double.
  it.each([44_100 / 48_000, 48_000 / 44_100, 0.5, 2])('knows %d, to 0.05 %%', (ratio) => {
    const at = (error: number) => speedRatio(Math.round(song * ratio * (1 + error)), session, 5);
    expect(at(0)).toBe(ratio);
    expect(at(0.00049)).toBe(ratio);
    expect(at(-0.00049)).toBe(ratio);
    expect(at(0.00051)).toBeNull();
    expect(at(-0.00051)).toBeNull();
  });

  it('says nothing where lengths all differ', () => {
    expect(speedRatio(song / 2, session, 9)).toBeNull();
    expect(speedRatio(song / 2, { ...session, tracksWithThatLength: 1 }, 2)).toBeNull();
  });
});
