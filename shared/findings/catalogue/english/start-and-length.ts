import type { ArgumentsOf } from '../definitions.ts';
import type { startAndLength } from '../start-and-length.ts';
import type { LanguageWords } from '../words.ts';

export const startAndLengthWords: Pick<LanguageWords, keyof typeof startAndLength> = {
  'length-differs': {
    words(args, format, { repairs }) {
      const { lengthSeconds, sessionLengthSeconds, differenceFrames, differenceSeconds } = args;
      const shorter = differenceFrames < 0;
      const by =
        Math.abs(differenceSeconds) < 0.001
          ? format.count(Math.abs(differenceFrames), 'sample', 'samples')
          : format.time(differenceSeconds, true);
      const title = `${by} ${shorter ? 'shorter' : 'longer'} than the session`;
      const precise = Math.abs(differenceSeconds) < 10;
      const lengths =
        Math.abs(differenceSeconds) < 0.001
          ? `It is ${by} ${shorter ? 'shorter' : 'longer'} than most others.`
          : `It is ${format.time(lengthSeconds, precise)} long, the session ${format.time(sessionLengthSeconds, precise)}.`;
      if (args.shiftSeconds !== null)
        return {
          title,
          what: `${lengths} It also seems to begin ${format.time(args.shiftSeconds, true)} after the others: perhaps it was exported from where its first clip begins.`,
          why: 'Placed at the start, as all files are, the whole part plays too early.',
          how: 'Export it again from the same start as the others.',
        };
      if (args.startProven)
        return {
          title,
          what: `${lengths} It begins with the others; only its end is ${shorter ? 'earlier' : 'later'}.`,
          why: 'It lines up as it is. Equal lengths just make it easy to see that nothing is missing.',
          how: repairs.includes('add-silence')
            ? 'We can add silence at the end.'
            : 'Nothing has to be done.',
        };
      return {
        title,
        what: `${lengths} ${startDoubt(args)}`,
        why: 'If only its end differs, all is well. If its start does, the whole part plays at the wrong time.',
        how: 'Export it again with the same start and end as the others, or say that it is on purpose.',
      };
    },
    several: (count) => `${count} files are not as long as the session`,
  },
  'start-differs': {
    words({ differenceSeconds, likelyStale }, format) {
      const laterBy = `${format.time(differenceSeconds, true)} ${differenceSeconds > 0 ? 'after' : 'before'} the others`;
      return likelyStale
        ? {
            title: 'Another time stamp',
            what: `Its time stamp says that it begins ${laterBy}, but it is just as long as the session. The stamp is most likely left over from the recording.`,
            why: 'Whoever places files by their stamps puts this one in the wrong place.',
            how: 'Nothing has to be done. The file belongs at the common start.',
          }
        : {
            title: `Stamped ${laterBy}`,
            what: `Its time stamp says that it begins ${laterBy}.`,
            why: 'If the stamp is right, the part plays at the wrong time when it is placed at the start with the rest.',
            how: 'Export it again from the same start as the others. If you know that the stamp is right, we can move the part to its place.',
          };
    },
    several: (count) => `${count} files have another time stamp`,
  },
  'not-consolidated': {
    words: ({ tracks, soundingAtOnce, shortestSeconds, longestSeconds }, format) => ({
      title: 'These look like loose clips',
      what: `${soundingAtOnce} of ${tracks} files sound from their very first moment, and they are between ${format.time(shortestSeconds)} and ${format.time(longestSeconds)} long. Each seems to begin where it first plays in the song.`,
      why: 'Nobody but you knows where in the song each of them belongs.',
      how: 'Export every track as one file from the very start of the song to the end of its last tail, so that every file has the same start.',
    }),
  },
  'tail-cut': {
    words: ({ tailPeakDbfs }, format) => ({
      title: 'The end is cut off',
      what: `The sound is still ringing at ${format.dbfs(tailPeakDbfs)} when the file ends.`,
      why: 'A tail that stops dead is heard, most of all at the end of a song.',
      how: 'Export it again with a few seconds more, until nothing can be heard.',
    }),
    several: (count) => `${count} files end while they still ring`,
  },
};

function startDoubt({ soundsAtOnce, fitsAtEnd }: ArgumentsOf<'length-differs'>): string {
  if (soundsAtOnce)
    return 'It sounds from its very first moment while most others do not, so perhaps its start was cut off.';
  if (fitsAtEnd)
    return 'It seems to fit the others at their end rather than at their start, so perhaps its start was cut off.';
  return 'Nothing in the files proves that it begins with the others.';
}
