import type { NameFailure } from '../../naming/explain-name.ts';
import { found, type FileCheck } from '../check.ts';
import { namingInForce } from '../naming-in-force.ts';

/** Failures that have a code of their own. */
const saidElsewhere: ReadonlySet<NameFailure['reason']> = new Set([
  'unknown',
  'leftover',
  'characters',
  'too-long',
]);

/** The name does not follow the convention of the rules. */
export const nameBreaksRule: FileCheck = ({ name }, { rules }) => {
  const { explanation, stem, proposedName } = name;
  if (explanation.ok || !namingInForce(rules)) return null;
  const faults = explanation.failures
    .filter(({ reason }) => !saidElsewhere.has(reason))
    .map(({ token, reason, args }) => ({
      token,
      reason,
      found: String(args.found ?? ''),
      expected: String(args.expected ?? ''),
    }))
    // A piece that is wrong in itself is not also in the wrong place.
    .filter(
      ({ found: piece }, index, all) =>
        piece === '' || all.findIndex((fault) => fault.found === piece) === index,
    );
  if (faults.length === 0) return null;
  return found(
    'name-breaks-rule',
    { name: stem, faults, proposedName },
    proposedName === null ? { repairs: [] } : {},
  );
};
