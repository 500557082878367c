import { spawnSync } from 'node:child_process';
import { readdir } from 'node:fs/promises';
import { inCheckout } from './checkout.mjs';

/** Lists the benchmarks, or runs one: node server/dev/bench.mjs [name] [arguments]. */

const folder = inCheckout('tests', 'bench');
const files = (await readdir(folder).catch(() => [])).filter((file) =>
  /\.bench\.(ts|mjs)$/.test(file),
);
const [, , name, ...args] = process.argv;
const file = files.find((candidate) => candidate.replace(/\.bench\.\w+$/, '') === name);

if (file) {
  const command = ['--import', 'tsx', `${folder}/${file}`, ...args];
  const { status } = spawnSync(process.execPath, command, { stdio: 'inherit', cwd: inCheckout() });
  process.exitCode = status ?? 1;
} else {
  const names = files.map((candidate) => candidate.replace(/\.bench\.\w+$/, '')).sort();
  console.log(`Usage: npm run bench -- name [arguments]\n${names.map((n) => `  ${n}`).join('\n')}`);
  if (name) process.exitCode = 1;
}
