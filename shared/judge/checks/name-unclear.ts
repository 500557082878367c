import { found, type FileCheck } from '../check.ts';
import { namingInForce } from '../naming-in-force.ts';

/**
 * No instrument is recognised. A word we do not know may still tell people something, so without a
 * convention that asks for an instrument it is only a note; a bare number never tells anything.
 */
export const nameUnclear: FileCheck = ({ name }, { rules }) => {
  if (name.instrument !== null || name.confidence !== 'unknown') return null;
  const saysSomething = name.leftovers.some(
    ({ kind, text }) => kind === 'unknown' && /\p{L}{3}/u.test(text),
  );
  return found(
    'name-unclear',
    { name: name.stem },
    saysSomething && !namingInForce(rules) ? { level: 'note' } : {},
  );
};
