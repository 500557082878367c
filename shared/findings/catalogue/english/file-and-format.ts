import type { UnreadableReason } from '../../../wave/track-format.ts';
import type { fileAndFormat } from '../file-and-format.ts';
import type { ArgumentFormat } from '../format-arguments.ts';
import type { LanguageWords } from '../words.ts';

const unreadableWhat: Record<UnreadableReason, string> = {
  'empty-file': 'The file is empty: there is not a single byte in it.',
  'no-audio-header':
    'It is called an audio file, but it does not begin like one. Often a copy that went wrong.',
  'header-cut-short': 'The file breaks off before the sound begins.',
  'no-format-chunk': 'The piece of the file that says what kind of audio it is has gone missing.',
  'no-data-chunk': 'The piece of the file that holds the sound has gone missing.',
  'no-audio-in-data': 'The place for the sound is there, but there is nothing in it.',
  'impossible-format': 'The file describes itself in a way that cannot be true.',
  'unsupported-encoding': 'The sound is stored in a way that is not used for multitracks.',
  'could-not-be-read': 'The file could not be read from the disk.',
};

export const fileAndFormatWords: Pick<LanguageWords, keyof typeof fileAndFormat> = {
  unreadable: {
    words: ({ reason }) => ({
      title: 'Cannot be read',
      what: unreadableWhat[reason],
      why: 'A track that does not open is missing from the mix.',
      how: 'Export this track again as WAV, then drop it here again.',
    }),
    several: (count) => `${count} files cannot be read`,
  },
  'cut-short': {
    words: ({ promisedSeconds, missingSeconds }, format) => ({
      title: `Cut short: ${format.time(missingSeconds, true)} missing`,
      what: `The file says that it is ${format.time(promisedSeconds, true)} long, but the last ${format.time(missingSeconds, true)} of it is not there. A copy or an export stopped too early.`,
      why: 'The track stops before the song does.',
      how: 'Copy the file again from where it was exported. If it is short there too, export it again.',
    }),
    several: (count) => `${count} files are cut short`,
  },
  'changed-while-read': {
    words: () => ({
      title: 'Changed during the check',
      what: 'Something wrote to this file while it was being checked. Perhaps the export was still running.',
      why: 'What was measured may not be what is in the file now.',
      how: 'Wait until the export has finished, then check this file again.',
    }),
    several: (count) => `${count} files changed during the check`,
  },
  'not-wav': {
    words: ({ formatName, readable }) => ({
      title: `${formatName}, not WAV`,
      what: readable
        ? `This is an ${formatName} file. It was checked like every other file.`
        : `This is a ${formatName} file. It was recognised, but it could not be checked and it is not packed.`,
      why: 'WAV opens everywhere without being converted.',
      how: readable
        ? 'We can write it as WAV when you save the zip. Not a single sample changes.'
        : 'Export this track again as WAV.',
    }),
    several: (count) => `${count} files are not WAV`,
  },
  lossy: {
    words: ({ formatName, onlyForListening }) =>
      onlyForListening
        ? {
            title: `${formatName}: fine for listening`,
            what: `This is compressed audio (${formatName}). It was recognised, but it could not be checked.`,
            why: 'To listen to, it is good enough. Only a WAV can be compared closely with your tracks.',
            how: 'If you also have it as WAV, send that one.',
          }
        : {
            title: `${formatName}: compressed audio`,
            what: `This is compressed audio (${formatName}). To make the file small, part of the sound was thrown away.`,
            why: 'What is gone cannot be brought back, and it shows as soon as the track is made brighter, louder or denser.',
            how: 'Export this track again as WAV from the session. Turning this file into a WAV brings nothing back.',
          },
    several: (count) => `${count} files are compressed audio`,
  },
  'sample-rate-differs': {
    words: ({ sampleRateHz, sessionSampleRateHz, evenlySplit }, format) => ({
      title: `${format.rate(sampleRateHz)}, the others have ${format.rate(sessionSampleRateHz)}`,
      what: evenlySplit
        ? `As many files have ${format.rate(sampleRateHz)} as have ${format.rate(sessionSampleRateHz)}, so the files alone do not say which is right.`
        : `This file has a sample rate of ${format.rate(sampleRateHz)}, most others have ${format.rate(sessionSampleRateHz)}.`,
      why: 'A session has one rate. A file with another one plays at the wrong speed and pitch, or is converted without anybody noticing.',
      how: evenlySplit
        ? 'Look up the rate of your session, and export the files that differ from it again. Never convert them.'
        : `Never convert it: export it again at ${format.rate(sessionSampleRateHz)}.`,
    }),
    several: (count) => `${count} files have another sample rate`,
  },
  'wrong-speed': {
    words: ({ lengthRatio, labelledHz, likelyHz, lengthSeconds, sessionLengthSeconds }, format) => {
      const semitones = 12 * Math.log2(1 / lengthRatio);
      return {
        title: `Plays too ${semitones > 0 ? 'fast' : 'slow'}`,
        what: `It is ${format.time(lengthSeconds, true)} long, the session ${format.time(sessionLengthSeconds, true)}. That is just what comes out when sound recorded at ${format.rate(likelyHz)} is labelled ${format.rate(labelledHz)}.`,
        why: `It plays about ${Math.abs(semitones).toFixed(1)} semitones too ${semitones > 0 ? 'high' : 'low'} and runs away from the other tracks.`,
        how: 'Export it again from the session it was recorded in. Never convert or stretch it.',
      };
    },
    several: (count) => `${count} files play at the wrong speed`,
  },
  'sample-rate-not-allowed': {
    words: ({ sampleRateHz, allowedHz }, format) => ({
      title: `All files are at ${format.rate(sampleRateHz)}`,
      what: `The rules ask for ${format.list(
        allowedHz.map((rate) => format.rate(rate)),
        'or',
      )}.`,
      why: 'Every conversion costs a little, so it is better to agree on a rate than to convert.',
      how: `If your session runs at ${format.rate(sampleRateHz)}, leave the files as they are and ask the engineer. If it does not, export everything again at the rate of the session. Never convert.`,
    }),
  },
  'bit-depth-low': {
    words: ({ bits, minimumBits }, format) => ({
      title: `${format.depth(bits)}, at least ${format.depth(minimumBits)} is asked for`,
      what: `This file was saved with ${bits} bits. The rules ask for at least ${minimumBits}.`,
      why: 'Fewer bits mean more noise, which comes up when quiet moments are made louder.',
      how: `Export it again with ${minimumBits} bits or more. If it was recorded with ${bits} bits, this is all there is: converting adds nothing.`,
    }),
    several: (count) => `${count} files have too few bits`,
  },
  'bit-depth-differs': {
    words: ({ bits, encoding, sessionBits, sessionEncoding }, format) => ({
      title: `${format.depth(bits, encoding)}, most are ${format.depth(sessionBits, sessionEncoding)}`,
      what: `This file is ${format.depth(bits, encoding)}, most others are ${format.depth(sessionBits, sessionEncoding)}.`,
      why: 'That does no harm. It can be a sign that the file comes from another export than the rest.',
      how: 'Make sure that this is the version you mean to send.',
    }),
    several: (count) => `${count} files have another bit depth`,
  },
  'empty-bits': {
    words: ({ bits, realBits, encoding }, format) => ({
      title: `${format.depth(bits, encoding)} file, ${format.depth(realBits)} sound`,
      what: `The file has room for ${bits} bits, but the sound in it only ever uses ${realBits}.`,
      why: 'That does no harm. Either the sound was made that way, or an export lost the finest detail.',
      how: `If this was recorded with more than ${realBits} bits, look at the export settings and export it again.`,
    }),
    several: (count) => `${count} files do not use all their bits`,
  },
  'too-many-channels': {
    words: ({ channels }) => ({
      title: `${channels} channels in one file`,
      what: `This file holds ${channels} channels. A track is mono or stereo.`,
      why: 'Not every session opens such a file as it was meant.',
      how: 'We can split it into mono files. Not a single sample changes.',
    }),
    several: (count) => `${count} files have more than two channels`,
  },
  'dual-mono': {
    words: ({ identical, nearly, sideUnderMidDb, gainDb }, format) => ({
      title: nearly ? 'Both sides nearly identical' : 'Both sides identical',
      what: dualMonoWhat(identical, nearly, sideUnderMidDb, gainDb, format),
      why: 'A mono part in a stereo file takes up twice the room, and panning and widening act differently on it.',
      how: nearly
        ? 'Find out by listening whether both sides are needed. If not, export it again as mono.'
        : 'We can keep one side as a mono file. How loud each side was is written down for the engineer.',
    }),
    several: (count) => `${count} files have the same sound on both sides`,
  },
  'sides-cancel': {
    words: () => ({
      title: 'The sides cancel each other',
      what: 'Right is the same sound as left, upside down.',
      why: 'In mono nothing is left of it: on a phone or in a club this track is simply gone.',
      how: 'Look for a polarity switch or a widening effect on this track, turn it off and export again.',
    }),
    several: (count) => `${count} files cancel themselves in mono`,
  },
  'one-side-silent': {
    words: ({ silentSide }) => {
      const live = silentSide === 'left' ? 'right' : 'left';
      return {
        title: `Nothing on the ${silentSide} side`,
        what: `This is a stereo file, but only the ${live} side sounds.`,
        why: `The part sits hard ${live}, whether it is meant to or not.`,
        how: `We can keep the ${live} side as a mono file. If the ${silentSide} side should sound, export it again.`,
      };
    },
    several: (count) => `${count} stereo files have a silent side`,
  },
  'split-stereo': {
    words: ({ left, right }, format) => ({
      title: 'Left and right are two files',
      what: `${format.file(left)} and ${format.file(right)} are the two sides of one stereo recording.`,
      why: 'In one file, the two sides cannot slip against each other.',
      how: 'We can join them into one stereo file. Not a single sample changes.',
    }),
  },
};

function dualMonoWhat(
  identical: boolean,
  nearly: boolean,
  sideUnderMidDb: number | null,
  gainDb: number,
  { decibels }: Pick<ArgumentFormat, 'decibels'>,
): string {
  if (identical) return 'Left and right are the same, sample for sample.';
  if (nearly && sideUnderMidDb !== null)
    return `What differs between left and right is ${decibels(sideUnderMidDb)} below the sound itself.`;
  if (Math.abs(gainDb) < 0.05) return 'Left and right carry the same sound.';
  return `Left and right carry the same sound, the right side ${decibels(gainDb)} ${gainDb > 0 ? 'louder' : 'quieter'}.`;
}
