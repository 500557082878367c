import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { expect, test } from 'vitest';
import { inCheckout } from '../../../server/dev/checkout.mjs';
import { askHolder, claim, oneAtATime } from '../../../server/dev/single-use.mjs';

const task = `test-${process.pid}`;

test('a task is held once, and its holder says what it is', async () => {
  const held = await claim(task);
  expect(held).not.toBeNull();
  held?.describe('http://127.0.0.1:5180/');
  expect(await claim(task)).toBeNull();
  expect(await askHolder(task)).toBe('http://127.0.0.1:5180/');
  held?.release();
  expect(await askHolder(task)).toBe('');
});

test('a holder that is killed holds nothing any more', async () => {
  const code =
    `import { claim } from ${JSON.stringify(inCheckout('server/dev/single-use.mjs'))};` +
    `await claim('${task}-killed'); console.log('held'); setInterval(() => {}, 1000);`;
  const holder = spawn(process.execPath, ['--input-type=module', '-e', code]);
  await once(holder.stdout, 'data');
  expect(await claim(`${task}-killed`)).toBeNull();
  holder.kill('SIGKILL');
  await once(holder, 'exit');
  const held = await claim(`${task}-killed`);
  expect(held).not.toBeNull();
  held?.release();
});

test('work of one kind takes turns', async () => {
  const order: string[] = [];
  const work = (name: string) =>
    oneAtATime(`${task}-turns`, async () => {
      order.push(`${name} begins`);
      await new Promise((resolve) => setTimeout(resolve, 50));
      order.push(`${name} ends`);
    });
  await Promise.all([work('a'), work('b')]);
  expect(order[1]).toBe(order[0]?.replace('begins', 'ends'));
  expect(order).toHaveLength(4);
});
