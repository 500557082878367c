import { createServer, type Server } from 'node:http';
import { once } from 'node:events';
import { Writable } from 'node:stream';
import { runOnce } from 'graphile-worker';
import { createApp, type AppParts } from '../../server/app.ts';
import { openDatabase, type Database } from '../../server/db/client.ts';
import { startSmtpCatcher, type SmtpCatcher } from '../../server/fakes/smtp-catcher.ts';
import { jobQueue } from '../../server/jobs/queue.ts';
import { createTasks, workerLogger } from '../../server/jobs/worker.ts';
import { createLog } from '../../server/log.ts';
import { createMailQueue } from '../../server/mail/outbox.ts';
import { createMailTransport } from '../../server/mail/transport.ts';
import { rejudge } from '../../server/reports/rejudge.ts';
import { createTestDatabase } from './test-database.ts';

/** A clock that stands still until it is moved. */
export type TestClock = { now(): Date; move(ms: number): void };

export function createTestClock(): TestClock {
  let offsetMs = 0;
  const start = Date.now();
  return {
    now: () => new Date(start + offsetMs),
    move(ms) {
      offsetMs += ms;
    },
  };
}

export const testOrigin = 'https://flightcase.example';

export type TestServer = {
  /** http://127.0.0.1:port */
  url: string;
  databaseUrl: string;
  db: Database;
  clock: TestClock;
  catcher: SmtpCatcher;
  /** Every line the server logged, as text. */
  logLines: string[];
  /** Works on queued jobs until none is due. */
  runJobs(): Promise<void>;
  close(): Promise<void>;
};

export type TestServerOptions = Partial<Omit<AppParts, 'db'>> & {
  /** Instead of a database of its own. */
  databaseUrl?: string;
  clock?: TestClock;
};

/** The real server on a free port with a real database, a movable clock and a mail catcher. */
export async function startTestServer(options: TestServerOptions = {}): Promise<TestServer> {
  const database = options.databaseUrl ? null : await createTestDatabase();
  const databaseUrl = options.databaseUrl ?? database?.url ?? '';
  const { db, close: closeDatabase } = openDatabase(databaseUrl, 4);
  const catcher = await startSmtpCatcher(0);
  const transport = createMailTransport(
    `smtp://127.0.0.1:${catcher.port}`,
    'Flightcase <hello@flightcase.example>',
  );
  const clock = options.clock ?? createTestClock();
  const logLines: string[] = [];
  const log = createLog(
    'trace',
    new Writable({
      write(chunk: Buffer, _encoding, done) {
        logLines.push(chunk.toString());
        done();
      },
    }),
  );
  const app = createApp({
    ...{ db, clock, log, rejudge },
    mail: createMailQueue(jobQueue, clock),
    origin: testOrigin,
    clientDir: null,
    trustedProxies: 1,
    isShuttingDown: () => false,
    ...options,
  });
  const server: Server = createServer(app);
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  const port = typeof address === 'object' && address ? address.port : 0;
  const tasks = createTasks({ db, clock, transport, log, origin: testOrigin });
  return {
    url: `http://127.0.0.1:${port}`,
    ...{ databaseUrl, db, clock, catcher, logLines },
    runJobs: () =>
      runOnce({
        connectionString: databaseUrl,
        taskList: tasks,
        logger: workerLogger(log),
        noHandleSignals: true,
      }),
    async close() {
      server.close();
      server.closeAllConnections();
      transport.close();
      await catcher.close();
      await closeDatabase();
      await database?.drop();
    },
  };
}
