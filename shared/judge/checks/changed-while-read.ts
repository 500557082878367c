import { found, type ReadingCheck } from '../check.ts';

/** Something wrote to the file during the check, so the measures are of no file that exists. */
export const changedWhileRead: ReadingCheck = ({ measures }) =>
  measures.changedWhileRead ? found('changed-while-read', {}) : null;
