import { randomUUID } from 'node:crypto';
import { createSessions } from '../../server/accounts/sessions.ts';
import { insertUser } from '../../server/accounts/queries.ts';
import { hashPassword } from '../../server/accounts/passwords.ts';
import {
  invitations,
  projectMembers,
  reports,
  reportShares,
  studioMembers,
} from '../../server/db/schema.ts';
import { insertProject, insertSong } from '../../server/projects/queries.ts';
import { insertEdition } from '../../server/rules/queries.ts';
import { insertStudio } from '../../server/studios/queries.ts';
import { newSecret } from '../../server/secret.ts';
import { hashRules } from '#shared/rules/canonical-json.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import type { TestServer } from './server-app.ts';
import { openBrowser, testPassword, type TestBrowser } from './server-browser.ts';
import { checkSmallSession } from './server-report.ts';

/** What somebody can be towards one project. */
export const standings = [
  'owner',
  'assistant on the project',
  'assistant not on the project',
  'artist',
  'bandmate',
  'artist of another project',
  'stranger',
  'visitor',
] as const;
export type Standing = (typeof standings)[number];

/** A studio with two projects and everybody there can be around the first one. */
export async function storeScenario(server: TestServer) {
  const { db } = server;
  const now = server.clock.now();
  const passwordHash = await hashPassword(testPassword);
  const rules = starterSets['group-letter'];
  const { report, overviews } = await checkSmallSession(rules);

  return db.transaction(async (transaction) => {
    const makeUser = (name: string) =>
      insertUser(transaction, {
        ...{ name, passwordHash },
        email: `${name.replaceAll(' ', '-')}@people.example`,
        createdAt: now,
      });
    const userIds = new Map<Standing, string>();
    for (const standing of standings) {
      if (standing !== 'visitor') userIds.set(standing, await makeUser(standing));
    }
    const userOf = (standing: Standing) => userIds.get(standing) ?? '';
    const { id: studioId } = await insertStudio(
      transaction,
      { slug: 'the-studio', name: 'The Studio', createdAt: now },
      userOf('owner'),
    );
    for (const standing of ['assistant on the project', 'assistant not on the project'] as const) {
      await transaction
        .insert(studioMembers)
        .values({ studioId, userId: userOf(standing), role: 'assistant', joinedAt: now });
    }
    await insertEdition(transaction, {
      ...{ studioId, rules },
      number: 1,
      rulesHash: await hashRules(rules),
      changeSummary: '',
      publishedBy: userOf('owner'),
      publishedAt: now,
    });
    const project = { studioId, title: 'EP', artistName: 'Band', createdAt: now };
    const projectId = await insertProject(transaction, project);
    const otherProjectId = await insertProject(transaction, { ...project, title: 'LP' });
    await transaction.insert(projectMembers).values([
      { projectId, userId: userOf('artist'), role: 'artist', joinedAt: now },
      { projectId, userId: userOf('bandmate'), role: 'bandmate', joinedAt: now },
      {
        ...{ projectId, userId: userOf('assistant on the project') },
        ...{ role: 'assistant', assistantStudioId: studioId, joinedAt: now },
      },
      {
        ...{ projectId: otherProjectId, userId: userOf('artist of another project') },
        ...{ role: 'artist', joinedAt: now },
      },
      {
        ...{ projectId: otherProjectId, userId: userOf('assistant not on the project') },
        ...{ role: 'assistant', assistantStudioId: studioId, joinedAt: now },
      },
    ]);
    const { id: songId } = await insertSong(transaction, {
      projectId,
      title: 'Song',
      createdAt: now,
    });
    return { studioId, slug: 'the-studio', projectId, songId, report, overviews, userOf };
  });
}
export type Scenario = Awaited<ReturnType<typeof storeScenario>>;

/** Signed in as somebody under a session that nothing else uses. */
export async function browserOf(
  server: TestServer,
  scenario: Scenario,
  standing: Standing,
): Promise<TestBrowser> {
  const browser = openBrowser(server);
  if (standing !== 'visitor') {
    const sessions = createSessions(server.db, server.clock);
    const { cookie } = await sessions.start(scenario.userOf(standing));
    browser.cookie = cookie.split(';')[0] ?? null;
  }
  return browser;
}

/** Things that an endpoint uses up, made afresh for each try. */
export function makers(
  server: TestServer,
  { studioId, projectId, songId, report, userOf }: Scenario,
) {
  const { db, clock } = server;
  const joinedAt = clock.now();
  const newUser = () =>
    db.transaction((transaction) =>
      insertUser(transaction, {
        name: 'Somebody',
        email: `${randomUUID()}@people.example`,
        passwordHash: '$argon2id$none',
        createdAt: joinedAt,
      }),
    );
  const later = new Date(joinedAt.getTime() + 86_400_000);
  return {
    async assistant(): Promise<string> {
      const userId = await newUser();
      await db.insert(studioMembers).values({ studioId, userId, role: 'assistant', joinedAt });
      return userId;
    },
    async member(role: 'artist' | 'bandmate'): Promise<string> {
      const userId = await newUser();
      await db.insert(projectMembers).values({ projectId, userId, role, joinedAt });
      return userId;
    },
    async invitation(role: 'assistant' | 'artist' | 'bandmate'): Promise<string> {
      const [row] = await db
        .insert(invitations)
        .values({
          tokenHash: newSecret().secretHash,
          email: `${randomUUID()}@people.example`,
          role,
          ...(role === 'assistant' ? { studioId } : { projectId }),
          invitedBy: userOf('owner'),
          createdAt: joinedAt,
          expiresAt: later,
        })
        .returning();
      return row?.id ?? '';
    },
    /** Stored by the artist. */
    async report(): Promise<string> {
      const [row] = await db
        .insert(reports)
        .values({
          ...{ songId, report, submissionId: randomUUID() },
          createdBy: userOf('artist'),
          createdAt: joinedAt,
          rulesHash: report.rulesHash,
          reportSchema: report.schema,
          measureVersion: report.measureVersion,
          judgeVersion: report.judgeVersion,
          verdict: report.verdict,
          counts: report.counts,
          judgedAgain: 'same',
          differences: [],
        })
        .returning();
      return row?.id ?? '';
    },
    async share(reportId: string): Promise<string> {
      const [row] = await db
        .insert(reportShares)
        .values({
          reportId,
          tokenHash: newSecret().secretHash,
          createdBy: userOf('artist'),
          createdAt: joinedAt,
          expiresAt: later,
        })
        .returning();
      return row?.id ?? '';
    },
  };
}
