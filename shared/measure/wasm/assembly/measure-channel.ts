import { Channel } from './channel';
import { endClipping, findClipping } from './clipping';
import { endCycle, isCounting } from './cycles';
import { followGrid } from './grid';
import {
  blockHighest,
  blockLowest,
  blockPeak,
  blockSquares,
  blockSum,
  measureGranules,
} from './levels';
import { endOutliers, findNonNumbers, findOvers } from './outliers';
import { drawGranules } from './overview';
import { put, putPlaces } from './results';
import { edgePeak, isRamp } from './ramp';
import { endSilence, findSilence } from './silence';
import { findSound } from './sound';
import { findTruePeak } from './true-peak';
import { endWindows, fillWindows, findFloor, followTail } from './windows';

/**
 * All meters of one channel over one block of `frames`, of which `start` came before.
 * `clean` says that there was no NaN or infinity in it.
 */
export function measureChannel<T extends number>(
  channel: Channel,
  bytes: usize,
  start: f64,
  frames: i32,
  clean: bool,
): void {
  if (!clean) findNonNumbers<T>(channel, bytes, start, frames);
  else endOutliers(channel.notANumber, start);
  measureGranules<T>(channel.samples, frames);
  channel.lowest = min(channel.lowest, blockLowest);
  channel.highest = max(channel.highest, blockHighest);
  channel.sum += blockSum;
  channel.sumOfSquares += blockSquares;
  if (blockPeak > 1) findOvers<T>(channel, start, frames);
  else endOutliers(channel.overFullScale, start);
  drawGranules<T>(channel, frames);
  findSound<T>(channel, start, frames);
  fillWindows(channel, frames);
  followTail<T>(channel, start, frames);
  findTruePeak<T>(channel, frames);
  followGrid<T>(channel, frames);
  findClipping<T>(channel, start, frames);
  findSilence<T>(channel, start, frames);
  if (start == 0) {
    channel.startEdgeRamps = isRamp<T>(channel.samples, 1, <f64>frames);
    channel.startEdgePeak = edgePeak;
  }
}

/** Ends what is still going on behind frame `end`, the file's last, and puts all results. */
export function finishChannel<T extends number>(channel: Channel, end: f64): void {
  endOutliers(channel.notANumber, end);
  endOutliers(channel.overFullScale, end);
  endWindows(channel);
  endClipping<T>(channel, end);
  if (isCounting(channel.cycles)) endCycle(channel.cycles);
  endSilence<T>(channel, end, 0);
  const endEdgeRamps = isRamp<T>(channel.samples - sizeof<T>(), -1, end);

  put(channel.lowest);
  put(channel.highest);
  put(channel.sum);
  put(channel.sumOfSquares);
  put(channel.soundingSum);
  put(channel.soundingFrames);
  put(channel.firstSound);
  put(channel.lastSound);
  put(channel.truePeak);
  put(<f64>channel.gridBits);
  putClipping(channel);
  putPlaces(channel.overFullScale.places);
  putPlaces(channel.notANumber.places);
  put(channel.silenceStart);
  put(channel.silenceEnd);
  putPlaces(channel.dropouts);
  put(channel.startEdgePeak);
  put(channel.startEdgeRamps ? 1 : 0);
  put(edgePeak);
  put(endEdgeRamps ? 1 : 0);
  put(channel.tailPeak);
  put(findFloor(channel));
  put(<f64>channel.hash.digest);
  put(<f64>channel.overview);
}

function putClipping(channel: Channel): void {
  const upper = channel.upper;
  const lower = channel.lower;
  put(upper.samples + lower.samples);
  put(max(upper.longest, lower.longest));
  put(max(upper.places.count > 0 ? upper.ceiling : 0, lower.places.count > 0 ? lower.ceiling : 0));
  put(upper.fullScaleRuns + lower.fullScaleRuns);
  put(channel.cycles.count);
  put(channel.cycles.flatCount);
  putPlaces(upper.places);
  putPlaces(lower.places);
}
