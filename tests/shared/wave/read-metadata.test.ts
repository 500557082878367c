import { describe, expect, it } from 'vitest';
import { scanXml } from '#shared/wave/scan-xml.ts';
import {
  bextChunk,
  cueChunks,
  ixmlChunk,
  sine,
  writeTestWave,
  type TestChunk,
} from '../../support/audio-writer.ts';
import { readTrack } from '../../support/reading.ts';

function withChunks(before: TestChunk[], after: TestChunk[] = [], sampleRateHz = 48000) {
  const channels = [sine(1000, 16)];
  return readTrack(
    writeTestWave({ sampleRateHz, encoding: 'pcm', bits: 16, channels, before, after }),
  );
}

describe('the time reference of bext (EBU Tech 3285 v2)', () => {
  // 01:00:00 and 24 h in frames: arithmetic, seconds × rate.
  it.each([
    [0n, 0],
    [172_800_000n, 3600 * 48000],
    [16_588_800_000n, 86400 * 192000],
  ])('%s is read from 64 bits', async (timeReference, frames) => {
    const { format } = await withChunks([bextChunk({ timeReference })]);
    expect(format.timeReferenceFrames).toBe(frames);
  });

  it('is the same in all versions, before and after the audio', async () => {
    for (const version of [0, 1, 2] as const) {
      const chunk = bextChunk({
        timeReference: 4800n,
        version,
        codingHistory: 'A=PCM,F=48000\r\n',
      });
      expect((await withChunks([chunk])).format.timeReferenceFrames).toBe(4800);
      expect((await withChunks([], [chunk])).format.timeReferenceFrames).toBe(4800);
    }
  });

  it('is absent where the chunk is cut before it or the number is no time', async () => {
    const cut = { id: 'bext', bytes: bextChunk({ timeReference: 1n }).bytes.subarray(0, 345) };
    expect((await withChunks([cut])).format.timeReferenceFrames).toBeNull();
    const huge = bextChunk({ timeReference: 0xffffffffffffffffn });
    expect((await withChunks([huge])).format.timeReferenceFrames).toBeNull();
  });
});

describe('iXML', () => {
  const speed = (rate: number) =>
    `<SPEED><TIMESTAMP_SAMPLE_RATE>${rate}</TIMESTAMP_SAMPLE_RATE>` +
    '<TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI>1</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI>' +
    '<TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO>96000</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO></SPEED>';
  const track = (name: string) =>
    `<TRACK><CHANNEL_INDEX>1</CHANNEL_INDEX><NAME>${name}</NAME></TRACK>`;

  it('gives the time where bext does not', async () => {
    const { format } = await withChunks([ixmlChunk(speed(48000))]);
    expect(format.timeReferenceFrames).toBe(2 ** 32 + 96000);
    const both = await withChunks([ixmlChunk(speed(48000)), bextChunk({ timeReference: 5n })]);
    expect(both.format.timeReferenceFrames).toBe(5);
  });

  it('gives no time that is counted at another rate', async () => {
    const { format } = await withChunks([ixmlChunk(speed(44100))]);
    expect(format.timeReferenceFrames).toBeNull();
  });

  it('gives the name all channels share', async () => {
    const named = (...names: string[]) =>
      withChunks([ixmlChunk(`<TRACK_LIST>${names.map(track).join('')}</TRACK_LIST>`)]);
    expect((await named('Kick &amp; Sn&#228;re <![CDATA[<in>]]>')).trackName).toBe(
      'Kick & Snäre <in>',
    );
    expect((await named('Piano', 'Piano')).trackName).toBe('Piano');
    expect((await named('L', 'R')).trackName).toBeNull();
    expect((await named('')).trackName).toBeNull();
  });

  it('is left alone where it is not plainly well formed', async () => {
    const bodies = [
      '<TRACK_LIST><TRACK><NAME>a</TRACK></TRACK_LIST>',
      '<NAME>',
      '</BWFXML><b/>',
      '<a b=c/>',
    ];
    for (const body of bodies) {
      const reading = await withChunks([ixmlChunk(`${speed(48000)}${body}`)]);
      expect(reading).toMatchObject({ trackName: null, format: { timeReferenceFrames: null } });
    }
  });

  it('has no document type and no entities of its own', () => {
    expect(scanXml('<!DOCTYPE a [<!ENTITY b "boom">]><a>&b;</a>')).toBeNull();
    expect(scanXml('<a><!ENTITY b SYSTEM "file:///etc/passwd"></a>')).toBeNull();
    expect(scanXml(`${'<a>'.repeat(100)}${'</a>'.repeat(100)}`)).toBeNull();
    expect(scanXml(`<a>${'<b/>'.repeat(10_000)}</a>`)).toBeNull();
    expect(scanXml('<a><b x="1">t</b><!-- <c> --></a>')?.map(({ path }) => path)).toEqual([
      'a',
      'a/b',
    ]);
  });
});

describe('markers', () => {
  it('are cue points with their labels, in the order of time', async () => {
    const { markers } = await withChunks(
      [],
      cueChunks([
        { startFrame: 700, label: 'Chorus' },
        { startFrame: 10, label: 'Vers – één' },
        { startFrame: 5000, label: 'beyond the end' },
      ]),
    );
    expect(markers).toEqual([
      { startFrame: 10, label: 'Vers – één' },
      { startFrame: 700, label: 'Chorus' },
    ]);
  });

  it('survive counts and sizes that lie', async () => {
    const [cue, list] = cueChunks([{ startFrame: 10, label: 'A' }]);
    const manyCues = Buffer.from(cue!.bytes);
    manyCues.writeUInt32LE(0xffffffff, 0);
    const longLabel = Buffer.from(list!.bytes);
    longLabel.writeUInt32LE(0xffffffff, 8);
    const { markers } = await withChunks(
      [],
      [
        { id: 'cue ', bytes: manyCues },
        { id: 'LIST', bytes: longLabel },
      ],
    );
    expect(markers).toEqual([{ startFrame: 10, label: 'A' }]);
  });
});
