import { afterAll, beforeAll, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { networkOf } from '../../server/http/limits.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, signUp, testPassword, type TestBrowser } from '../support/server-browser.ts';

/** Two servers, one database: what two machines behind one name are. */
let one: TestServer;
let two: TestServer;
beforeAll(async () => {
  one = await startTestServer();
  two = await startTestServer({ databaseUrl: one.databaseUrl });
});
afterAll(async () => {
  await two.close();
  await one.close();
});

async function tryPassword(browser: TestBrowser, email: string, password = 'a wrong password') {
  return browser.call(accounts.signIn, { body: { email, password } });
}

it('stops guessing from one network after ten tries, whichever server they go to', async () => {
  const email = 'ada@people.example';
  await signUp(one, 'Ada', email);
  const guesser = openBrowser(one);
  const guesserAtTwo = openBrowser(two);
  guesserAtTwo.networkAddress = guesser.networkAddress;
  const statuses: number[] = [];
  for (let turn = 0; turn < 12; turn += 1) {
    const browser = turn % 2 === 0 ? guesser : guesserAtTwo;
    statuses.push((await tryPassword(browser, email)).status);
  }
  expect(statuses).toEqual([...Array<number>(10).fill(401), 429, 429]);

  const blocked = await tryPassword(guesser, email, testPassword);
  expect(blocked.problem?.code).toBe('too-many-tries');
  const wait = blocked.problem?.details.retryAfterSeconds;
  expect(wait).toBeGreaterThan(0);
  expect(blocked.headers['retry-after']).toBe(String(wait));

  // The person themselves, elsewhere, is not locked out by it.
  expect((await tryPassword(openBrowser(two), email, testPassword)).status).toBe(200);
});

it('does not let many tries at once slip through', async () => {
  const email = 'bob@people.example';
  await signUp(one, 'Bob', email);
  const guesser = openBrowser(one);
  const answers = await Promise.all(Array.from({ length: 25 }, () => tryPassword(guesser, email)));
  expect(answers.filter(({ status }) => status === 401)).toHaveLength(10);
  expect(answers.filter(({ status }) => status === 429)).toHaveLength(15);
});

it('allows fewer than 100 wrong passwords an hour on one account from everywhere', async () => {
  const email = 'cas@people.example';
  await signUp(one, 'Cas', email);
  let tried = 0;
  for (let network = 0; network < 30; network += 1) {
    const browser = openBrowser(network % 2 === 0 ? one : two);
    for (let turn = 0; turn < 5; turn += 1) {
      if ((await tryPassword(browser, email)).status === 401) tried += 1;
    }
  }
  expect(tried).toBe(80);
}, 60_000);

it('does not count right passwords', async () => {
  const email = 'dan@people.example';
  const browser = await signUp(one, 'Dan', email);
  for (let turn = 0; turn < 15; turn += 1) {
    expect((await tryPassword(browser, email, testPassword)).status).toBe(200);
  }
});

it('mails one address at most five times an hour, known or not', async () => {
  for (const email of ['eli@people.example', 'unheard@people.example']) {
    if (email.startsWith('eli')) await signUp(one, 'Eli', email);
    const statuses: number[] = [];
    for (let turn = 0; turn < 6; turn += 1) {
      const browser = openBrowser(turn % 2 === 0 ? one : two);
      statuses.push(
        (await browser.call(accounts.requestPasswordReset, { body: { email } })).status,
      );
    }
    // Registering took one of Eli's five.
    const allowed = email.startsWith('eli') ? 4 : 5;
    expect(statuses.filter((status) => status === 204)).toHaveLength(allowed);
  }
});

it('mails at most thirty addresses an hour for one network', async () => {
  const browser = openBrowser(one);
  const statuses: number[] = [];
  for (let turn = 0; turn < 32; turn += 1) {
    const body = { name: 'Spam', email: `victim-${turn}@people.example` };
    statuses.push((await browser.call(accounts.register, { body })).status);
  }
  expect(statuses.filter((status) => status === 204)).toHaveLength(30);
});

it.each([
  ['192.0.2.7', '192.0.2.7'],
  ['::ffff:192.0.2.7', '192.0.2.7'],
  ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2'],
  ['2001:0DB8:0001:2::9', '2001:db8:1:2'],
  ['2001:db8::1', '2001:db8:0:0'],
  ['::1', '0:0:0:0'],
  ['fe80::1%eth0', 'fe80:0:0:0'],
])('counts %s as network %s (RFC 4291, section 2.2)', (address, network) => {
  expect(networkOf(address)).toBe(network);
});
