import type { RepairKind } from '#shared/findings/finding.ts';

/** What the button of a repair says: what happens when it is pressed. */
export const repairWords: Record<RepairKind, string> = {
  rename: 'Rename',
  'rewrite-container': 'Rewrite as WAV',
  split: 'Split to mono files',
  join: 'Join to one stereo file',
  'keep-one-side': 'Keep one side',
  'add-silence': 'Add silence at the end',
  'leave-out': 'Leave it out',
  fade: 'Fade',
  gain: 'Turn it down',
  move: 'Move to the common start',
  'high-pass': 'Centre it (high-pass)',
};

/** The same repair once it is taken. */
export const takenWords: Record<RepairKind, string> = {
  rename: 'Will be renamed',
  'rewrite-container': 'Will be a WAV file',
  split: 'Will be split to mono files',
  join: 'Will be one stereo file',
  'keep-one-side': 'One side will be kept',
  'add-silence': 'Silence will be added',
  'leave-out': 'Stays at home',
  fade: 'Will be faded',
  gain: 'Will be turned down',
  move: 'Will be moved',
  'high-pass': 'Will be centred',
};

/** The same, as a short note in a list of what is packed. */
export const repairDone: Record<RepairKind, string> = {
  rename: 'renamed',
  'rewrite-container': 'rewritten as WAV, same samples',
  split: 'split to mono',
  join: 'joined to stereo',
  'keep-one-side': 'one side kept',
  'add-silence': 'silence added at the end',
  'leave-out': 'left out',
  fade: 'faded',
  gain: 'turned down',
  move: 'moved to the common start',
  'high-pass': 'centred by a high-pass',
};
