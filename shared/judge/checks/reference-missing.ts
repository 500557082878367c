import { found, type SessionCheck } from '../check.ts';

/** Fewer references than the rules ask for; files and links both count. */
export const referenceMissing: SessionCheck = ({ files, rules, information }) => {
  const wanted = rules.bring.references;
  const given =
    files.filter(({ role }) => role === 'reference').length + information.referenceLinks.length;
  return given < wanted ? [found('reference-missing', { wanted, given })] : [];
};
