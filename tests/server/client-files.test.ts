import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { startTestServer, type TestServer } from '../support/server-app.ts';

let server: TestServer;
let clientDir: string;
beforeAll(async () => {
  clientDir = await mkdtemp(path.join(tmpdir(), 'flightcase-client-'));
  await mkdir(path.join(clientDir, 'assets'));
  await writeFile(path.join(clientDir, 'index.html'), '<!doctype html><title>The page</title>');
  await writeFile(path.join(clientDir, 'download-worker.js'), 'self.oninstall = null;');
  await writeFile(path.join(clientDir, 'assets', 'main-4f2a.js'), `"${'x'.repeat(5_000)}"`);
  await writeFile(path.join(clientDir, '.secret'), 'not for anybody');
  server = await startTestServer({ clientDir });
});
afterAll(async () => {
  await server.close();
  await rm(clientDir, { recursive: true });
});

it.each(['/', '/sign-in', '/studios/harbour-lane-mixing', '/studios/a/b/c', '/reports/1?x=1'])(
  'answers the page address %s with the client, asked for anew each time',
  async (url) => {
    const answer = await request(server.url).get(url);
    expect([answer.status, answer.text]).toEqual([200, expect.stringContaining('The page')]);
    expect(answer.headers['cache-control']).toBe('no-cache');
    expect(answer.headers['content-security-policy']).toContain("script-src 'self'");
  },
);

it('lets browsers keep hashed files for good, compressed', async () => {
  const answer = await request(server.url)
    .get('/assets/main-4f2a.js')
    .set('Accept-Encoding', 'gzip');
  expect(answer.headers).toMatchObject({
    'cache-control': 'public, max-age=31536000, immutable',
    'content-encoding': 'gzip',
    'content-security-policy': expect.stringContaining('wasm-unsafe-eval') as string,
  });
});

it('has the service worker script asked for anew each time, under the same policy', async () => {
  const { headers } = await request(server.url).get('/download-worker.js');
  expect(headers['cache-control']).toBe('no-cache');
  expect(headers['content-security-policy']).toContain("worker-src 'self'");
});

it.each([
  '/assets/gone-1234.js',
  '/gone.js',
  '/api/gone',
  '/api',
  '/.secret',
  '/assets/../.secret',
  '/..%2f..%2fetc%2fpasswd.txt',
])('answers %s with a problem, not with the page', async (url) => {
  const answer = await request(server.url).get(url);
  expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
  expect([400, 404]).toContain(answer.status);
  expect(answer.text).not.toContain('not for anybody');
});

it('does not take another method for a page', async () => {
  const answer = await request(server.url).post('/sign-in');
  expect(answer.status).toBe(404);
});
