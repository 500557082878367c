import { found, type FileCheck } from '../check.ts';

const containerNames = { aiff: 'AIFF', aifc: 'AIFF-C' } as const;

/**
 * AIFF is measured and can be rewritten as WAV with the same samples: a note. Other lossless
 * formats are only recognised, so the part has to be exported again.
 */
export const notWav: FileCheck = ({ reading, format, role }) => {
  if (reading.kind === 'other-audio' && !reading.lossy) {
    const onlyForListening = role === 'rough-mix' || role === 'reference';
    return found(
      'not-wav',
      { formatName: reading.formatName, readable: false },
      onlyForListening ? { level: 'note' } : {},
    );
  }
  const container = format?.container;
  if (container !== 'aiff' && container !== 'aifc') return null;
  return found(
    'not-wav',
    { formatName: containerNames[container], readable: true },
    { level: 'note', repairs: ['rewrite-container'] },
  );
};
