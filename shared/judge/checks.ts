import type { FileCheck, ReadingCheck, SessionCheck, TrackCheck } from './check.ts';
import { aboveCeiling } from './checks/above-ceiling.ts';
import { betweenSampleOver } from './checks/between-sample-over.ts';
import { bitDepthDiffers } from './checks/bit-depth-differs.ts';
import { bitDepthLow } from './checks/bit-depth-low.ts';
import { changedWhileRead } from './checks/changed-while-read.ts';
import { clipped } from './checks/clipped.ts';
import { cutShort } from './checks/cut-short.ts';
import { dcOffset } from './checks/dc-offset.ts';
import { diMissing } from './checks/di-missing.ts';
import { dropout } from './checks/dropout.ts';
import { dryMissing } from './checks/dry-missing.ts';
import { dualMono } from './checks/dual-mono.ts';
import { emptyBits } from './checks/empty-bits.ts';
import { endsOnSound } from './checks/ends-on-sound.ts';
import { exportLeftover } from './checks/export-leftover.ts';
import { flatTops } from './checks/flat-tops.ts';
import { lengthDiffers } from './checks/length-differs.ts';
import { looksLikeTakes } from './checks/looks-like-takes.ts';
import { lossy } from './checks/lossy.ts';
import { nameBreaksRule } from './checks/name-breaks-rule.ts';
import { nameCharacters } from './checks/name-characters.ts';
import { nameClash } from './checks/name-clash.ts';
import { nameReserved } from './checks/name-reserved.ts';
import { nameTooLong } from './checks/name-too-long.ts';
import { nameUnclear } from './checks/name-unclear.ts';
import { nearlySilent } from './checks/nearly-silent.ts';
import { notANumber } from './checks/not-a-number.ts';
import { notConsolidated } from './checks/not-consolidated.ts';
import { notWav } from './checks/not-wav.ts';
import { notesMissing } from './checks/notes-missing.ts';
import { numberMissing } from './checks/number-missing.ts';
import { numberRepeated } from './checks/number-repeated.ts';
import { oneSideSilent } from './checks/one-side-silent.ts';
import { orderMissing } from './checks/order-missing.ts';
import { overFullScale } from './checks/over-full-scale.ts';
import { polarityTwin } from './checks/polarity-twin.ts';
import { referenceMissing } from './checks/reference-missing.ts';
import { roughMixMissing } from './checks/rough-mix-missing.ts';
import { sameAudio } from './checks/same-audio.ts';
import { sampleRateDiffers } from './checks/sample-rate-differs.ts';
import { sampleRateNotAllowed } from './checks/sample-rate-not-allowed.ts';
import { sidesCancel } from './checks/sides-cancel.ts';
import { silent } from './checks/silent.ts';
import { splitStereo } from './checks/split-stereo.ts';
import { startDiffers } from './checks/start-differs.ts';
import { startsOnSound } from './checks/starts-on-sound.ts';
import { tailCut } from './checks/tail-cut.ts';
import { tempoMissing } from './checks/tempo-missing.ts';
import { tooManyChannels } from './checks/too-many-channels.ts';
import { unreadable } from './checks/unreadable.ts';
import { untunedMissing } from './checks/untuned-missing.ts';
import { wrongSpeed } from './checks/wrong-speed.ts';

/** On every file that is or should be audio, a rough mix and references too, in this order. */
export const fileChecks: readonly FileCheck[] = [unreadable, notWav, lossy];

/** On every measured file, a rough mix and references too. */
export const readingChecks: readonly ReadingCheck[] = [cutShort, changedWhileRead];

/** On every measured track, the click too: format, start and length. */
export const formatChecks: readonly TrackCheck[] = [
  sampleRateDiffers,
  wrongSpeed,
  bitDepthLow,
  bitDepthDiffers,
  emptyBits,
  tooManyChannels,
  lengthDiffers,
  startDiffers,
];

/** On every measured track but the click: the sound. */
export const signalChecks: readonly TrackCheck[] = [
  dualMono,
  sidesCancel,
  oneSideSilent,
  tailCut,
  clipped,
  flatTops,
  overFullScale,
  betweenSampleOver,
  aboveCeiling,
  startsOnSound,
  endsOnSound,
  dropout,
  silent,
  nearlySilent,
  dcOffset,
  notANumber,
];

/** On every file of the session: its name. */
export const nameChecks: readonly FileCheck[] = [
  nameBreaksRule,
  nameUnclear,
  nameTooLong,
  nameCharacters,
  nameReserved,
  exportLeftover,
];

/** On every measured track: what should lie beside it. */
export const companionChecks: readonly TrackCheck[] = [diMissing, dryMissing, untunedMissing];

/** On the session as a whole. */
export const sessionChecks: readonly SessionCheck[] = [
  sampleRateNotAllowed,
  splitStereo,
  notConsolidated,
  sameAudio,
  polarityTwin,
  numberRepeated,
  numberMissing,
  nameClash,
  looksLikeTakes,
  roughMixMissing,
  referenceMissing,
  orderMissing,
  notesMissing,
  tempoMissing,
];
