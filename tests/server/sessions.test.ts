import { createHash } from 'node:crypto';
import { afterAll, beforeAll, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import * as studios from '#shared/api/studios.ts';
import * as invitations from '#shared/api/invitations.ts';
import { absoluteLifetimeMs, idleLifetimeMs } from '../../server/accounts/sessions.ts';
import { sessions } from '../../server/db/schema.ts';
import { createTestClock, startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, secretFor, signUp, testPassword } from '../support/server-browser.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

const day = 24 * 3_600_000;

async function isSignedIn(browser: ReturnType<typeof openBrowser>): Promise<boolean> {
  return (await browser.get(accounts.getSession, {})).user !== null;
}

it('sets a cookie that only this host, only HTTPS and no script gets', async () => {
  await signUp(server, 'Ann', 'ann@people.example');
  const browser = openBrowser(server);
  const { setCookie } = await browser.call(accounts.signIn, {
    body: { email: 'ann@people.example', password: testPassword },
  });
  const [pair, ...attributes] = (setCookie ?? '').split('; ');
  expect(pair).toMatch(/^__Host-flightcase=[a-z0-9]{40}$/);
  expect(attributes.map((attribute) => attribute.toLowerCase()).sort()).toEqual([
    'httponly',
    `max-age=${idleLifetimeMs / 1000}`,
    'path=/',
    'samesite=lax',
    'secure',
  ]);
});

it('keeps only a hash of the id', async () => {
  const browser = await signUp(server, 'Bea', 'bea@people.example');
  const id = browser.cookie?.split('=')[1] ?? '';
  const stored = (await server.db.select().from(sessions)).map(({ idHash }) => idHash);
  expect(stored).toContain(createHash('sha256').update(id).digest('hex'));
  expect(JSON.stringify(stored)).not.toContain(id);
});

it('does not adopt an id that the browser came with', async () => {
  await signUp(server, 'Cat', 'cat@people.example');
  const browser = openBrowser(server);
  browser.cookie = `__Host-flightcase=${'a'.repeat(40)}`;
  await browser.get(accounts.signIn, {
    body: { email: 'cat@people.example', password: testPassword },
  });
  expect(browser.cookie).not.toBe(`__Host-flightcase=${'a'.repeat(40)}`);
  const planted = openBrowser(server);
  planted.cookie = `__Host-flightcase=${'a'.repeat(40)}`;
  expect(await isSignedIn(planted)).toBe(false);
});

it('ends the session a browser had when it signs in again', async () => {
  const browser = await signUp(server, 'Dot', 'dot@people.example');
  const before = openBrowser(server);
  before.cookie = browser.cookie;
  await browser.get(accounts.signIn, {
    body: { email: 'dot@people.example', password: testPassword },
  });
  expect(await isSignedIn(before)).toBe(false);
  expect(await isSignedIn(browser)).toBe(true);
});

it('gives a new cookie when the password changes, and signs everybody else out', async () => {
  const browser = await signUp(server, 'Eve', 'eve@people.example');
  const other = openBrowser(server);
  await other.get(accounts.signIn, {
    body: { email: 'eve@people.example', password: testPassword },
  });
  const before = openBrowser(server);
  before.cookie = browser.cookie;
  await browser.get(accounts.changePassword, {
    body: { currentPassword: testPassword, newPassword: 'quite another password' },
  });
  expect(await Promise.all([browser, other, before].map(isSignedIn))).toEqual([true, false, false]);
});

it('gives a new cookie when somebody accepts a role', async () => {
  const owner = await signUp(server, 'Fay', 'fay@people.example');
  const studio = await owner.get(studios.foundStudio, {
    body: { name: 'Fay Mixing', slug: 'fay-mixing' },
  });
  await owner.get(studios.inviteAssistant, {
    params: { studioId: studio.id },
    body: { email: 'gil@people.example' },
  });
  await server.runJobs();
  const token = secretFor(server, 'gil@people.example');
  const gil = await signUp(server, 'Gil', 'gil@people.example');
  const before = openBrowser(server);
  before.cookie = gil.cookie;
  await gil.get(invitations.acceptInvitation, { body: { token } });
  expect(await Promise.all([gil, before].map(isSignedIn))).toEqual([true, false]);
});

it('signs out here, or everywhere', async () => {
  const one = await signUp(server, 'Hana', 'hana@people.example');
  const two = openBrowser(server);
  const three = openBrowser(server);
  const body = { email: 'hana@people.example', password: testPassword };
  await two.get(accounts.signIn, { body });
  await three.get(accounts.signIn, { body });
  const kept = one.cookie;
  await one.get(accounts.signOut, {});
  expect(one.cookie).toBeNull();
  one.cookie = kept;
  expect(await Promise.all([one, two, three].map(isSignedIn))).toEqual([false, true, true]);
  const keptByThree = three.cookie;
  await two.get(accounts.signOutEverywhere, {});
  three.cookie = keptByThree;
  expect(await Promise.all([two, three].map(isSignedIn))).toEqual([false, false]);
});

it('ends after the idle lifetime, and lives on with the same id while it is used', async () => {
  const clock = createTestClock();
  const own = await startTestServer({ clock });
  try {
    const browser = await signUp(own, 'Ines', 'ines@people.example');
    const cookie = browser.cookie;
    clock.move(idleLifetimeMs - 60_000);
    const renewed = await browser.call(accounts.getSession, {});
    expect(renewed.body?.user?.name).toBe('Ines');
    // A renewed cookie must carry the id itself, not what the database holds.
    expect(browser.cookie).toBe(cookie);
    expect(renewed.setCookie).toContain(`Max-Age=${idleLifetimeMs / 1000}`);
    clock.move(idleLifetimeMs - 60_000);
    expect(await isSignedIn(browser)).toBe(true);
    clock.move(idleLifetimeMs + 60_000);
    expect(await isSignedIn(browser)).toBe(false);
  } finally {
    await own.close();
  }
});

it('ends after the absolute lifetime however much it is used', async () => {
  const clock = createTestClock();
  const own = await startTestServer({ clock });
  try {
    const browser = await signUp(own, 'Jana', 'jana@people.example');
    const cookie = browser.cookie;
    let days = 0;
    for (; days < 60 && (await isSignedIn(browser)); days += 1) {
      browser.cookie = cookie;
      clock.move(day);
    }
    expect(days).toBe(absoluteLifetimeMs / day);
  } finally {
    await own.close();
  }
});
