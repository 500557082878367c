import { found, type CheckedFile, type Found, type SessionCheck } from '../check.ts';
import { belongsToSession } from '../belongs-to-session.ts';
import { partKey } from '../same-part.ts';

/**
 * Several files of one part, at least one of them called a take. Numbers alone say nothing:
 * backing vocals 1 to 8 are eight parts.
 */
export const looksLikeTakes: SessionCheck = ({ files }) => {
  const parts = new Map<string, CheckedFile[]>();
  for (const file of files.filter(belongsToSession)) {
    const key = partKey(file.name);
    if (key !== null) parts.set(key, [...(parts.get(key) ?? []), file]);
  }
  return [...parts.values()].flatMap((part): Found[] => {
    const [first] = part;
    if (!first || part.length < 2 || part.every(({ name }) => name.take === null)) return [];
    const { instrument, ordinal, detail } = first.name;
    const words = [instrument, ordinal, ...detail].filter((word) => word !== null);
    return [
      found(
        'looks-like-takes',
        { part: words.join(' '), takes: part.length },
        { files: part.map(({ path }) => path) },
      ),
    ];
  });
};
