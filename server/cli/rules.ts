import { readFileSync } from 'node:fs';
import { answerRules } from './rules-command.ts';

/* `npm run -s rules`: starter sets and the schema of house rules on standard output. */

const answer = answerRules(process.argv.slice(2), (path) => readFileSync(path, 'utf8'));
process.stdout.write(answer.out);
process.stderr.write(answer.err);
process.exitCode = answer.exitCode;
