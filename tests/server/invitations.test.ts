import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import * as invitations from '#shared/api/invitations.ts';
import * as projects from '#shared/api/projects.ts';
import * as studios from '#shared/api/studios.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, secretFor, signUp, testPassword } from '../support/server-browser.ts';

let server: TestServer;
let owner: Awaited<ReturnType<typeof signUp>>;
let studioId: string;
let projectId: string;
beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server, 'Maren Holt', 'maren@people.example');
  const studio = await owner.get(studios.foundStudio, {
    body: { name: 'Harbour Lane Mixing', slug: 'harbour-lane' },
  });
  studioId = studio.id;
  const project = await owner.get(projects.createProject, {
    params: { studioId },
    body: { title: 'Weather for Two', artistName: 'Velvet Tramline' },
  });
  projectId = project.id;
});
afterAll(() => server.close());

/** Invites, and returns the secret of the mail. */
async function inviteToProject(email: string, role: 'artist' | 'bandmate', browser = owner) {
  await browser.get(projects.inviteToProject, { params: { projectId }, body: { email, role } });
  await server.runJobs();
  return secretFor(server, email);
}

async function inviteAssistant(email: string) {
  await owner.get(studios.inviteAssistant, { params: { studioId }, body: { email } });
  await server.runJobs();
  return secretFor(server, email);
}

async function rolesInProject(): Promise<Record<string, string>> {
  const { items } = await owner.get(projects.listProjectMembers, { params: { projectId } });
  return Object.fromEntries(items.map(({ email, role }) => [email, role]));
}

describe('an invitation', () => {
  it('tells its reader what it is for, and whether to sign in or to make an account', async () => {
    const token = await inviteToProject('juno@people.example', 'artist');
    const read = await openBrowser(server).get(invitations.readInvitation, { body: { token } });
    expect(read).toMatchObject({
      role: 'artist',
      invitedBy: 'Maren Holt',
      email: 'juno@people.example',
      hasAccount: false,
      studioName: 'Harbour Lane Mixing',
      projectTitle: 'Weather for Two',
    });
    await signUp(server, 'Ken', 'ken@people.example');
    const known = await inviteAssistant('ken@people.example');
    const readKnown = await owner.get(invitations.readInvitation, { body: { token: known } });
    expect([readKnown.hasAccount, readKnown.projectTitle]).toEqual([true, null]);
  });

  it('makes an account for the address it went to, which it has proved, and signs in', async () => {
    const email = 'lou@people.example';
    const token = await inviteToProject(email, 'artist');
    const browser = openBrowser(server);
    const body = { token, newAccount: { name: 'Lou', password: testPassword } };
    const accepted = await browser.get(invitations.acceptInvitation, { body });
    expect(accepted).toMatchObject({ projectId, session: { user: { name: 'Lou', email } } });
    const { items } = await browser.get(projects.listMyProjects, {});
    expect(items.map(({ title, role }) => [title, role])).toEqual([
      ['My checks', 'owner'],
      ['Weather for Two', 'artist'],
    ]);
    const replay = await openBrowser(server).call(invitations.acceptInvitation, { body });
    expect(replay.problem?.code).toBe('link-expired');
  });

  it('asks a visitor to sign in, or for an account; never makes a second one', async () => {
    const email = 'mia@people.example';
    await signUp(server, 'Mia', email);
    const token = await inviteToProject(email, 'bandmate');
    const visitor = openBrowser(server);
    const bare = await visitor.call(invitations.acceptInvitation, { body: { token } });
    expect(bare.problem?.code).toBe('sign-in-required');
    const second = await visitor.call(invitations.acceptInvitation, {
      body: { token, newAccount: { name: 'Mia', password: testPassword } },
    });
    expect(second.problem).toMatchObject({ code: 'already-taken', details: { field: 'email' } });
    await visitor.get(accounts.signIn, { body: { email, password: testPassword } });
    await visitor.get(invitations.acceptInvitation, { body: { token } });
    expect((await rolesInProject())[email]).toBe('bandmate');
  });

  it('can be accepted with an account of another address', async () => {
    const browser = await signUp(server, 'Noa', 'noa@people.example');
    const token = await inviteToProject('noa@work.example', 'bandmate');
    await browser.get(invitations.acceptInvitation, { body: { token } });
    expect(await rolesInProject()).toMatchObject({ 'noa@people.example': 'bandmate' });
  });

  it('is used by one of two who have its link', async () => {
    const token = await inviteToProject('two@people.example', 'bandmate');
    const people = [
      await signUp(server, 'Ola', 'ola@people.example'),
      await signUp(server, 'Pia', 'pia@people.example'),
    ];
    const answers = await Promise.all(
      people.map((browser) => browser.call(invitations.acceptInvitation, { body: { token } })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410]);
  });

  it('replaces an earlier one to the same address, and stops working when revoked or old', async () => {
    const email = 'quin@people.example';
    const first = await inviteToProject(email, 'bandmate');
    const second = await inviteToProject(email, 'artist');
    const list = async () =>
      (await owner.get(projects.listProjectInvitations, { params: { projectId } })).items.filter(
        (invitation) => invitation.email === email,
      );
    const open = await list();
    expect(open.map(({ role }) => role)).toEqual(['artist']);
    const browser = await signUp(server, 'Quin', email);
    const accept = (token: string) =>
      browser.call(invitations.acceptInvitation, { body: { token } });
    expect((await accept(first)).problem?.code).toBe('link-expired');
    await owner.get(invitations.revokeInvitation, {
      params: { invitationId: open[0]?.id ?? '' },
    });
    expect((await accept(second)).problem?.code).toBe('link-expired');
    const third = await inviteToProject(email, 'artist');
    server.clock.move(15 * 86_400_000);
    await owner.get(accounts.signIn, {
      body: { email: 'maren@people.example', password: testPassword },
    });
    expect(await list()).toEqual([]);
    const late = await openBrowser(server).call(invitations.readInvitation, {
      body: { token: third },
    });
    expect(late.problem?.code).toBe('link-expired');
  });

  it('makes a bandmate the artist, but no artist a bandmate', async () => {
    const browser = await signUp(server, 'Ray', 'ray@people.example');
    const roles: (string | undefined)[] = [];
    for (const role of ['bandmate', 'artist', 'bandmate'] as const) {
      const token = await inviteToProject('ray@people.example', role);
      await browser.get(invitations.acceptInvitation, { body: { token } });
      roles.push((await rolesInProject())['ray@people.example']);
    }
    expect(roles).toEqual(['bandmate', 'artist', 'artist']);
  });

  it('does not turn the owner or an assistant into something less, and stays open', async () => {
    const toOwner = await inviteToProject('maren@people.example', 'artist');
    const asOwner = await owner.call(invitations.acceptInvitation, { body: { token: toOwner } });
    expect(asOwner.problem).toMatchObject({ code: 'conflict', details: { current: 'owner' } });
    const staff = await inviteAssistant('maren@people.example');
    const asStaff = await owner.call(invitations.acceptInvitation, { body: { token: staff } });
    expect(asStaff.problem?.code).toBe('conflict');

    const email = 'tobi@people.example';
    const tobi = await signUp(server, 'Tobi Adler', email);
    const accept = (token: string) => tobi.call(invitations.acceptInvitation, { body: { token } });
    expect((await accept(await inviteAssistant(email))).body?.studioSlug).toBe('harbour-lane');
    await owner.get(projects.putAssistantOnProject, {
      params: { projectId, userId: tobi.userId },
    });
    await owner.get(projects.putAssistantOnProject, {
      params: { projectId, userId: tobi.userId },
    });
    const asArtist = await accept(await inviteToProject(email, 'artist'));
    expect(asArtist.problem).toMatchObject({ code: 'conflict', details: { current: 'assistant' } });
    const { items } = await tobi.get(studios.listMyStudios, {});
    expect(items.map(({ slug, role }) => [slug, role])).toEqual([['harbour-lane', 'assistant']]);
  });

  it('to a project comes from its artist too, to a private project from nobody', async () => {
    const artist = await signUp(server, 'Uri', 'uri@people.example');
    const token = await inviteToProject('uri@people.example', 'artist');
    await artist.get(invitations.acceptInvitation, { body: { token } });
    await inviteToProject('sol@people.example', 'bandmate', artist);
    expect(server.catcher.mails()[0]?.subject).toBe(
      'Uri invites you to prepare files for Harbour Lane Mixing',
    );
    const { problem } = await artist.call(projects.inviteToProject, {
      params: { projectId: artist.privateProjectId },
      body: { email: 'sol@people.example', role: 'bandmate' },
    });
    expect(problem?.code).toBe('not-allowed');
  });
});

describe('a studio', () => {
  it('has a slug of its own, also when two are founded at once', async () => {
    const found = () =>
      owner.call(studios.foundStudio, { body: { name: 'Twin', slug: 'twin-studio' } });
    const answers = await Promise.all([found(), found(), found()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    const refused = answers.find(({ status }) => status === 409);
    expect(refused?.problem).toMatchObject({ code: 'already-taken', details: { field: 'slug' } });
  });

  it.each(['ab', 'Upper', 'two--dashes', '-edge', 'a b', 'x'.repeat(41), 'ünder'])(
    'cannot be called %s in its address',
    async (slug) => {
      const { problem } = await owner.call(studios.foundStudio, { body: { name: 'Name', slug } });
      expect(problem?.code).toBe('invalid-request');
    },
  );

  it('lists projects newest first, each page where the last one ended', async () => {
    for (let count = 0; count < 5; count += 1) {
      await owner.get(projects.createProject, {
        params: { studioId },
        body: { title: `EP ${count}`, artistName: 'Band' },
      });
    }
    const titles: string[] = [];
    let cursor: string | null | undefined;
    while (cursor !== null) {
      const page = await owner.get(projects.listMyProjects, {
        query: cursor ? { limit: 2, cursor } : { limit: 2 },
      });
      titles.push(...page.items.map(({ title }) => title));
      cursor = page.nextCursor;
    }
    expect(titles).toEqual([
      ...['EP 4', 'EP 3', 'EP 2', 'EP 1', 'EP 0'],
      ...['Weather for Two', 'My checks'],
    ]);
  });
});
