import { allocate, resetArena } from './arena';
import { offsetBytes, slackBytes, swapBytes, takeChannel } from './canonical-bytes';
import { blockFrames, historyFrames } from './block';
import { Channel, newChannel } from './channel';
import { finishCrc, resetCrc, updateCrc } from './crc32';
import { decode, Kind } from './decode';
import { finishChannel, measureChannel } from './measure-channel';
import { sumProducts } from './pairs';
import {
  bigEndian,
  channels,
  dataBytes,
  dataOffset,
  measured,
  placeParameters,
  readParameters,
  sampleBytes,
  sampleKind,
  signedBytes,
} from './parameters';
import { openResults, put, resultList } from './results';
import { prepareTruePeak } from './true-peak';
import { decodeStereo16, decodeStereo24 } from './stereo-blocks';
import { finishHash, newHash, updateHash } from './xxh3';

/**
 * The meters of one file: start and write the parameters, open, then put bytes at the input and
 * accept them until the file's last, then finish. All state lives in this module, so it measures
 * one file at a time.
 */

/** Room for one reading of the source besides an unfinished block. */
const readingBytes: usize = 1 << 20;

/** More than one channel's results can be: five lists of places and some thirty numbers. */
const mostResultsOfChannel: i32 = 4096;

/** Bytes of a decoded sample. */
let sampleSize: usize = 0;
let blockBytes: usize = 0;
let channelList: usize = 0;
/** Per pair of channels the sum of their products. */
let products: usize = 0;

let input: usize = 0;
let inputRoom: usize = 0;
let filled: usize = 0;
/** A block turned into canonical byte order. */
let scratch: usize = 0;

let bytesToSkip: f64 = 0;
let bytesToMeasure: f64 = 0;
let framesDone: f64 = 0;

/** Forgets the file before; returns where the parameters of the next one go. */
export function start(): usize {
  resetArena();
  resetCrc();
  prepareTruePeak();
  return placeParameters();
}

export function open(): void {
  readParameters();
  const wide = sampleKind == Kind.pcm32 || sampleKind == Kind.float64;
  sampleSize = wide ? 8 : 4;
  blockBytes = <usize>blockFrames * sampleBytes * channels;
  bytesToSkip = dataOffset;
  bytesToMeasure = dataBytes;
  framesDone = 0;
  filled = 0;
  inputRoom = readingBytes + blockBytes;
  input = allocate(inputRoom + slackBytes);
  scratch = allocate(blockBytes + slackBytes);
  channelList = allocate((<usize>measured) << 2);
  products = allocate((<usize>measured) << 2);
  for (let c = 0; c < measured; c++) {
    const channel = newChannel(sampleSize);
    store<usize>(channelList + ((<usize>c) << 2), changetype<usize>(channel));
  }
  openResults(measured * mostResultsOfChannel);
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
  const skipped = <usize>Math.min(bytesToSkip, <f64>filled);
  bytesToSkip -= <f64>skipped;
  let from = input + skipped;
  let left = filled - skipped;
  while (left >= blockBytes && bytesToMeasure >= <f64>blockBytes) {
    measureBlock(from, blockFrames);
    from += blockBytes;
    left -= blockBytes;
    bytesToMeasure -= <f64>blockBytes;
  }
  // Less than a block waits for more; what lies behind the sample data is of no interest.
  filled = <usize>Math.min(<f64>left, bytesToMeasure);
  memory.copy(input, from, filled);
}

/** Measures the last, shorter block and returns the address of the results. */
export function finish(): usize {
  const frames = <i32>(filled / (sampleBytes * channels));
  measureBlock(input, frames);
  put(framesDone);
  put(<f64>finishCrc());
  for (let c = 0; c < measured; c++) {
    if (sampleSize == 4) finishChannel<f32>(channelAt(c), framesDone);
    else finishChannel<f64>(channelAt(c), framesDone);
  }
  for (let pair = 0; pair < measured >> 1; pair++) put(load<f64>(products + ((<usize>pair) << 3)));
  put(<f64>joinDigests());
  return resultList();
}

function measureBlock(bytes: usize, frames: i32): void {
  const count = <usize>frames;
  const block = toCanonicalOrder(bytes, count * channels * sampleBytes);
  const allFinite = decodeBlock(block, count);
  for (let c = 0; c < measured; c++) {
    const channel = channelAt(c);
    const own = channels == 1 ? block : channel.bytes;
    if (frames == blockFrames) updateHash(channel.hash, own, count * sampleBytes);
    else finishHash(channel.hash, own, count * sampleBytes);
    if (frames == 0) continue;
    if (sampleSize == 4) measureChannel<f32>(channel, own, framesDone, frames, allFinite);
    else measureChannel<f64>(channel, own, framesDone, frames, allFinite);
  }
  for (let pair = 0; pair < measured >> 1; pair++) addProducts(pair, frames);
  for (let c = 0; c < measured; c++) keepHistory(channelAt(c), frames);
  framesDone += <f64>frames;
}

/** Fills every channel's samples and, of several channels, bytes. */
function decodeBlock(block: usize, frames: usize): bool {
  const one = channelAt(0);
  if (channels == 1) return decode(<Kind>sampleKind, block, one.samples, frames);
  if (channels == 2 && (sampleKind == Kind.pcm16 || sampleKind == Kind.pcm24)) {
    const other = channelAt(1);
    if (sampleKind == Kind.pcm16) {
      decodeStereo16(block, frames, one.samples, other.samples, one.bytes, other.bytes);
    } else {
      decodeStereo24(block, frames, one.samples, other.samples, one.bytes, other.bytes);
    }
    return true;
  }
  let allFinite = true;
  for (let c = 0; c < measured; c++) {
    const channel = channelAt(c);
    takeChannel(block + <usize>c * sampleBytes, channel.bytes, frames, sampleBytes, channels);
    if (!decode(<Kind>sampleKind, channel.bytes, channel.samples, frames)) allFinite = false;
  }
  return allFinite;
}

function toCanonicalOrder(bytes: usize, size: usize): usize {
  if (signedBytes) offsetBytes(bytes, scratch, size);
  else if (bigEndian && sampleBytes > 1) swapBytes(bytes, scratch, size, sampleBytes);
  else return bytes;
  return scratch;
}

function addProducts(pair: i32, frames: i32): void {
  const one = channelAt(2 * pair);
  const other = channelAt(2 * pair + 1);
  const at = products + ((<usize>pair) << 3);
  const sum =
    sampleSize == 4 ? sumProducts<f32>(one, other, frames) : sumProducts<f64>(one, other, frames);
  store<f64>(at, load<f64>(at) + sum);
}

/** The last frames of this block come to lie in front of the next one. */
function keepHistory(channel: Channel, frames: i32): void {
  const history = <usize>historyFrames * sampleSize;
  const end = channel.samples + <usize>frames * sampleSize;
  memory.copy(channel.samples - history, end - history, history);
}

/** The identity of all channels: of one its own hash, of several the hash of their hashes. */
function joinDigests(): usize {
  if (measured == 1) return channelAt(0).hash.digest;
  const joined = allocate((<usize>measured) << 4);
  for (let c = 0; c < measured; c++) {
    memory.copy(joined + ((<usize>c) << 4), channelAt(c).hash.digest, 16);
  }
  const hash = newHash();
  finishHash(hash, joined, (<usize>measured) << 4);
  return hash.digest;
}
