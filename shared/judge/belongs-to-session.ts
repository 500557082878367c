import type { CheckedFile } from './check.ts';

/** Audio that should be part of the set, whether it could be measured or not. */
export function belongsToSession({
  role,
  reading,
}: Pick<CheckedFile, 'role' | 'reading'>): boolean {
  return (role === 'track' || role === 'click' || role === 'guide') && reading.kind !== 'not-audio';
}
