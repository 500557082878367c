import { found, type SessionCheck } from '../check.ts';
import { asked } from '../needs.ts';

/** Neither notes were written nor does a text, a picture or the like come along. */
export const notesMissing: SessionCheck = ({ files, rules, information }) => {
  const written = (information.notes ?? '').trim() !== '';
  const enclosed = files.some(({ role, path }) => role === 'note' && !/\.midi?$/i.test(path));
  return written || enclosed
    ? []
    : asked(rules.bring.notes, (level) => found('notes-missing', {}, level));
};
