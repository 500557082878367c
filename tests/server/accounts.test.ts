import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { startTestServer, type TestServer } from '../support/server-app.ts';
import { openBrowser, secretFor, signUp, testPassword } from '../support/server-browser.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

/** The secrets of all links that were mailed to an address. */
function secretsMailedTo(email: string): string[] {
  return server.catcher
    .mails()
    .filter(({ to }) => to.includes(email))
    .flatMap(({ text }) => /#token=(\S+)/.exec(text)?.[1] ?? []);
}

describe('register and confirm', () => {
  it('answers the same for a new and a known address and mails what fits', async () => {
    await signUp(server, 'Ada Known', 'known@people.example');
    const browser = openBrowser(server);
    const forNew = await browser.call(accounts.register, {
      body: { name: 'Ada New', email: 'new@people.example' },
    });
    const forKnown = await browser.call(accounts.register, {
      body: { name: 'Ada Known', email: 'known@people.example' },
    });
    expect([forNew.status, forKnown.status]).toEqual([204, 204]);
    expect(forNew.setCookie ?? forKnown.setCookie).toBeNull();
    await server.runJobs();
    const [known, fresh] = server.catcher.mails();
    expect(fresh?.to).toEqual(['new@people.example']);
    expect(fresh?.text).toContain('/confirm#token=');
    expect(known?.to).toEqual(['known@people.example']);
    expect(known?.text).not.toContain('#token=');
  });

  it('keeps an address as one whatever its case and spaces', async () => {
    await signUp(server, 'Bo Case', 'bo@people.example');
    const browser = openBrowser(server);
    const signedIn = await browser.get(accounts.signIn, {
      body: { email: '  BO@People.Example ', password: testPassword },
    });
    expect(signedIn.user?.email).toBe('bo@people.example');
  });

  it('makes the account once: a used, an expired and an invented link are the same news', async () => {
    const browser = openBrowser(server);
    const email = 'once@people.example';
    await browser.get(accounts.register, { body: { name: 'Once', email } });
    await server.runJobs();
    const token = secretFor(server, email);
    const body = { token, password: testPassword };
    expect((await browser.call(accounts.confirmAccount, { body })).status).toBe(200);
    const again = await openBrowser(server).call(accounts.confirmAccount, { body });
    expect([again.status, again.problem?.code]).toEqual([410, 'link-expired']);

    const late = 'late@people.example';
    await browser.get(accounts.register, { body: { name: 'Late', email: late } });
    await server.runJobs();
    server.clock.move(25 * 3_600_000);
    const expired = await browser.call(accounts.confirmAccount, {
      body: { token: secretFor(server, late), password: testPassword },
    });
    expect(expired.problem?.code).toBe('link-expired');
    const invented = await browser.call(accounts.confirmAccount, {
      body: { token: 'x'.repeat(43), password: testPassword },
    });
    expect(invented.problem?.code).toBe('link-expired');
  });

  it('lets only one of two registrations of the same address become the account', async () => {
    const email = 'twice@people.example';
    const [one, two] = [openBrowser(server), openBrowser(server)];
    await Promise.all([
      one.get(accounts.register, { body: { name: 'First', email } }),
      two.get(accounts.register, { body: { name: 'Second', email } }),
    ]);
    await server.runJobs();
    const tokens = secretsMailedTo(email);
    expect(new Set(tokens).size).toBe(2);
    const answers = await Promise.all(
      tokens.map((token, index) =>
        openBrowser(server).call(accounts.confirmAccount, {
          body: { token, password: `${testPassword} ${index}` },
        }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410]);
  });

  it('lets one of several links win when they are used at once, round after round', async () => {
    for (let round = 0; round < 6; round += 1) {
      const email = `crowd-${round}@people.example`;
      const browser = openBrowser(server);
      const useAtOnce = async (
        endpoint: typeof accounts.confirmAccount | typeof accounts.resetPassword,
      ) => {
        await server.runJobs();
        const answers = await Promise.all(
          secretsMailedTo(email).map((token) =>
            openBrowser(server).call(endpoint, { body: { token, password: testPassword } }),
          ),
        );
        return answers.map(({ status }) => status).sort();
      };
      for (let turn = 0; turn < 2; turn += 1) {
        await browser.get(accounts.register, { body: { name: 'Crowd', email } });
      }
      expect(await useAtOnce(accounts.confirmAccount)).toEqual([200, 410]);
      for (let turn = 0; turn < 3; turn += 1) {
        await browser.get(accounts.requestPasswordReset, { body: { email } });
      }
      // The two used-up links of the registration are among these.
      expect(await useAtOnce(accounts.resetPassword)).toEqual([200, 410, 410, 410, 410]);
    }
  });

  it('refuses a password that is too short, too long or repeats a handful of characters', async () => {
    const browser = openBrowser(server);
    for (const password of ['elevenchars', 'abcde'.repeat(26), 'abababababababab']) {
      const { problem } = await browser.call(accounts.confirmAccount, {
        body: { token: 'x'.repeat(43), password },
      });
      expect(problem?.code).toBe('invalid-request');
      expect(problem?.details.issues).toMatchObject([{ path: 'body.password' }]);
    }
  });
});

describe('sign in', () => {
  it('says the same for a wrong password and an unknown address', async () => {
    await signUp(server, 'Cy', 'cy@people.example');
    const browser = openBrowser(server);
    const wrong = await browser.call(accounts.signIn, {
      body: { email: 'cy@people.example', password: 'not the password' },
    });
    const unknown = await browser.call(accounts.signIn, {
      body: { email: 'nobody@people.example', password: 'not the password' },
    });
    for (const { status, problem, setCookie } of [wrong, unknown]) {
      expect([status, problem?.code, problem?.details, setCookie]).toEqual([
        401,
        'sign-in-failed',
        {},
        null,
      ]);
    }
  });

  it('takes a password with accents however a system composes them', async () => {
    const browser = await signUp(server, 'Dé', 'de@people.example');
    await browser.get(accounts.changePassword, {
      body: { currentPassword: testPassword, newPassword: 'caf\u00e9 au lait frapp\u00e9' },
    });
    const decomposed = await openBrowser(server).call(accounts.signIn, {
      body: { email: 'de@people.example', password: 'cafe\u0301 au lait frappe\u0301' },
    });
    expect(decomposed.status).toBe(200);
  });
});

describe('reset the password', () => {
  it('answers the same for a known and an unknown address and mails what fits', async () => {
    await signUp(server, 'Ed', 'ed@people.example');
    const browser = openBrowser(server);
    for (const email of ['ed@people.example', 'unheard@people.example']) {
      const { status } = await browser.call(accounts.requestPasswordReset, { body: { email } });
      expect(status).toBe(204);
    }
    await server.runJobs();
    const [unknown, known] = server.catcher.mails();
    expect(known?.text).toContain('/reset-password#token=');
    expect(unknown?.text).toContain('no account belongs to this address');
  });

  it('sets the password once, ends every other session and tells by mail', async () => {
    const email = 'flo@people.example';
    const before = await signUp(server, 'Flo', email);
    const browser = openBrowser(server);
    await browser.get(accounts.requestPasswordReset, { body: { email } });
    await browser.get(accounts.requestPasswordReset, { body: { email } });
    await server.runJobs();
    const token = secretFor(server, email);
    const earlier = /#token=(\S+)/.exec(
      server.catcher.mails().filter(({ to }) => to.includes(email))[1]?.text ?? '',
    )?.[1];
    const password = 'another fine password';
    const reset = await browser.get(accounts.resetPassword, { body: { token, password } });
    expect(reset.user?.email).toBe(email);
    expect((await before.get(accounts.getSession, {})).user).toBeNull();
    for (const dead of [token, earlier ?? '']) {
      const { problem } = await openBrowser(server).call(accounts.resetPassword, {
        body: { token: dead, password },
      });
      expect(problem?.code).toBe('link-expired');
    }
    await server.runJobs();
    expect(server.catcher.mails()[0]?.subject).toContain('password was changed');
    const old = await openBrowser(server).call(accounts.signIn, {
      body: { email, password: testPassword },
    });
    expect(old.status).toBe(401);
  });

  it('lets a link lapse after an hour', async () => {
    const email = 'gus@people.example';
    await signUp(server, 'Gus', email);
    const browser = openBrowser(server);
    await browser.get(accounts.requestPasswordReset, { body: { email } });
    await server.runJobs();
    server.clock.move(61 * 60_000);
    const { problem } = await browser.call(accounts.resetPassword, {
      body: { token: secretFor(server, email), password: 'another fine password' },
    });
    expect(problem?.code).toBe('link-expired');
  });
});

describe('change the address', () => {
  it('moves the account when the new address is confirmed and tells the old one', async () => {
    const [oldEmail, newEmail] = ['hal@people.example', 'hal@elsewhere.example'];
    const browser = await signUp(server, 'Hal', oldEmail);
    const refused = await browser.call(accounts.requestAddressChange, {
      body: { newEmail, password: 'wrong password' },
    });
    expect(refused.problem?.code).toBe('sign-in-failed');
    await browser.get(accounts.requestAddressChange, {
      body: { newEmail, password: testPassword },
    });
    await server.runJobs();
    expect((await browser.get(accounts.getSession, {})).user?.email).toBe(oldEmail);
    const cookieBefore = browser.cookie;
    const token = secretFor(server, newEmail);
    const elsewhere = openBrowser(server);
    const confirmed = await browser.get(accounts.confirmAddressChange, { body: { token } });
    expect(confirmed.email).toBe(newEmail);
    expect(browser.cookie).not.toBe(cookieBefore);
    expect((await browser.get(accounts.getSession, {})).user?.email).toBe(newEmail);
    const replay = await elsewhere.call(accounts.confirmAddressChange, { body: { token } });
    expect(replay.problem?.code).toBe('link-expired');
    await server.runJobs();
    const notice = server.catcher.mails()[0];
    expect([notice?.to, notice?.text.includes('another address')]).toEqual([[oldEmail], true]);
  });

  it('does not say whether the new address has an account, and gives it no second one', async () => {
    await signUp(server, 'Ida', 'ida@people.example');
    const browser = await signUp(server, 'Jo', 'jo@people.example');
    const { status } = await browser.call(accounts.requestAddressChange, {
      body: { newEmail: 'ida@people.example', password: testPassword },
    });
    expect(status).toBe(204);
    await server.runJobs();
    const mail = server.catcher.mails()[0];
    expect(mail?.to).toEqual(['ida@people.example']);
    expect(mail?.text).not.toContain('#token=');
  });
});
