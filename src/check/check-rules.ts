import { AppError } from '#shared/errors.ts';
import type { Edition } from '#shared/api/rules.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { parseHouseRulesText } from '#shared/rules/parse-house-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import type { HeldFolder } from '../browser/folder-handle.ts';

/** What a folder is checked against, and where that comes from. */
export type CheckRules = {
  rules: HouseRules;
  /** The published edition; null for the default rules and for a file. */
  edition: Edition | null;
  /** The name of the file the rules were read from. */
  fileName: string | null;
};

export const unpublishedRules: CheckRules = { rules: defaultRules, edition: null, fileName: null };

/** "the house rules of Harbour Lane Mixing, edition 2" */
export function checkRulesWords({ edition, fileName }: CheckRules): string {
  if (edition)
    return `the house rules of ${edition.studio.name}, edition ${String(edition.number)}`;
  if (fileName !== null) return `the rules in ${fileName}`;
  return 'the default rules: what every engineer wants to know before a mix';
}

/** Far more than any house rules need. */
const mostBytes = 2 * 1024 * 1024;

/** House rules from a JSON file. Throws AppError `rules-invalid` with the places of all mistakes. */
export async function readRulesFile(file: File): Promise<CheckRules> {
  if (file.size > mostBytes) {
    throw new AppError('rules-invalid', {
      issues: [{ path: '', message: 'is far too long for house rules' }],
    });
  }
  const parsed = parseHouseRulesText(await file.text());
  if ('issues' in parsed) throw new AppError('rules-invalid', { issues: parsed.issues });
  return { rules: parsed.rules, edition: null, fileName: file.name };
}

/** The JSON file, where nothing else was dropped. */
export function rulesFileAlone({ files }: HeldFolder): File | null {
  const [only] = files;
  return files.length === 1 && only && /\.json$/i.test(only.path) ? only.file : null;
}

/**
 * Which edition a link leads to: the address of a rules page or of a check against it, with or
 * without the host, or just `studio/2`. null for anything else.
 */
export function editionFromLink(text: string): { slug: string; number: number | 'latest' } | null {
  const bare = text.trim().replace(/[#].*$/, '');
  const named = /[?&]rules=([^&]+)/.exec(bare)?.[1];
  const path = named === undefined ? bare : decodeURIComponent(named);
  const parts = /(?:^|\/rules\/)([a-z0-9]+(?:-[a-z0-9]+)*)(?:\/(\d+|latest))?\/?$/.exec(path);
  if (!parts) return null;
  const [, slug = '', number = 'latest'] = parts;
  return { slug, number: number === 'latest' ? number : Number(number) };
}
