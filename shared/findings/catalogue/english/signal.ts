import type { signal } from '../signal.ts';
import type { LanguageWords } from '../words.ts';

export const signalWords: Pick<LanguageWords, keyof typeof signal> = {
  clipped: {
    words({ longestRunMs, ceilingDbfs, atFullScale }, format, { places, level }) {
      const ceiling = atFullScale
        ? 'hits full scale and is cut flat there'
        : `is cut flat at ${format.dbfs(ceilingDbfs)}, so it was clipped first and turned down afterwards`;
      return {
        title: `Clipped in ${format.count(places, 'place', 'places')}`,
        what: `The sound ${ceiling}. The longest place lasts ${format.milliseconds(longestRunMs)}.`,
        why: 'What was above is gone. It crackles or sounds harsh, and compression brings that forward.',
        how: `Recording or export? If the recording is clean, turn the track down and export it again. If the recording itself is clipped, look for another take, or say that this is all there is.${level === 'look' ? ' If it belongs to the sound, say that it is on purpose.' : ''}`,
      };
    },
    several: (count) => `${count} files are clipped`,
  },
  'flat-tops': {
    words: ({ flatCyclePercent, ceilingDbfs }, format) => ({
      title: 'Flat by design',
      what: `Of its waves, ${format.percent(flatCyclePercent)} are cut flat, at ${format.dbfs(ceilingDbfs)}. That is what fuzz, square waves and clipping on purpose look like.`,
      why: 'It is good to know that it is meant.',
      how: 'Nothing has to be done if it should sound like that. If not, export it again with less level.',
    }),
    several: (count) => `${count} files are flat by design`,
  },
  'over-full-scale': {
    words: ({ samples, peakDbfs }, format) => ({
      title: `Peaks at ${format.dbfs(peakDbfs)}`,
      what: `${format.count(samples, 'sample goes', 'samples go')} above full scale. In a float file nothing is lost by that.`,
      why: 'As soon as the file is saved in another format, those peaks are clipped.',
      how: 'Nothing has to be done. We can turn the file down if you like.',
    }),
    several: (count) => `${count} float files go above full scale`,
  },
  'between-sample-over': {
    words: ({ truePeakDbtp }, format) => ({
      title: `True peak ${format.dbtp(truePeakDbtp)}`,
      what: 'Between its samples the wave goes above full scale.',
      why: 'Played just as it is, it can distort in the converter.',
      how: 'Turn the track down a little and export it again.',
    }),
    several: (count) => `${count} files go above full scale between samples`,
  },
  'above-ceiling': {
    words: ({ peakDbfs, ceilingDbfs }, format) => ({
      title: `Peaks at ${format.dbfs(peakDbfs)}`,
      what: `The loudest peak is at ${format.dbfs(peakDbfs)}. The rules ask for room above ${format.dbfs(ceilingDbfs)}.`,
      why: 'There is little room before distortion.',
      how: 'No harm is done yet. We can turn the file down if you like.',
    }),
    several: (count) => `${count} files leave little room before distortion`,
  },
  'starts-on-sound': {
    words: ({ peakDbfs }, format) => ({
      title: 'Starts in the middle of a sound',
      what: `The very first moment is already at ${format.dbfs(peakDbfs)}, without a fade.`,
      why: 'It clicks at the start, and what came before may be missing.',
      how: 'If something came before, export again from an earlier point. If not, we can put a short fade there.',
    }),
    several: (count) => `${count} files start in the middle of a sound`,
  },
  'ends-on-sound': {
    words: ({ peakDbfs }, format) => ({
      title: 'Ends in the middle of a sound',
      what: `The very last moment is still at ${format.dbfs(peakDbfs)}, without a fade.`,
      why: 'It clicks at the end, and what came after may be missing.',
      how: 'If something comes after, export again to a later point. If not, we can put a short fade there.',
    }),
    several: (count) => `${count} files end in the middle of a sound`,
  },
  dropout: {
    words({ longestMs, firstSeconds, sharedPlaces, sharedWith }, format, { places }) {
      const gaps = places === 1 ? 'A gap in the sound' : `${places} gaps in the sound`;
      const where = `${places === 1 ? 'At' : 'First at'} ${format.time(firstSeconds, true)} the sound stops dead for ${places === 1 ? '' : 'up to '}${format.milliseconds(longestMs)} and then goes on.`;
      return sharedPlaces > 0
        ? {
            title: `${gaps}, in other tracks too`,
            what: `${where} ${sharedPlaces === places ? 'At the same moment it does so' : `${format.count(sharedPlaces, 'of the gaps is', 'of the gaps are')} at the same moment`} in ${format.files(sharedWith)}.`,
            why: 'Several tracks that stop at once are no music: the recording or the export stumbled.',
            how: 'Listen to this place in your session. If the gap is not there, export again. If it is, look for another take.',
          }
        : {
            title: gaps,
            what: where,
            why: 'If it is not meant, it clicks twice: where the sound stops and where it goes on.',
            how: 'Listen to this place in your session. If the gap is not there, export again. If it is a cut or a stutter that you want, say that it is on purpose.',
          };
    },
    several: (count) => `${count} files have gaps in the sound`,
  },
  silent: {
    words: () => ({
      title: 'Nothing in it',
      what: 'There is no sound in this file.',
      why: 'Often that is an export that went wrong: the track was muted, or its instrument had not loaded.',
      how: 'Play the track in your session. If it should sound, export it again. If not, leave it out.',
    }),
    several: (count) => `${count} files have nothing in them`,
  },
  'nearly-silent': {
    words: ({ peakDbfs }, format) => ({
      title: 'Hardly anything in it',
      what: `The loudest moment of this file is at ${format.dbfs(peakDbfs)}.`,
      why: 'So quiet a file is often noise from a track that was not used.',
      how: 'Play the track in your session. If it should be louder, export it again. If it is only noise, leave it out.',
    }),
    several: (count) => `${count} files have hardly anything in them`,
  },
  'dc-offset': {
    words: ({ offsetPercent }, format) => ({
      title: `Off centre by ${format.percent(offsetPercent)}`,
      what: `As long as it sounds, the wave lies ${offsetPercent > 0 ? 'above' : 'below'} its middle line (DC).`,
      why: 'That takes away room before distortion, and cuts and fades click.',
      how: 'We can take it out with a very low high-pass filter. Listen before and after.',
    }),
    several: (count) => `${count} files lie off centre`,
  },
  'same-audio': {
    words({ kind, gainDb, shiftMs }, format, { files }) {
      if (kind === 'exact')
        return {
          title: `The same audio in ${files.length} files`,
          what: `${format.files(files)} are the same, sample for sample.`,
          why: 'Together they only make the part louder, and the part that should be in one of them may be missing.',
          how: 'Listen to them. If something else should be in one of them, export that again. If one is too many, leave it out.',
        };
      const [first = '', second = ''] = files.map((path) => format.file(path));
      const gain =
        Math.abs(gainDb) >= 0.05
          ? `, ${format.decibels(gainDb)} ${gainDb > 0 ? 'louder' : 'quieter'}`
          : '';
      const shift =
        Math.abs(shiftMs) > 0
          ? `, ${Math.abs(shiftMs) < 1000 ? format.milliseconds(shiftMs) : format.time(shiftMs / 1000, true)} ${shiftMs > 0 ? 'later' : 'earlier'}`
          : '';
      return {
        title: `The same audio in ${files.length} files`,
        what: `${second} is the same sound as ${first}${gain}${shift}.`,
        why: 'A copy can be meant: a second channel for another effect, or a part used again.',
        how: 'Nothing has to be done if it is meant. If one is too many, leave it out.',
      };
    },
  },
  'polarity-twin': {
    words: (_args, format, { files }) => ({
      title: 'Same sound upside down',
      what: `${format.files(files)} are the same sound, one of them upside down.`,
      why: 'Played together at the same level they cancel each other.',
      how: 'If it is meant, nothing has to be done. If not, leave one of them out.',
    }),
  },
  'not-a-number': {
    words: ({ samples, firstSeconds }, format) => ({
      title: `${format.count(samples, 'broken sample', 'broken samples')}`,
      what: `${format.count(samples, 'sample in this file is', 'samples in this file are')} no number at all, ${samples === 1 ? '' : 'the first '}at ${format.time(firstSeconds, true)}.`,
      why: 'A single one can silence the whole mix or make a loud bang.',
      how: 'Export it again. If that does not help, switch off the effects on this track one after the other: one of them makes such samples.',
    }),
    several: (count) => `${count} files have broken samples`,
  },
};
