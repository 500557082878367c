import { safeRepairKinds, type Finding } from '../finding.ts';
import { findingDefinitions } from './definitions.ts';
import type { NextStep } from './definition.ts';
import { englishWords } from './english/english-words.ts';
import { englishFormat, type ArgumentFormat } from './format-arguments.ts';
import type { CodeWords, FindingWords, LanguageWords } from './words.ts';

/** A language to describe findings in. */
export type Language = { words: LanguageWords; format: ArgumentFormat };

export const english: Language = { words: englishWords, format: englishFormat };

/**
 * A finding in words. A line that stands for many files says how many in its title and names some
 * of them; its reason and remedy are those of the worst of them.
 */
export function describeFinding(finding: Finding, language: Language = english): FindingWords {
  const { words, format } = language;
  // The arguments belong to the code: the judge types them, and reports are checked on arrival.
  const ofCode = words[finding.code] as CodeWords<Finding['code']>;
  const said = ofCode.words(finding.args as never, format, finding);
  if (!finding.perFile || !ofCode.several) return said;
  return {
    ...said,
    title: ofCode.several(finding.files.length),
    what: `${format.files(finding.files)}.`,
  };
}

/** Whether a finding's arguments are those its code has; for findings that came from outside. */
export function hasItsArguments({ code, args }: Pick<Finding, 'code' | 'args'>): boolean {
  return findingDefinitions[code].arguments.safeParse(args).success;
}

/**
 * What somebody does next about a finding: let us fix it where a safe repair is on offer, export
 * again, decide, or just know.
 */
export function nextStep({ code, level, repairs }: Finding): NextStep {
  if (repairs.some((repair) => safeRepairKinds.includes(repair))) return 'we-can-fix';
  if (level === 'note') return 'know';
  if (code === 'length-differs' && level === 'must-fix') return 'export-again';
  const usual = findingDefinitions[code].nextStep;
  return usual === 'we-can-fix' ? 'decide' : usual;
}
