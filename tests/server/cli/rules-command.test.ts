import { describe, expect, it } from 'vitest';
import { parseHouseRulesText } from '#shared/rules/parse-house-rules.ts';
import { starterNames, starterSets } from '#shared/rules/starter-sets.ts';
import { answerRules } from '../../../server/cli/rules-command.ts';

function answer(...args: string[]) {
  return answerRules(args, () => {
    throw new Error('no such file');
  });
}

function answerAbout(text: string) {
  return answerRules(['test', 'rules.json'], () => text);
}

describe('the rules command', () => {
  it.each([...starterNames])('prints the starter set %s', (name) => {
    const { out, err, exitCode } = answer('starter', name);
    expect(parseHouseRulesText(out)).toEqual({ rules: starterSets[name] });
    expect([err, exitCode]).toEqual(['', 0]);
  });

  it('prints a JSON Schema that names every section and lets defaults be left out', () => {
    const schema = JSON.parse(answer('schema').out) as {
      $schema: string;
      properties: Record<string, unknown>;
      required: string[];
    };
    expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    expect(Object.keys(schema.properties).sort()).toEqual(Object.keys(starterSets.plain).sort());
    expect(schema.required.sort()).toEqual(['names', 'schema']);
  });

  it.each([
    [
      ['starter', 'fancy'],
      'There is no starter set "fancy". There are numbered, group-letter, plain.',
    ],
    [['starter'], 'Which starter set? There are numbered, group-letter, plain.'],
    [['starter', 'plain', 'more'], '"more" is not expected here.'],
    [['schema', 'x'], '"x" is not expected here.'],
    [['\u001b[31mboo'], 'There is no command "\\u{001b}[31mboo".'],
    [[], 'What about the rules?'],
  ])('refuses %j with a sentence and exit code 2', (args, sentence) => {
    const { out, err, exitCode } = answer(...args);
    expect(out).toBe('');
    expect(err.split('\n')[0]).toBe(sentence);
    expect(exitCode).toBe(2);
  });

  it('tests a file of rules and names the place of each error', () => {
    expect(answerAbout(JSON.stringify(starterSets.plain))).toEqual({
      out: 'rules.json holds house rules.\n',
      err: '',
      exitCode: 0,
    });
    const wrong = { ...starterSets.plain, format: { minimumBits: 'x' }, extra: 1 };
    expect(answerAbout(JSON.stringify(wrong))).toEqual({
      out: '',
      err: 'format.minimumBits must be a number.\nextra is not part of house rules.\n',
      exitCode: 1,
    });
    expect(answerAbout('{')).toMatchObject({ exitCode: 1 });
    expect(answer('test', 'gone.json')).toMatchObject({ exitCode: 2 });
  });
});
