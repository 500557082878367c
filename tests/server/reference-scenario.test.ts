import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import * as projects from '#shared/api/projects.ts';
import { getEdition, listEditions } from '#shared/api/rules.ts';
import { hashRules } from '#shared/rules/canonical-json.ts';
import { houseRulesEditions, projects as projectTable, users } from '../../server/db/schema.ts';
import { demoPeople, storeReferenceScenario } from '../../server/dev/reference-scenario.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser } from '../support/server-browser.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

it('is stored once, also when two starts meet, and everybody can sign in', async () => {
  const store = () => storeReferenceScenario(server.db, server.clock.now()).catch(() => 'lost');
  const first = await Promise.all([store(), store()]);
  expect(first.filter((outcome) => outcome === true)).toHaveLength(1);
  expect(await store()).toBe(false);
  expect(await server.db.select().from(users)).toHaveLength(demoPeople.length);

  const roles: Record<string, string[]> = {};
  for (const { email, password, name } of demoPeople) {
    const browser = openBrowser(server);
    await browser.get(accounts.signIn, { body: { email, password } });
    const { items } = await browser.get(projects.listMyProjects, {});
    roles[name] = items.map(({ title, role }) => `${title}: ${role}`);
  }
  expect(roles).toEqual({
    'Maren Holt': ['Weather for Two: owner', 'My checks: owner'],
    'Tobi Adler': ['Weather for Two: assistant', 'My checks: owner'],
    'Juno Park': ['Weather for Two: artist', 'My checks: owner'],
    'Sol Reyes': ['Weather for Two: bandmate', 'My checks: owner'],
  });
});

it('publishes edition 1 for everybody, under the hash of its own rules', async () => {
  const visitor = openBrowser(server);
  const slug = 'harbour-lane-mixing';
  const { items } = await visitor.get(listEditions, { params: { slug } });
  expect(items.map(({ number }) => number)).toEqual([1]);
  const edition = await visitor.get(getEdition, { params: { slug, number: 'latest' } });
  expect(edition.studio.name).toBe('Harbour Lane Mixing');
  expect(edition.rules.names.tokens[0]).toBe('group');
  // Also after jsonb has put the members into an order of its own.
  expect(await hashRules(edition.rules)).toBe(edition.rulesHash);
  const [project] = await server.db
    .select({ number: houseRulesEditions.number })
    .from(projectTable)
    .innerJoin(houseRulesEditions, eq(houseRulesEditions.id, projectTable.rulesEditionId));
  expect(project?.number).toBe(1);
});
