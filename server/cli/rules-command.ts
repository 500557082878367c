import { z } from 'zod';
import { houseRulesSchema } from '#shared/rules/house-rules.ts';
import { parseHouseRulesText } from '#shared/rules/parse-house-rules.ts';
import { starterNames, starterSets, type StarterName } from '#shared/rules/starter-sets.ts';
import { printable } from './say-error.ts';

export const rulesUsage = `Usage:
  npm run -s rules -- starter <name>   a complete set of house rules as JSON: ${starterNames.join(', ')}
  npm run -s rules -- schema           the JSON Schema of house rules
  npm run -s rules -- test <file>      whether a file holds house rules, and what is wrong with it
`;

/** What a run of the command prints, and its exit code: 0 done, 1 rules with errors, 2 not run. */
export type RulesAnswer = { out: string; err: string; exitCode: 0 | 1 | 2 };

function json(value: unknown): string {
  return `${JSON.stringify(value, null, 2)}\n`;
}

function done(out: string): RulesAnswer {
  return { out, err: '', exitCode: 0 };
}

function refused(sentence: string): RulesAnswer {
  return { out: '', err: `${sentence}\n\n${rulesUsage}`, exitCode: 2 };
}

/** JSON Schema (draft 2020-12) of what an import accepts; conflicts between rules it cannot say. */
export function houseRulesJsonSchema(): unknown {
  return z.toJSONSchema(houseRulesSchema, { io: 'input' });
}

function starter(name: string | undefined): RulesAnswer {
  const known = starterNames.find(
    (starterName): starterName is StarterName => starterName === name,
  );
  if (known) return done(json(starterSets[known]));
  const choices = starterNames.join(', ');
  return refused(
    name === undefined
      ? `Which starter set? There are ${choices}.`
      : `There is no starter set "${printable(name)}". There are ${choices}.`,
  );
}

function test(path: string | undefined, readText: (path: string) => string): RulesAnswer {
  if (path === undefined) return refused('Which file?');
  let text: string;
  try {
    text = readText(path);
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    return {
      out: '',
      err: `${printable(path)} could not be read: ${printable(reason)}\n`,
      exitCode: 2,
    };
  }
  const parsed = parseHouseRulesText(text);
  if ('rules' in parsed) return done(`${printable(path)} holds house rules.\n`);
  const lines = parsed.issues.map(({ path: place, message }) =>
    printable(place === '' ? `The file ${message}.` : `${place} ${message}.`),
  );
  return { out: '', err: `${lines.join('\n')}\n`, exitCode: 1 };
}

/** Answers `rules <arguments>`; reads a file only for `test`. */
export function answerRules(
  args: readonly string[],
  readText: (path: string) => string,
): RulesAnswer {
  const [command, argument, ...rest] = args;
  const surplus = command === 'schema' ? argument : rest[0];
  if (surplus !== undefined) return refused(`"${printable(surplus)}" is not expected here.`);
  switch (command) {
    case 'starter':
      return starter(argument);
    case 'schema':
      return done(json(houseRulesJsonSchema()));
    case 'test':
      return test(argument, readText);
    case '--help':
    case 'help':
      return done(rulesUsage);
    case undefined:
      return refused('What about the rules?');
    default:
      return refused(`There is no command "${printable(command)}".`);
  }
}
