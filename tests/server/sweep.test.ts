import { afterAll, beforeAll, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { accountTokens, sessions } from '../../server/db/schema.ts';
import { mailOutbox, rateLimits } from '../../server/db/work-tables.ts';
import { sweepExpired } from '../../server/jobs/sweep.ts';
import { createTestClock, startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, signUp } from '../support/server-browser.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer({ clock: createTestClock() });
});
afterAll(() => server.close());

async function counts() {
  const { db } = server;
  return {
    sessions: await db.$count(sessions),
    tokens: await db.$count(accountTokens),
    mails: await db.$count(mailOutbox),
    limits: await db.$count(rateLimits),
  };
}

it('removes what has expired and nothing that could still be used', async () => {
  await signUp(server, 'Ann', 'ann@people.example');
  await openBrowser(server).get(accounts.register, {
    body: { name: 'Bea', email: 'bea@people.example' },
  });
  const before = await counts();
  expect(before).toMatchObject({ sessions: 1, tokens: 1, mails: 2 });
  await sweepExpired(server.db, server.clock);
  expect(await counts()).toEqual(before);

  server.clock.move(8 * 86_400_000);
  await sweepExpired(server.db, server.clock);
  expect(await counts()).toEqual({ sessions: 0, tokens: 0, mails: 2, limits: 0 });
  server.clock.move(30 * 86_400_000);
  await sweepExpired(server.db, server.clock);
  expect((await counts()).mails).toBe(0);
});
