import { found, type FileCheck } from '../check.ts';

/** Audio by its name, but the header is damaged or holds nothing that can be measured. */
export const unreadable: FileCheck = ({ reading }) =>
  reading.kind === 'unreadable'
    ? found('unreadable', { reason: reading.reason, byteOffset: reading.byteOffset })
    : null;
