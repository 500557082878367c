import type { completeness } from '../completeness.ts';
import type { LanguageWords } from '../words.ts';

export const completenessWords: Pick<LanguageWords, keyof typeof completeness> = {
  'rough-mix-missing': {
    words: ({ orderWouldDo }) => ({
      title: 'No rough mix',
      what: orderWouldDo
        ? 'Neither a rough mix nor an order of importance is here.'
        : 'No file is named or marked as the rough mix.',
      why: 'The rough mix shows what you hear in your head: what leads, what stays behind, and where everything belongs.',
      how: `Add a stereo file of the song as you last heard it, from the same start as the tracks, or mark the file if it is already here.${orderWouldDo ? ' Putting the parts in order of importance will do as well.' : ''}`,
    }),
  },
  'reference-missing': {
    words: ({ wanted, given }, format) => ({
      title: `${format.count(wanted - given, 'reference', 'references')} to add`,
      what: `The rules ask for ${format.count(wanted, 'reference', 'references')}; ${given === 0 ? 'none is' : `${given} ${given === 1 ? 'is' : 'are'}`} here.`,
      why: 'A record that you love says more about the sound you want than many words.',
      how: 'Add a file or a link, with the moment you mean and what to listen for.',
    }),
  },
  'order-missing': {
    words: () => ({
      title: 'What matters most?',
      what: 'The parts are not in order of importance yet.',
      why: 'Where two parts want the same space, the engineer has to know which one gives way.',
      how: 'Put the parts in order, the most important first. The first five are enough.',
    }),
  },
  'notes-missing': {
    words: () => ({
      title: 'No notes',
      what: 'Nothing is written down about this song.',
      why: 'Who played, through what, and what must not change: nobody can hear that in a file.',
      how: 'Write a few lines about the song, or add a text file.',
    }),
  },
  'di-missing': {
    words: ({ part }) => ({
      title: `No clean signal for ${part}`,
      what: `The rules ask for the clean signal before the amp (DI) beside ${part}.`,
      why: 'With it the sound can still be changed without playing the part again.',
      how: 'If you recorded it, export it from the same start. If not, say that this is all there is.',
    }),
    several: (count) => `${count} files have no clean signal beside them`,
  },
  'dry-missing': {
    words: ({ part }) => ({
      title: `No dry version of ${part}`,
      what: `The rules ask for ${part} without its effects, beside the version with them.`,
      why: 'Reverb and delay cannot be taken out of a file again.',
      how: 'Switch off the effects on this track and export it a second time.',
    }),
    several: (count) => `${count} files have no dry version beside them`,
  },
  'untuned-missing': {
    words: ({ part }) => ({
      title: `No untuned version of ${part}`,
      what: `The rules ask for ${part} as it was sung, beside the tuned version.`,
      why: 'Where the tuning went too far, the engineer needs something to go back to.',
      how: 'Switch off the tuning on this track and export it a second time.',
    }),
    several: (count) => `${count} files have no untuned version beside them`,
  },
  'tempo-missing': {
    words: () => ({
      title: 'What is the tempo?',
      what: 'No tempo is given yet.',
      why: 'Delays, edits and everything that follows the beat are set by it.',
      how: 'Give the tempo, the changes, or a tempo map as a MIDI file. "No click" is a full answer too.',
    }),
  },
};
