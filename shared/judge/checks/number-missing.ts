import { found, type SessionCheck } from '../check.ts';
import { filesByNumber } from '../running-numbers.ts';

/** Running numbers that are left out between the first and the last. */
export const numberMissing: SessionCheck = (session) => {
  const there = filesByNumber(session);
  if (there.size < 2) return [];
  const first = Math.min(...there.keys());
  const last = Math.max(...there.keys());
  // More gaps than files: these are no running numbers.
  if (last - first >= 2 * there.size) return [];
  const numbers = Array.from({ length: last - first + 1 }, (_, index) => first + index).filter(
    (number) => !there.has(number),
  );
  return numbers.length > 0 ? [found('number-missing', { numbers })] : [];
};
