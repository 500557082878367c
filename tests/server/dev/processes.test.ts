import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFile } from 'node:fs/promises';
import { setTimeout as delay } from 'node:timers/promises';
import { expect, test } from 'vitest';
import { inCheckout } from '../../../server/dev/checkout.mjs';
import { isRunning, runProgram, startProgram } from '../../../server/dev/processes.mjs';

async function untilGone(pid: number): Promise<boolean> {
  for (let tries = 0; tries < 50 && isRunning(pid); tries += 1) await delay(50);
  return !isRunning(pid);
}

test('a process that ended but was not collected does not run', async () => {
  // The shell's child ends after the shell became another program that does not wait for it.
  const parent = spawn('sh', ['-c', 'sleep 0.1 & echo $!; exec sleep 10']);
  const [said] = (await once(parent.stdout, 'data')) as [Buffer];
  const pid = Number(String(said));
  await delay(400);
  expect(await readFile(`/proc/${pid}/status`, 'utf8')).toMatch(/^State:\s+Z/m);
  expect(isRunning(pid)).toBe(false);
  expect(isRunning(process.pid)).toBe(true);
  parent.kill();
});

test('a program ends when the process that started it is killed', async () => {
  const code =
    `import { startProgram } from ${JSON.stringify(inCheckout('server/dev/processes.mjs'))};` +
    `console.log(startProgram('sleep', ['sleep', '60']).child.pid); setInterval(() => {}, 1000);`;
  const parent = spawn(process.execPath, ['--input-type=module', '-e', code]);
  const [said] = (await once(parent.stdout, 'data')) as [Buffer];
  const pid = Number(String(said));
  await delay(100);
  expect(isRunning(pid)).toBe(true);
  parent.kill('SIGKILL');
  expect(await untilGone(pid)).toBe(true);
});

test('a program that ignores the request to end is made to, with what it started', async () => {
  const stubborn = 'trap "" TERM; sleep 60 & echo $!; wait; sleep 60';
  const program = startProgram('stubborn', ['sh', '-c', stubborn], {
    stdio: ['ignore', 'pipe', 'ignore'],
  });
  if (!program.child.stdout) throw new Error('no output');
  const [said] = (await once(program.child.stdout, 'data')) as [Buffer];
  await program.stop(0.2);
  expect(await program.ended).toBe('SIGKILL');
  expect(await untilGone(Number(String(said)))).toBe(true);
});

test('a missing program is told apart from one that fails', async () => {
  expect(await runProgram(['sh', '-c', 'echo out; echo err >&2; exit 3'])).toEqual({
    code: 3,
    stdout: 'out\n',
    stderr: 'err\n',
  });
  expect((await runProgram(['no-such-program-here'])).code).toBe(127);
});
