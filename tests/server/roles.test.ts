import { randomUUID } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { allEndpoints } from '#shared/api/all-endpoints.ts';
import type { Endpoint, EndpointInput } from '#shared/api/endpoint.ts';
import * as invitations from '#shared/api/invitations.ts';
import * as projects from '#shared/api/projects.ts';
import * as reports from '#shared/api/reports.ts';
import * as rules from '#shared/api/rules.ts';
import * as studios from '#shared/api/studios.ts';
import type { AppErrorCode } from '#shared/errors.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { testPassword } from '../support/server-browser.ts';
import {
  browserOf,
  makers,
  standings,
  storeScenario,
  type Scenario,
  type Standing,
} from '../support/server-scenario.ts';

/*
 * Every endpoint, tried as everybody. A new endpoint without a row here fails the first test;
 * a row without an outcome for somebody does not compile.
 */

let server: TestServer;
let scenario: Scenario;
let make: ReturnType<typeof makers>;
beforeAll(async () => {
  server = await startTestServer();
  scenario = await storeScenario(server);
  make = makers(server, scenario);
});
afterAll(() => server.close());

type Outcome = 'ok' | AppErrorCode;
type Outcomes = Record<Standing, Outcome>;

type Row = {
  endpoint: Endpoint;
  /** What is special about this row, where an endpoint has several. */
  about: string;
  outcomes: Outcomes;
  input: (standing: Standing) => unknown;
};

const rows: Row[] = [];

function row<E extends Endpoint>(
  endpoint: E,
  outcomes: Outcomes,
  input: (standing: Standing) => EndpointInput<E> | Promise<EndpointInput<E>>,
  about = '',
): void {
  rows.push({ endpoint, about, outcomes, input });
}

/** The same for everybody. */
function everybody(outcome: Outcome): Outcomes {
  return Object.fromEntries(standings.map((standing) => [standing, outcome])) as Outcomes;
}

/** Whoever is signed in. */
function signedIn(outcome: Outcome = 'ok'): Outcomes {
  return { ...everybody(outcome), visitor: 'sign-in-required' };
}

/** In the studio: the named may, other assistants may not, nobody else knows of it. */
function inStudio(...may: Standing[]): Outcomes {
  return {
    ...signedIn('not-found'),
    owner: 'not-allowed',
    'assistant on the project': 'not-allowed',
    'assistant not on the project': 'not-allowed',
    ...Object.fromEntries(may.map((standing) => [standing, 'ok'])),
  };
}

/** In the project: the named may, other members may not, nobody else knows of it. */
function inProject(...may: Standing[]): Outcomes {
  return {
    ...signedIn('not-found'),
    owner: 'not-allowed',
    'assistant on the project': 'not-allowed',
    artist: 'not-allowed',
    bandmate: 'not-allowed',
    ...Object.fromEntries(may.map((standing) => [standing, 'ok'])),
  };
}

const members: Standing[] = ['owner', 'assistant on the project', 'artist', 'bandmate'];
const assistants: Standing[] = ['assistant on the project', 'assistant not on the project'];

const email = () => `${randomUUID()}@people.example`;
const deadToken = 'x'.repeat(43);
const studioParams = () => ({ studioId: scenario.studioId });
const projectParams = () => ({ projectId: scenario.projectId });
const songParams = () => ({ songId: scenario.songId });

// Accounts: links that lead nowhere show that the door is open to all, and what lies behind it.
row(accounts.register, everybody('ok'), () => ({ body: { name: 'New', email: email() } }));
row(accounts.confirmAccount, everybody('link-expired'), () => ({
  body: { token: deadToken, password: testPassword },
}));
row(accounts.signIn, everybody('sign-in-failed'), () => ({
  body: { email: email(), password: 'wrong password' },
}));
row(accounts.getSession, everybody('ok'), () => ({}));
row(accounts.signOut, everybody('ok'), () => ({}));
row(accounts.signOutEverywhere, signedIn(), () => ({}));
row(accounts.requestPasswordReset, everybody('ok'), () => ({ body: { email: email() } }));
row(accounts.resetPassword, everybody('link-expired'), () => ({
  body: { token: deadToken, password: testPassword },
}));
row(accounts.changePassword, signedIn('sign-in-failed'), () => ({
  body: { currentPassword: 'wrong password', newPassword: 'another password' },
}));
row(accounts.requestAddressChange, signedIn('sign-in-failed'), () => ({
  body: { newEmail: email(), password: 'wrong password' },
}));
row(accounts.confirmAddressChange, everybody('link-expired'), () => ({
  body: { token: deadToken },
}));

row(studios.foundStudio, signedIn(), () => ({
  body: { name: 'Another', slug: `s-${randomUUID().slice(0, 8)}` },
}));
row(studios.listMyStudios, signedIn(), () => ({}));
row(studios.getStudio, inStudio('owner', ...assistants), () => ({
  params: { slug: scenario.slug },
}));
row(studios.listStudioMembers, inStudio('owner'), () => ({ params: studioParams() }));
row(studios.removeStudioMember, inStudio('owner'), async () => ({
  params: { ...studioParams(), userId: await make.assistant() },
}));
row(
  studios.removeStudioMember,
  { ...inStudio(), owner: 'not-allowed' },
  () => ({ params: { ...studioParams(), userId: scenario.userOf('owner') } }),
  'the owner',
);
row(
  studios.removeStudioMember,
  { ...inStudio(), owner: 'not-found' },
  () => ({ params: { ...studioParams(), userId: scenario.userOf('stranger') } }),
  'somebody who is no member',
);
row(studios.inviteAssistant, inStudio('owner'), () => ({
  params: studioParams(),
  body: { email: email() },
}));
row(studios.listStudioInvitations, inStudio('owner'), () => ({ params: studioParams() }));

row(invitations.readInvitation, everybody('link-expired'), () => ({ body: { token: deadToken } }));
row(invitations.acceptInvitation, everybody('link-expired'), () => ({
  body: { token: deadToken },
}));
row(
  invitations.revokeInvitation,
  inStudio('owner'),
  async () => ({ params: { invitationId: await make.invitation('assistant') } }),
  'to the studio',
);
row(
  invitations.revokeInvitation,
  inProject('owner'),
  async () => ({ params: { invitationId: await make.invitation('artist') } }),
  'of an artist',
);
row(
  invitations.revokeInvitation,
  inProject('owner', 'artist'),
  async () => ({ params: { invitationId: await make.invitation('bandmate') } }),
  'of a bandmate',
);

row(projects.listMyProjects, signedIn(), () => ({}));
row(projects.getProject, inProject(...members), () => ({ params: projectParams() }));
row(
  projects.getProject,
  { ...signedIn('not-found'), artist: 'ok' },
  async () => {
    const artist = await browserOf(server, scenario, 'artist');
    const { user } = await artist.get(accounts.getSession, {});
    return { params: { projectId: user?.privateProjectId ?? '' } };
  },
  "the artist's private one",
);
row(projects.createProject, inStudio('owner'), () => ({
  params: studioParams(),
  body: { title: 'Another EP', artistName: 'Band' },
}));
row(projects.listProjectMembers, inProject(...members), () => ({ params: projectParams() }));
row(projects.putAssistantOnProject, inProject('owner'), async () => ({
  params: { ...projectParams(), userId: await make.assistant() },
}));
row(
  projects.putAssistantOnProject,
  { ...inProject(), owner: 'not-found' },
  () => ({ params: { ...projectParams(), userId: scenario.userOf('stranger') } }),
  'somebody who is no assistant',
);
row(
  projects.removeProjectMember,
  inProject('owner', 'artist'),
  async () => ({ params: { ...projectParams(), userId: await make.member('bandmate') } }),
  'a bandmate',
);
row(
  projects.removeProjectMember,
  inProject('owner'),
  async () => ({ params: { ...projectParams(), userId: await make.member('artist') } }),
  'another artist',
);
row(
  projects.inviteToProject,
  inProject('owner'),
  () => ({ params: projectParams(), body: { email: email(), role: 'artist' as const } }),
  'an artist',
);
row(
  projects.inviteToProject,
  inProject('owner', 'artist'),
  () => ({ params: projectParams(), body: { email: email(), role: 'bandmate' as const } }),
  'a bandmate',
);
row(projects.listProjectInvitations, inProject('owner', 'artist'), () => ({
  params: projectParams(),
}));
row(projects.listSongs, inProject(...members), () => ({ params: projectParams() }));
row(projects.createSong, inProject('owner', 'artist', 'bandmate'), () => ({
  params: projectParams(),
  body: { title: 'Another song' },
}));
row(projects.getSong, inProject(...members), () => ({ params: songParams() }));

row(rules.listEditions, everybody('ok'), () => ({ params: { slug: scenario.slug } }));
row(rules.getEdition, everybody('ok'), () => ({ params: { slug: scenario.slug, number: 1 } }));
row(
  rules.getEdition,
  everybody('not-found'),
  () => ({ params: { slug: scenario.slug, number: 2 } }),
  'that is not published',
);

row(reports.storeReport, inProject(...members), () => ({
  params: songParams(),
  body: { submissionId: randomUUID(), report: scenario.report, rulesEdition: null },
}));
row(reports.listSongReports, inProject(...members), () => ({ params: songParams() }));
row(reports.listMyReports, signedIn(), () => ({}));
row(reports.getReport, inProject(...members), async () => ({
  params: { reportId: await make.report() },
}));
row(reports.putOverviews, inProject('artist'), async () => ({
  params: { reportId: await make.report() },
  bytes: Uint8Array.from(gzipSync(scenario.overviews)),
}));
row(reports.getOverviews, inProject(...members), async () => {
  const reportId = await make.report();
  const artist = await browserOf(server, scenario, 'artist');
  const bytes = Uint8Array.from(gzipSync(scenario.overviews));
  await artist.get(reports.putOverviews, { params: { reportId }, bytes });
  return { params: { reportId } };
});
row(reports.createReportShare, inProject('owner', 'artist'), async () => ({
  params: { reportId: await make.report() },
  body: {},
}));
row(reports.listReportShares, inProject('owner', 'artist'), async () => ({
  params: { reportId: await make.report() },
}));
row(reports.revokeReportShare, inProject('owner', 'artist'), async () => {
  const reportId = await make.report();
  return { params: { reportId, shareId: await make.share(reportId) } };
});
row(
  reports.revokeReportShare,
  { ...inProject(), owner: 'not-found', artist: 'not-found' },
  async () => {
    const shareId = await make.share(await make.report());
    return { params: { reportId: await make.report(), shareId } };
  },
  "another report's link",
);
row(reports.readSharedReport, everybody('link-expired'), () => ({ body: { token: deadToken } }));
row(reports.readSharedOverviews, everybody('link-expired'), () => ({
  body: { token: deadToken },
}));

describe('every endpoint', () => {
  it('has a row here', () => {
    const tried = new Set(rows.map(({ endpoint }) => endpoint));
    const missing = [...allEndpoints].filter(([, endpoint]) => !tried.has(endpoint));
    expect(missing.map(([name]) => name)).toEqual([]);
    expect(allEndpoints.size).toBeGreaterThan(40);
  });

  const names = new Map([...allEndpoints].map(([name, endpoint]) => [endpoint, name]));
  it.each(rows.map((tried) => [names.get(tried.endpoint), tried.about, tried] as const))(
    'lets nobody do more than they may: %s %s',
    async (_name, _about, { endpoint, input, outcomes }) => {
      const outcome: Partial<Outcomes> = {};
      for (const standing of standings) {
        const browser = await browserOf(server, scenario, standing);
        const made = await input(standing);
        const { problem } = await browser.call(endpoint, made);
        outcome[standing] = problem ? problem.code : 'ok';
      }
      expect(outcome).toEqual(outcomes);
    },
  );
});

describe('memberships', () => {
  it('end at once: who is taken off sees nothing any more, not even their own reports', async () => {
    const bandmate = await browserOf(server, scenario, 'bandmate');
    const stored = await bandmate.get(reports.storeReport, {
      params: songParams(),
      body: { submissionId: randomUUID(), report: scenario.report, rulesEdition: null },
    });
    const list = async () => (await bandmate.get(reports.listMyReports, {})).items.map((r) => r.id);
    expect(await list()).toContain(stored.id);
    const owner = await browserOf(server, scenario, 'owner');
    await owner.get(projects.removeProjectMember, {
      params: { ...projectParams(), userId: scenario.userOf('bandmate') },
    });
    expect(await list()).not.toContain(stored.id);
    const { problem } = await bandmate.call(reports.getReport, { params: { reportId: stored.id } });
    expect(problem?.code).toBe('not-found');
  });

  it('of an assistant on projects end with the one in the studio', async () => {
    const assistant = await browserOf(server, scenario, 'assistant on the project');
    const owner = await browserOf(server, scenario, 'owner');
    const seen = async () =>
      (await assistant.get(projects.listMyProjects, {})).items.map(({ id }) => id);
    expect(await seen()).toContain(scenario.projectId);
    await owner.get(studios.removeStudioMember, {
      params: { ...studioParams(), userId: scenario.userOf('assistant on the project') },
    });
    expect(await seen()).not.toContain(scenario.projectId);
  });

  it('are listed for each as what they see: assistants only the projects they are put on', async () => {
    const assistant = await browserOf(server, scenario, 'assistant not on the project');
    const { items } = await assistant.get(projects.listMyProjects, {});
    expect(items.map(({ title, role }) => [title, role])).toEqual([
      ['LP', 'assistant'],
      ['My checks', 'owner'],
    ]);
  });
});
