/**
 * Writes audio files for tests, right ones and wrong ones. It shares no code with the reader and
 * goes about it differently (Node's Buffer, BigInt), so that both cannot make the same mistake.
 */

export type TestChunk = { id: string; bytes: Uint8Array };

export type TestSamples = {
  sampleRateHz: number;
  encoding: 'pcm' | 'float';
  /** Valid bits; samples are left-justified in whole bytes. */
  bits: number;
  /** Where it is wider than the bits need. */
  containerBits?: number;
  /**
   * One row a channel, all of one length. PCM: whole numbers from -2^(bits-1) on, float: as is.
   */
  channels: readonly ArrayLike<number>[];
};

export type TestWave = TestSamples & {
  form?: 'RIFF' | 'RF64' | 'BW64';
  /** WAVE_FORMAT_EXTENSIBLE; its mask. */
  channelMask?: number;
  before?: readonly TestChunk[];
  after?: readonly TestChunk[];
  /** Written behind everything, belonging to no chunk. */
  trailing?: Uint8Array;
  /** Lies: what is written instead of the right number. */
  lies?: {
    riffBytes?: number;
    dataBytes?: number;
    blockAlign?: number;
    byteRate?: number;
    channels?: number;
    sampleRateHz?: number;
    bits?: number;
    tag?: number;
    validBits?: number;
  };
  /** Odd chunks are not followed by a zero, as some writers have it. */
  forgetPadBytes?: boolean;
};

/** Whole numbers for a few cycles of a sine at half of full scale; float: from -0.5 to 0.5. */
export function sine(frames: number, bits: number | 'float', cycles = 3): number[] {
  const top = bits === 'float' ? 0.5 : 2 ** (bits - 2);
  return Array.from({ length: frames }, (_, i) => {
    const value = top * Math.sin((2 * Math.PI * cycles * i) / frames);
    return bits === 'float' ? Math.fround(value) : Math.round(value);
  });
}

function containerBytes({ bits, containerBits }: TestSamples): number {
  return containerBits === undefined ? Math.ceil(bits / 8) : containerBits / 8;
}

/** Interleaved samples as they stand in the file. */
export function sampleBytes(samples: TestSamples, order: 'le' | 'be', unsigned8: boolean): Buffer {
  const width = containerBytes(samples);
  const frames = samples.channels[0]?.length ?? 0;
  const bytes = Buffer.alloc(frames * samples.channels.length * width);
  const shift = BigInt(width * 8 - samples.bits);
  let at = 0;
  for (let frame = 0; frame < frames; frame++) {
    for (const channel of samples.channels) {
      const value = channel[frame]!;
      if (samples.encoding === 'float') {
        if (width === 4 && order === 'le') bytes.writeFloatLE(value, at);
        else if (width === 4) bytes.writeFloatBE(value, at);
        else if (order === 'le') bytes.writeDoubleLE(value, at);
        else bytes.writeDoubleBE(value, at);
      } else if (width === 1 && unsigned8) {
        bytes.writeUInt8(Number(BigInt(value) << shift) + 128, at);
      } else {
        const placed = BigInt.asUintN(width * 8, BigInt(value) << shift);
        for (let i = 0; i < width; i++) {
          const byte = Number((placed >> BigInt(8 * i)) & 0xffn);
          bytes[order === 'le' ? at + i : at + width - 1 - i] = byte;
        }
      }
      at += width;
    }
  }
  return bytes;
}

function u16(value: number): Buffer {
  const bytes = Buffer.alloc(2);
  bytes.writeUInt16LE(value);
  return bytes;
}

function u32(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(value);
  return bytes;
}

function u64(value: number): Buffer {
  const bytes = Buffer.alloc(8);
  bytes.writeBigUInt64LE(BigInt(value));
  return bytes;
}

function riffChunk({ id, bytes }: TestChunk, forgetPad = false): Buffer {
  const pad = Buffer.alloc(forgetPad ? 0 : bytes.length % 2);
  return Buffer.concat([Buffer.from(id, 'latin1'), u32(bytes.length), bytes, pad]);
}

/** A WAV file; with `lies`, as wrong as asked for. */
export function writeTestWave(wave: TestWave): Buffer {
  const { lies = {}, channelMask, form = 'RIFF', forgetPadBytes } = wave;
  const width = containerBytes(wave);
  const channels = lies.channels ?? wave.channels.length;
  const blockAlign = width * wave.channels.length;
  const tag = lies.tag ?? (wave.encoding === 'pcm' ? 1 : 3);
  const rate = lies.sampleRateHz ?? wave.sampleRateHz;
  const start = [
    u16(channelMask === undefined ? tag : 0xfffe),
    u16(channels),
    u32(rate),
    u32(lies.byteRate ?? rate * blockAlign),
    u16(lies.blockAlign ?? blockAlign),
    u16(lies.bits ?? (channelMask === undefined ? wave.bits : width * 8)),
  ];
  const extension =
    channelMask === undefined
      ? []
      : [
          u16(22),
          u16(lies.validBits ?? wave.bits),
          u32(channelMask),
          u16(tag),
          Buffer.from('000000001000800000aa00389b71', 'hex'),
        ];
  const data = sampleBytes(wave, 'le', true);
  const large = form !== 'RIFF';
  const parts = [
    ...(wave.before ?? []).map((chunk) => riffChunk(chunk, forgetPadBytes)),
    riffChunk({ id: 'fmt ', bytes: Buffer.concat([...start, ...extension]) }),
  ];
  const pad = Buffer.alloc(forgetPadBytes ? 0 : data.length % 2);
  const tail = [
    Buffer.from('data'),
    u32(lies.dataBytes ?? (large ? 0xffffffff : data.length)),
    data,
    pad,
    ...(wave.after ?? []).map((chunk) => riffChunk(chunk, forgetPadBytes)),
  ];
  const bodyBytes = Buffer.concat([...parts, ...tail]).length;
  const riffBytes = 4 + bodyBytes + (large ? 36 : 0);
  const ds64 = large
    ? riffChunk({
        id: 'ds64',
        bytes: Buffer.concat([
          u64(riffBytes),
          u64(data.length),
          u64(data.length / blockAlign),
          u32(0),
        ]),
      })
    : Buffer.alloc(0);
  return Buffer.concat([
    Buffer.from(form),
    u32(lies.riffBytes ?? (large ? 0xffffffff : riffBytes)),
    Buffer.from('WAVE'),
    ds64,
    ...parts,
    ...tail,
    wave.trailing ?? Buffer.alloc(0),
  ]);
}

export type TestAiff = TestSamples & {
  /** AIFC compression type; plain AIFF without it. */
  compression?: string;
  before?: readonly TestChunk[];
  after?: readonly TestChunk[];
  /** SSND after its own offset field: bytes between its head and the first sample. */
  lead?: number;
  lies?: {
    frames?: number;
    ssndBytes?: number;
    rate?: Uint8Array;
    channels?: number;
    bits?: number;
  };
};

function b16(value: number): Buffer {
  const bytes = Buffer.alloc(2);
  bytes.writeUInt16BE(value);
  return bytes;
}

function b32(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value);
  return bytes;
}

function iffChunk({ id, bytes }: TestChunk): Buffer {
  const pad = Buffer.alloc(bytes.length % 2);
  return Buffer.concat([Buffer.from(id, 'latin1'), b32(bytes.length), bytes, pad]);
}

/** A whole number as the 80-bit float of AIFF: shift until its top bit is the mantissa's top. */
export function extended80(value: number): Buffer {
  let exponent = 16383 + 63;
  let mantissa = BigInt(value);
  while (mantissa < 1n << 63n) {
    mantissa <<= 1n;
    exponent -= 1;
  }
  const bytes = Buffer.alloc(10);
  bytes.writeUInt16BE(exponent);
  bytes.writeBigUInt64BE(mantissa, 2);
  return bytes;
}

const littleEndianTypes = ['sowt', '42ni', '23ni'];

/** An AIFF or AIFC file. */
export function writeTestAiff(aiff: TestAiff): Buffer {
  const { compression, lies = {}, lead = 0 } = aiff;
  const order = littleEndianTypes.includes(compression ?? '') ? 'le' : 'be';
  const data = sampleBytes(aiff, order, compression === 'raw ');
  const frames = aiff.channels[0]?.length ?? 0;
  const comm = Buffer.concat([
    b16(lies.channels ?? aiff.channels.length),
    b32(lies.frames ?? frames),
    b16(lies.bits ?? aiff.bits),
    lies.rate ?? extended80(aiff.sampleRateHz),
    compression === undefined ? Buffer.alloc(0) : Buffer.from(`${compression}\0\0`, 'latin1'),
  ]);
  const ssnd = iffChunk({
    id: 'SSND',
    bytes: Buffer.concat([b32(lead), b32(0), Buffer.alloc(lead), data]),
  });
  if (lies.ssndBytes !== undefined) ssnd.writeUInt32BE(lies.ssndBytes, 4);
  const body = Buffer.concat([
    ...(compression === undefined
      ? []
      : [iffChunk({ id: 'FVER', bytes: Buffer.from('a2805140', 'hex') })]),
    iffChunk({ id: 'COMM', bytes: comm }),
    ...(aiff.before ?? []).map(iffChunk),
    ssnd,
    ...(aiff.after ?? []).map(iffChunk),
  ]);
  const kind = compression === undefined ? 'AIFF' : 'AIFC';
  return Buffer.concat([Buffer.from('FORM'), b32(4 + body.length), Buffer.from(kind), body]);
}

/** A bext chunk of version 0 to 2 (EBU Tech 3285, table of section 2.3), 602 bytes and history. */
export function bextChunk(fields: {
  description?: string;
  originator?: string;
  originatorReference?: string;
  timeReference?: bigint;
  version?: 0 | 1 | 2;
  umid?: Uint8Array;
  loudness?: readonly number[];
  codingHistory?: string;
}): TestChunk {
  const history = Buffer.from(fields.codingHistory ?? '', 'latin1');
  const bytes = Buffer.alloc(602 + history.length);
  bytes.write(fields.description ?? '', 0, 256, 'latin1');
  bytes.write(fields.originator ?? '', 256, 32, 'latin1');
  bytes.write(fields.originatorReference ?? '', 288, 32, 'latin1');
  bytes.write('2026-12-01', 320, 'latin1');
  bytes.write('10-15-00', 330, 'latin1');
  bytes.writeBigUInt64LE(fields.timeReference ?? 0n, 338);
  bytes.writeUInt16LE(fields.version ?? 0, 346);
  bytes.set(fields.umid ?? [], 348);
  (fields.loudness ?? []).forEach((value, index) => bytes.writeInt16LE(value, 412 + 2 * index));
  history.copy(bytes, 602);
  return { id: 'bext', bytes };
}

/** `cue ` and the `LIST adtl` that names its points. */
export function cueChunks(markers: readonly { startFrame: number; label: string }[]): TestChunk[] {
  const points = markers.map(({ startFrame }, index) =>
    Buffer.concat([
      u32(index + 1),
      u32(startFrame),
      Buffer.from('data'),
      u32(0),
      u32(0),
      u32(startFrame),
    ]),
  );
  const labels = markers.map(({ label }, index) =>
    riffChunk({ id: 'labl', bytes: Buffer.concat([u32(index + 1), Buffer.from(`${label}\0`)]) }),
  );
  return [
    { id: 'cue ', bytes: Buffer.concat([u32(markers.length), ...points]) },
    { id: 'LIST', bytes: Buffer.concat([Buffer.from('adtl'), ...labels]) },
  ];
}

/** A `LIST INFO` chunk; texts end with a NUL. */
export function infoChunk(fields: Readonly<Record<string, string>>): TestChunk {
  const parts = Object.entries(fields).map(([id, text]) =>
    riffChunk({ id, bytes: Buffer.from(`${text}\0`) }),
  );
  return { id: 'LIST', bytes: Buffer.concat([Buffer.from('INFO'), ...parts]) };
}

export function ixmlChunk(body: string): TestChunk {
  const text = `<?xml version="1.0" encoding="UTF-8"?>\n<BWFXML>${body}</BWFXML>\n`;
  return { id: 'iXML', bytes: Buffer.from(text) };
}
