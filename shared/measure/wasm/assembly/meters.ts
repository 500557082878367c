import { allocate, resetArena } from './arena';
import { offsetBytes, slackBytes, swapBytes, takeEveryNth, takeSide } from './canonical-bytes';
import { blockFrames, Channel, historyFrames, maxColumns, newChannel } from './channel';
import { finishCrc, resetCrc, updateCrc } from './crc32';
import { decode, Kind } from './decode';
import { finishChannel, measureChannel } from './measure-channel';
import { openOverview, overviewColumns, overviewFramesPerColumn } from './overview';
import { openResults, put, resultList } from './results';

/**
 * The meters of one file: open, then reserve and accept until the file's last byte, then finish.
 * All state lives in this module, so it measures one file at a time.
 */

/** Room for one reading of the source besides an unfinished block. */
const readingBytes: usize = 1 << 20;

let kind: Kind = Kind.pcm16;
let sampleBytes: usize = 0;
let sampleSize: usize = 0;
let channels: usize = 0;
/** Channels that are measured: the first 64. */
let measured: i32 = 0;
let bigEndian: bool = false;
let signedBytes: bool = false;

let input: usize = 0;
let inputRoom: usize = 0;
let filled: usize = 0;
let scratch: usize = 0;
let channelList: usize = 0;

let bytesToSkip: f64 = 0;
let bytesToMeasure: f64 = 0;
let framesDone: f64 = 0;

export function open(
  sampleKind: i32,
  bytesOfSample: i32,
  isBigEndian: bool,
  isSigned8: bool,
  channelCount: i32,
  measuredChannels: i32,
  sampleRateHz: f64,
  bits: i32,
  frames: f64,
  dataOffset: f64,
  dataBytes: f64,
): void {
  resetArena();
  resetCrc();
  kind = <Kind>sampleKind;
  sampleBytes = <usize>bytesOfSample;
  sampleSize = kind == Kind.pcm32 || kind == Kind.float64 ? 8 : 4;
  channels = <usize>channelCount;
  measured = measuredChannels;
  bigEndian = isBigEndian;
  signedBytes = isSigned8;
  bytesToSkip = dataOffset;
  bytesToMeasure = dataBytes;
  framesDone = 0;
  filled = 0;
  const blockBytes = <usize>blockFrames * sampleBytes * channels;
  inputRoom = readingBytes + blockBytes;
  input = allocate(inputRoom + slackBytes);
  scratch = allocate(blockBytes + slackBytes);
  channelList = allocate((<usize>measured) << 2);
  for (let c = 0; c < measured; c++) {
    store<usize>(
      channelList + ((<usize>c) << 2),
      changetype<usize>(newChannel(sampleSize, sampleBytes)),
    );
  }
  openOverview(frames, maxColumns);
  openResults(64 + measured * 4096);
}

function channelAt(index: i32): Channel {
  return changetype<Channel>(load<usize>(channelList + ((<usize>index) << 2)));
}

/** Where the next bytes of the file go. */
export function inputAddress(): usize {
  return input + filled;
}

/** How many may go there. */
export function inputSpace(): usize {
  return inputRoom - filled;
}

/** Measures as much as is complete of what lies at the input. */
export function accept(bytes: usize): void {
  updateCrc(input + filled, bytes);
  filled += bytes;
  let from = input;
  let left = filled;
  const skipped = <usize>Math.min(bytesToSkip, <f64>left);
  bytesToSkip -= <f64>skipped;
  from += skipped;
  left -= skipped;

  const blockBytes = <usize>blockFrames * sampleBytes * channels;
  while (left >= blockBytes && bytesToMeasure >= <f64>blockBytes) {
    measureBlock(from, blockFrames);
    from += blockBytes;
    left -= blockBytes;
    bytesToMeasure -= <f64>blockBytes;
  }
  // Less than a block waits for more; what lies behind the sample data is of no interest.
  filled = bytesToMeasure < <f64>blockBytes ? <usize>Math.min(<f64>left, bytesToMeasure) : left;
  memory.copy(input, from, filled);
}

/** Measures the last, shorter block and returns the address of the results. */
export function finish(): usize {
  const frames = <i32>(filled / (sampleBytes * channels));
  if (frames > 0) measureBlock(input, frames);
  put(framesDone);
  put(<f64>finishCrc());
  put(<f64>overviewFramesPerColumn());
  put(<f64>overviewColumns());
  for (let c = 0; c < measured; c++) finishChannel(channelAt(c));
  return resultList();
}

function measureBlock(bytes: usize, frames: i32): void {
  const count = <usize>frames;
  const size = count * channels * sampleBytes;
  let block = bytes;
  if (bigEndian && sampleBytes > 1) {
    swapBytes(bytes, scratch, size, sampleBytes);
    block = scratch;
  } else if (signedBytes) {
    offsetBytes(bytes, scratch, size);
    block = scratch;
  }
  for (let c = 0; c < measured; c++) {
    const channel = channelAt(c);
    let own = block;
    if (channels > 1) {
      own = channel.bytes;
      const first = block + <usize>c * sampleBytes;
      if (channels == 2) takeSide(first, own, count, sampleBytes);
      else takeEveryNth(first, own, own + count * sampleBytes, sampleBytes, channels);
    }
    const clean = !decode(kind, own, channel.samples, count);
    if (sampleSize == 4) measureChannel<f32>(channel, own, framesDone, frames, clean);
    else measureChannel<f64>(channel, own, framesDone, frames, clean);
  }
  for (let c = 0; c < measured; c++) keepHistory(channelAt(c), frames);
  framesDone += <f64>frames;
}

/** The last frames of this block come to lie in front of the next one. */
function keepHistory(channel: Channel, frames: i32): void {
  const history = <usize>historyFrames * sampleSize;
  const end = channel.samples + <usize>frames * sampleSize;
  memory.copy(channel.samples - history, end - history, history);
}
