import { createServer, connect, type Server, type Socket } from 'node:net';
import { once } from 'node:events';
import path from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as accounts from '#shared/api/accounts.ts';
import { migrateDatabase } from '../../server/db/migrate.ts';
import { ensureDatabase } from '../../server/dev/databases.mjs';
import { restartCluster, type Cluster } from '../../server/dev/postgres.mjs';
import { createTasks, startJobWorker } from '../../server/jobs/worker.ts';
import { createLog } from '../../server/log.ts';
import { createMailTransport } from '../../server/mail/transport.ts';
import { startTestServer, testOrigin, type TestServer } from '../support/server-app.ts';
import { openBrowser, signUp } from '../support/server-browser.ts';
import { startThrowawayCluster } from '../support/throwaway-cluster.ts';

let cluster: Cluster;
let stopCluster: () => Promise<void>;
let databaseUrl: string;
beforeAll(async () => {
  ({ cluster, stop: stopCluster } = await startThrowawayCluster());
  databaseUrl = await ensureDatabase(cluster, 'outage');
  await migrateDatabase(databaseUrl, path.resolve('migrations'));
}, 60_000);
afterAll(() => stopCluster());

/** Milliseconds until the promise is settled, and with what. */
async function timed<Result>(work: Promise<Result>): Promise<{ ms: number; result: Result }> {
  const start = performance.now();
  const result = await work;
  return { ms: performance.now() - start, result };
}

async function untilReady(server: TestServer): Promise<void> {
  for (let turn = 0; turn < 100; turn += 1) {
    if ((await request(server.url).get('/readyz')).status === 200) return;
    await delay(100);
  }
  throw new Error('not ready again within ten seconds');
}

describe('PostgreSQL stops and starts again', () => {
  it('answers 503 soon, and recovers by itself with everybody still signed in', async () => {
    const server = await startTestServer({ databaseUrl });
    try {
      const browser = await signUp(server, 'Uma', 'uma@people.example');
      await cluster.program.stop();
      const answers = await Promise.all(
        Array.from({ length: 30 }, () => timed(browser.call(accounts.getSession, {}))),
      );
      for (const { ms, result } of answers) {
        expect([result.status, result.problem?.code]).toEqual([503, 'unavailable']);
        expect(result.headers['retry-after']).toBe('5');
        expect(ms).toBeLessThan(5_000);
      }
      const { ms, result } = await timed(browser.call(accounts.getSession, {}));
      expect([result.status, ms < 5_000]).toEqual([503, true]);
      expect((await request(server.url).get('/readyz')).status).toBe(503);
      expect((await request(server.url).get('/healthz')).status).toBe(200);

      await restartCluster(cluster);
      await untilReady(server);
      await expect
        .poll(async () => (await browser.call(accounts.getSession, {})).body?.user?.name, {
          timeout: 2_000,
        })
        .toBe('Uma');
    } finally {
      await server.close();
    }
  }, 60_000);

  it('goes on sending mail afterwards', async () => {
    const server = await startTestServer({ databaseUrl });
    const transport = createMailTransport(`smtp://127.0.0.1:${server.catcher.port}`, 'a@b.example');
    const log = createLog('silent');
    const sender = { db: server.db, clock: server.clock, transport, log, origin: testOrigin };
    const worker = await startJobWorker(databaseUrl, createTasks(sender), log);
    try {
      await cluster.program.stop();
      await delay(1_500);
      await restartCluster(cluster);
      await untilReady(server);
      const email = 'vic@people.example';
      const { status } = await openBrowser(server).call(accounts.register, {
        body: { name: 'Vic', email },
      });
      expect(status).toBe(204);
      await expect
        .poll(() => server.catcher.mails().filter(({ to }) => to.includes(email)).length, {
          timeout: 20_000,
        })
        .toBe(1);
    } finally {
      await worker.stop();
      transport.close();
      await server.close();
    }
  }, 60_000);
});

describe('PostgreSQL says nothing', () => {
  it('gives up connecting after some seconds', async () => {
    const silent = createServer(() => undefined);
    silent.listen(0, '127.0.0.1');
    await once(silent, 'listening');
    const { port } = silent.address() as { port: number };
    const server = await startTestServer({ databaseUrl: `postgres://x:y@127.0.0.1:${port}/z` });
    try {
      const body = { email: 'a@b.example', password: 'x' };
      const { ms, result } = await timed(openBrowser(server).call(accounts.signIn, { body }));
      expect([result.status, ms < 6_000]).toEqual([503, true]);
    } finally {
      await server.close();
      silent.close();
    }
  }, 30_000);

  it('gives up a request whose open connection fell silent', async () => {
    const gate = await openGate(cluster.port);
    const through = new URL(databaseUrl);
    through.port = String(gate.port);
    const server = await startTestServer({ databaseUrl: through.href });
    try {
      const browser = await signUp(server, 'Wes', 'wes@people.example');
      gate.shut();
      const [ready, session] = await Promise.all([
        timed(request(server.url).get('/readyz').then()),
        timed(browser.call(accounts.getSession, {})),
      ]);
      expect([ready.result.status, ready.ms < 3_000]).toEqual([503, true]);
      expect([session.result.status, session.ms < 17_000]).toEqual([503, true]);
    } finally {
      gate.close();
      await server.close();
    }
  }, 60_000);
});

/** Passes bytes between a client and PostgreSQL until it is shut; then both wait for ever. */
async function openGate(port: number) {
  const sockets: Socket[] = [];
  const gate: Server = createServer((client) => {
    const upstream = connect(port, '127.0.0.1');
    client.pipe(upstream);
    upstream.pipe(client);
    for (const socket of [client, upstream]) socket.on('error', () => undefined);
    sockets.push(client, upstream);
  });
  gate.listen(0, '127.0.0.1');
  await once(gate, 'listening');
  const { port: gatePort } = gate.address() as { port: number };
  return {
    port: gatePort,
    shut() {
      for (const socket of sockets) socket.unpipe().pause();
    },
    close() {
      gate.close();
      for (const socket of sockets) socket.destroy();
    },
  };
}
