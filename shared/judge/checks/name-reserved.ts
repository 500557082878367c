import { checkPortability } from '../../naming/portability.ts';
import { found, type FileCheck } from '../check.ts';

/** The name of a device on some computers. */
export const nameReserved: FileCheck = ({ name, path }) => {
  const issues = checkPortability(path.slice(path.lastIndexOf('/') + 1));
  return issues.some(({ code }) => code === 'reserved-name')
    ? found('name-reserved', { name: name.stem }, name.proposedName === null ? { repairs: [] } : {})
    : null;
};
