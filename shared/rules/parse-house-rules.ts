import type { z } from 'zod';
import { groupText, wordsOf } from '../naming/compose-name.ts';
import { houseRulesSchema, houseRulesSchemaVersion, type HouseRules } from './house-rules.ts';
import { namingClashes } from './naming-clashes.ts';

/** Something wrong in house rules: where (`names.groups[2].letter`, empty for the whole), and what. */
export type RulesIssue = { path: string; message: string };

export type ParsedHouseRules = { rules: HouseRules } | { issues: RulesIssue[] };

function place(path: readonly PropertyKey[]): string {
  return path
    .map((key, index) => {
      if (typeof key === 'number') return `[${key}]`;
      return index === 0 ? String(key) : `.${String(key)}`;
    })
    .join('');
}

const kinds: Readonly<Record<string, string>> = {
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
  record: 'an object',
};

function amount(issue: { origin: string }, limit: number | bigint, most: boolean): string {
  const countable = { string: 'characters', array: 'entries' }[issue.origin];
  if (countable === undefined) return `must be ${most ? 'at most' : 'at least'} ${limit}`;
  if (!most && Number(limit) === 1) return 'must not be empty';
  return most
    ? `may have at most ${limit} ${countable}`
    : `must have at least ${limit} ${countable}`;
}

function describe(issue: z.core.$ZodIssue): RulesIssue[] {
  const path = place(issue.path);
  switch (issue.code) {
    case 'invalid_type': {
      const missing = issue.input === undefined ? 'is missing and ' : '';
      return [{ path, message: `${missing}must be ${kinds[issue.expected] ?? issue.expected}` }];
    }
    case 'too_big':
      return [{ path, message: amount(issue, issue.maximum, true) }];
    case 'too_small':
      return [{ path, message: amount(issue, issue.minimum, false) }];
    case 'invalid_value': {
      const values = issue.values.map((value) => JSON.stringify(value));
      const message =
        path === 'schema'
          ? `must be ${houseRulesSchemaVersion}, the version of house rules read here`
          : `must be ${values.length > 1 ? 'one of ' : ''}${values.join(', ')}`;
      return [{ path, message: issue.input === undefined ? `is missing and ${message}` : message }];
    }
    case 'unrecognized_keys':
      return issue.keys.map((key) => ({
        path: place([...issue.path, key]),
        message: 'is not part of house rules',
      }));
    case 'invalid_key':
      return [{ path, message: 'is not a key that is known here' }];
    case 'invalid_format':
    case 'custom':
      return [{ path, message: issue.message }];
    case 'not_multiple_of':
    case 'invalid_union':
    case 'invalid_element':
      return [{ path, message: 'has a value that cannot be used here' }];
  }
}

/** What the shape alone cannot say: references to groups that do not exist, things named twice. */
export function houseRulesConflicts(rules: HouseRules): RulesIssue[] {
  const issues: RulesIssue[] = [];
  const groupIds = new Set(rules.names.groups.map((group) => group.id));
  for (const clash of namingClashes(rules.names.groups)) {
    const field = clash.kind === 'word' ? 'words' : clash.kind;
    issues.push({
      path: `names.groups[${clash.second}].${field}`,
      message: `"${clash.text}" already stands for names.groups[${clash.first}]`,
    });
  }
  if (rules.names.tokens.includes('group')) {
    rules.names.groups.forEach((group, index) => {
      if (wordsOf(groupText(group, rules.names), rules.names).length > 0) return;
      const field = rules.names.groupStyle === 'letter' ? 'letter' : 'label';
      issues.push({
        path: `names.groups[${index}].${field}`,
        message: 'has no character that names.characters allows',
      });
    });
  }
  for (const list of ['diFor', 'dryFor', 'untunedFor'] as const) {
    rules.bring[list].forEach((id, index) => {
      if (!groupIds.has(id)) {
        issues.push({ path: `bring.${list}[${index}]`, message: `there is no group "${id}"` });
      }
    });
  }
  for (const [code, rule] of Object.entries(rules.levels)) {
    for (const id of Object.keys(rule?.byGroup ?? {})) {
      if (!groupIds.has(id)) {
        issues.push({ path: `levels.${code}.byGroup.${id}`, message: `there is no group "${id}"` });
      }
    }
  }
  const confirmations = new Map<string, number>();
  rules.confirm.forEach((confirmation, index) => {
    const first = confirmations.get(confirmation.id);
    if (first === undefined) confirmations.set(confirmation.id, index);
    else {
      issues.push({
        path: `confirm[${index}].id`,
        message: `"${confirmation.id}" already stands for confirm[${first}]`,
      });
    }
  });
  return issues;
}

/**
 * Reads house rules from a parsed JSON value. What the rules leave out gets its default; what
 * they get wrong is listed with its place, all of it at once.
 */
export function parseHouseRules(json: unknown): ParsedHouseRules {
  const parsed = houseRulesSchema.safeParse(json, { reportInput: true });
  if (!parsed.success) return { issues: parsed.error.issues.flatMap(describe) };
  const conflicts = houseRulesConflicts(parsed.data);
  return conflicts.length > 0 ? { issues: conflicts } : { rules: parsed.data };
}

function syntaxPlace(text: string, error: unknown): string {
  const said = error instanceof Error ? error.message : '';
  const lineAndColumn = /line (\d+) column (\d+)/.exec(said);
  if (lineAndColumn) return `line ${lineAndColumn[1]}, column ${lineAndColumn[2]}`;
  const position = /position (\d+)/.exec(said);
  if (!position) return '';
  const before = text.slice(0, Number(position[1])).split('\n');
  return `line ${before.length}, column ${(before.at(-1) ?? '').length + 1}`;
}

/** Reads house rules from the text of a JSON file; a syntax error names its line where known. */
export function parseHouseRulesText(text: string): ParsedHouseRules {
  const bare = text.startsWith('\uFEFF') ? text.slice(1) : text;
  let json: unknown;
  try {
    json = JSON.parse(bare);
  } catch (error) {
    return { issues: [{ path: syntaxPlace(bare, error), message: 'is not valid JSON' }] };
  }
  return parseHouseRules(json);
}
