import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { startTestServer, testOrigin, type TestServer } from '../support/server-app.ts';
import { openBrowser, signUp, testPassword } from '../support/server-browser.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

function post(path: string) {
  return request(server.url).post(path).set('Origin', testOrigin);
}

type Body = { code?: string; details?: Record<string, unknown> };

describe('error answers', () => {
  it('are problem details with code and request id (RFC 9457, section 3)', async () => {
    const answer = await request(server.url).get('/api/no-such-thing?token=secret');
    expect(answer.status).toBe(404);
    expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    expect(answer.body).toEqual({
      type: 'about:blank',
      title: 'Not Found',
      status: 404,
      code: 'not-found',
      details: {},
      requestId: answer.headers['x-request-id'],
    });
  });

  it.each([
    ['JSON that does not parse', '{"email": ', 'application/json'],
    ['a list where an object belongs', '[]', 'application/json'],
    ['a bare word', '"email"', 'application/json'],
    ['another media type', '{"email":"a@b.example","password":"x"}', 'text/plain'],
    ['a form', 'email=a%40b.example&password=x', 'application/x-www-form-urlencoded'],
    ['an unknown charset', '{}', 'application/json; charset=klingon'],
    ['no body', '', 'application/json'],
  ])('refuse %s', async (_what, body, mediaType) => {
    const answer = await post('/api/session').set('Content-Type', mediaType).send(body);
    expect([answer.status, (answer.body as Body).code]).toEqual([400, 'invalid-request']);
  });

  it('refuse unknown fields of body and query, and name them', async () => {
    const body = { email: 'a@b.example', password: 'x', admin: true };
    const inBody = await post('/api/session').send(body);
    expect([inBody.status, JSON.stringify(inBody.body)]).toEqual([
      400,
      expect.stringContaining('admin'),
    ]);
    const inQuery = await request(server.url).get('/api/session?verbose=1');
    expect((inQuery.body as Body).code).toBe('invalid-request');
  });

  it('refuse a body over the limit and say the limit', async () => {
    const answer = await post('/api/session').send({ email: 'x'.repeat(70_000), password: 'x' });
    expect([answer.status, answer.body as Body]).toMatchObject([
      413,
      { code: 'too-large', details: { limitBytes: 65_536 } },
    ]);
  });

  it('refuse a compressed body, which could hide any size', async () => {
    const answer = await post('/api/session')
      .set('Content-Type', 'application/json')
      .set('Content-Encoding', 'gzip')
      .send('{}');
    expect((answer.body as Body).code).toBe('invalid-request');
  });

  it('treat a malformed key in a path as the address of nothing', async () => {
    const browser = await signUp(server, 'Kay', 'kay@people.example');
    for (const path of ['/api/projects/42', '/api/projects/%E0%A4%A', '/api/reports/..%2F..']) {
      const answer = await request(server.url)
        .get(path)
        .set('Cookie', browser.cookie ?? '');
      expect([400, 404]).toContain(answer.status);
      expect(['not-found', 'invalid-request']).toContain((answer.body as Body).code);
    }
  });
});

describe('cross-site request forgery', () => {
  const body = { email: 'a@b.example', password: 'x' };

  it.each([
    ['no origin', {}],
    ['another origin', { Origin: 'https://evil.example' }],
    ['the null origin', { Origin: 'null' }],
    ['a host that begins like ours', { Origin: `${testOrigin}.evil.example` }],
    ['our host without TLS', { Origin: 'http://flightcase.example' }],
    ['our origin from another site', { Origin: testOrigin, 'Sec-Fetch-Site': 'cross-site' }],
    ['our origin from another host', { Origin: testOrigin, 'Sec-Fetch-Site': 'same-site' }],
  ])('refuses %s', async (_what, headers) => {
    for (const method of ['post', 'put', 'patch', 'delete'] as const) {
      const answer = await request(server.url)[method]('/api/session').set(headers).send(body);
      expect([answer.status, (answer.body as Body).code]).toEqual([403, 'wrong-origin']);
    }
  });

  it('lets our own pages through', async () => {
    const answer = await post('/api/session').set('Sec-Fetch-Site', 'same-origin').send(body);
    expect((answer.body as Body).code).toBe('sign-in-failed');
  });
});

describe('headers', () => {
  it('allow our own scripts and WebAssembly and nothing else', async () => {
    const { headers } = await request(server.url).get('/healthz');
    const policy = new Map(
      (headers['content-security-policy'] ?? '').split(';').map((directive) => {
        const [name = '', ...values] = directive.trim().split(' ');
        return [name, values.join(' ')] as const;
      }),
    );
    expect(Object.fromEntries(policy)).toMatchObject({
      'script-src': "'self' 'wasm-unsafe-eval'",
      'style-src': "'self' 'unsafe-inline'",
      'worker-src': "'self'",
      'img-src': "'self' blob: data:",
      'media-src': "'self' blob:",
      'connect-src': "'self'",
      'frame-ancestors': "'none'",
      'base-uri': "'none'",
      'form-action': "'self'",
    });
    expect(headers).toMatchObject({
      'x-content-type-options': 'nosniff',
      'referrer-policy': 'same-origin',
    });
    expect(headers['permissions-policy']).toContain('camera=()');
    expect(headers['x-powered-by']).toBeUndefined();
  });

  it('keep answers of the API out of every cache', async () => {
    const { headers } = await request(server.url).get('/api/session');
    expect(headers['cache-control']).toBe('no-store');
  });
});

describe('health', () => {
  it('tells that the process answers and that it is ready', async () => {
    expect((await request(server.url).get('/healthz')).body).toEqual({ status: 'ok' });
    expect((await request(server.url).get('/readyz')).body).toEqual({ status: 'ready' });
  });

  it('is not ready while shutting down', async () => {
    const own = await startTestServer({ isShuttingDown: () => true });
    const answer = await request(own.url).get('/readyz');
    await own.close();
    expect([answer.status, answer.headers['retry-after']]).toEqual([503, '5']);
  });
});

describe('the log', () => {
  it('names requests by pattern and holds nothing personal and no secret', async () => {
    server.logLines.length = 0;
    const browser = await signUp(server, 'Lea Private', 'lea@private.example');
    await browser.call(accounts.signIn, {
      body: { email: 'lea@private.example', password: 'wrong password, sorry' },
    });
    await openBrowser(server).call(accounts.confirmAccount, {
      body: { token: 'Zz'.repeat(21) + 'Z', password: testPassword },
    });
    await request(server.url).get(`/api/projects/${browser.privateProjectId}?x=Lea`);
    const log = server.logLines.join('');
    expect(log).toContain('"route":"/api/accounts/confirm"');
    expect(log).toContain('"route":"/api/projects/:projectId"');
    const private_ = [
      ...['lea@', 'private.example', 'Lea', 'password', testPassword, 'ZzZz'],
      ...[browser.cookie?.split('=')[1] ?? '', browser.privateProjectId, 'cookie', '10.0.'],
    ];
    for (const word of private_) expect(log).not.toContain(word);
  });

  it('describes a bug by its places, answers 500 with the id under which it is logged', async () => {
    const own = await startTestServer({
      mail: {
        queue: () => Promise.reject(new Error('no room for lea@private.example')),
      },
    });
    const answer = await openBrowser(own).call(accounts.register, {
      body: { name: 'Lea', email: 'lea@private.example' },
    });
    await own.close();
    expect([answer.status, answer.problem?.code]).toEqual([500, 'server-error']);
    const logged = own.logLines.find((line) => line.includes('"msg":"bug"')) ?? '';
    expect(logged).toContain(`"requestId":"${answer.problem?.requestId}"`);
    expect(logged).toContain('no room for [address]');
    expect(logged).toContain('service.ts');
    expect(own.logLines.join('')).not.toContain('lea@');
  });
});
