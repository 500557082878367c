import {
  ArgumentProblem,
  parseCheckArguments,
  usage,
  type CheckArguments,
} from './check-arguments.ts';

/*
 * `npm run -s check`: only what is needed to understand the command is loaded here, so that help
 * and mistakes answer at once.
 */

try {
  const args = parseCheckArguments(process.argv.slice(2));
  if (args === 'help') process.stdout.write(usage);
  else if (args === 'schema') await printSchema();
  else await run(args);
} catch (error) {
  if (!(error instanceof ArgumentProblem)) throw error;
  process.stderr.write(`${error.message}\n\n${usage}`);
  process.exitCode = 2;
}

async function run(args: CheckArguments): Promise<void> {
  const { runCheck } = await import('./run-check.ts');
  process.exitCode = await runCheck(args);
}

async function printSchema(): Promise<void> {
  const { reportJsonSchema } = await import('#shared/report/read-report.ts');
  process.stdout.write(`${JSON.stringify(reportJsonSchema(), null, 2)}\n`);
}
