import { found, type FileCheck } from '../check.ts';

/** A compressed format. What it threw away is gone; for listening to a rough mix it is enough. */
export const lossy: FileCheck = ({ reading, role }) => {
  if (reading.kind !== 'other-audio' || !reading.lossy) return null;
  const onlyForListening = role === 'rough-mix' || role === 'reference';
  return found(
    'lossy',
    { formatName: reading.formatName, onlyForListening },
    onlyForListening ? { level: 'note' } : {},
  );
};
