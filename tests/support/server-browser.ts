import request from 'supertest';
import type { Endpoint, EndpointInput, EndpointResponse } from '#shared/api/endpoint.ts';
import * as accounts from '#shared/api/accounts.ts';
import { problemSchema, type Problem } from '#shared/api/problem.ts';
import { testOrigin, type TestServer } from './server-app.ts';

export type Answer<E extends Endpoint> = {
  status: number;
  /** Parsed by the contract on success, null otherwise. */
  body: EndpointResponse<E> | null;
  /** Parsed as problem details on failure. */
  problem: Problem | null;
  headers: Record<string, string>;
  setCookie: string | null;
};

/** What a browser does for us: keeps the cookie, names the origin of the page. */
export type TestBrowser = {
  call<E extends Endpoint>(endpoint: E, input: EndpointInput<E>): Promise<Answer<E>>;
  /** The same, but anything except success fails the test. */
  get<E extends Endpoint>(endpoint: E, input: EndpointInput<E>): Promise<EndpointResponse<E>>;
  cookie: string | null;
  /** The network address the requests seem to come from. */
  networkAddress: string;
};

type LooseInput = {
  params?: Record<string, unknown>;
  query?: Record<string, unknown>;
  body?: object;
  bytes?: Uint8Array;
};

let networkCount = 0;

/** Another network for every browser, so that the limits of one do not stop the next. */
function nextNetworkAddress(): string {
  networkCount += 1;
  return `10.${(networkCount >> 16) & 255}.${(networkCount >> 8) & 255}.${networkCount & 255}`;
}

/** A browser without cookies. `__Host-` cookies are set by hand: the tests speak plain HTTP. */
export function openBrowser(server: TestServer): TestBrowser {
  const browser: TestBrowser = {
    cookie: null,
    networkAddress: nextNetworkAddress(),
    async call(endpoint, input) {
      const { params = {}, query = {}, body, bytes } = input as LooseInput;
      const path = endpoint.path.replace(/:(\w+)/g, (_match, name: string) =>
        encodeURIComponent(String(params[name])),
      );
      const method = endpoint.method.toLowerCase() as Lowercase<Endpoint['method']>;
      let sending = request(server.url)
        [method](path)
        .query(query)
        .set('Origin', testOrigin)
        .set('X-Forwarded-For', browser.networkAddress);
      if (browser.cookie) sending = sending.set('Cookie', browser.cookie);
      if (endpoint.responseBytes) sending = sending.responseType('blob');
      if (bytes && endpoint.bodyBytes) {
        sending = sending
          .set('Content-Type', endpoint.bodyBytes.mediaType)
          .send(Buffer.from(bytes));
      } else if (body) sending = sending.send(body);
      const response = await sending;
      const setCookie = takeCookie(browser, response.headers);
      const succeeded = response.status < 300;
      return {
        status: response.status,
        body: (!succeeded
          ? null
          : endpoint.responseBytes
            ? new Uint8Array(response.body as Buffer)
            : (endpoint.response?.parse(response.body) ?? null)) as never,
        problem: succeeded
          ? null
          : problemSchema.parse(
              response.body instanceof Buffer
                ? JSON.parse(response.body.toString())
                : (response.body as unknown),
            ),
        headers: response.headers,
        setCookie,
      };
    },
    async get(endpoint, input) {
      const { status, body, problem } = await browser.call(endpoint, input);
      if (status >= 300) throw new Error(`${endpoint.path}: ${status} ${JSON.stringify(problem)}`);
      return body as never;
    },
  };
  return browser;
}

function takeCookie(browser: TestBrowser, headers: Record<string, unknown>): string | null {
  const lines = headers['set-cookie'];
  const line = Array.isArray(lines) ? String(lines.at(-1)) : null;
  if (line) {
    const pair = line.split(';')[0] ?? '';
    browser.cookie = /Max-Age=0(;|$)/i.test(line) ? null : pair;
  }
  return line;
}

/** The secret in the newest mail to an address. */
export function secretFor(server: TestServer, email: string): string {
  const mail = server.catcher.mails().find(({ to }) => to.includes(email));
  const secret = /#token=([A-Za-z0-9_-]{43})/.exec(mail?.text ?? '')?.[1];
  if (!secret) throw new Error(`no link was mailed to ${email}`);
  return secret;
}

export const testPassword = 'a room with a good reverb';

/** A browser in which a new person has registered, confirmed and is signed in. */
export async function signUp(
  server: TestServer,
  name: string,
  email: string,
): Promise<TestBrowser & { userId: string; privateProjectId: string }> {
  const browser = openBrowser(server);
  await browser.get(accounts.register, { body: { name, email } });
  await server.runJobs();
  const token = secretFor(server, email);
  const { user } = await browser.get(accounts.confirmAccount, {
    body: { token, password: testPassword },
  });
  if (!user) throw new Error('confirmed, but not signed in');
  return Object.assign(browser, { userId: user.id, privateProjectId: user.privateProjectId });
}
