import { once } from 'node:events';
import { createServer, type Server } from 'node:http';
import { createApp } from './app.ts';
import { systemClock } from './clock.ts';
import { openDatabase } from './db/client.ts';
import { readEnv, type Env } from './env.ts';
import { jobQueue } from './jobs/queue.ts';
import { createTasks, startJobWorker } from './jobs/worker.ts';
import { createLog } from './log.ts';
import { createMailQueue } from './mail/outbox.ts';
import { createMailTransport } from './mail/transport.ts';
import { rejudge } from './reports/rejudge.ts';

/** Requests at work when the server is told to stop get this long to end. */
const shutdownLimitMs = 10_000;

async function serve(env: Env): Promise<void> {
  const log = createLog(env.LOG_LEVEL);
  const { db, close: closeDatabase } = openDatabase(env.DATABASE_URL);
  const transport = createMailTransport(env.SMTP_URL, env.MAIL_FROM);
  const clock = systemClock;
  let shuttingDown = false;
  const app = createApp({
    ...{ db, clock, log, rejudge },
    mail: createMailQueue(jobQueue, clock),
    origin: env.APP_ORIGIN,
    clientDir: env.CLIENT_DIR === '' ? null : env.CLIENT_DIR,
    trustedProxies: env.TRUSTED_PROXIES,
    isShuttingDown: () => shuttingDown,
  });
  const tasks = createTasks({ db, clock, transport, log, origin: env.APP_ORIGIN });
  const worker = await startJobWorker(env.DATABASE_URL, tasks, log);
  const server = createServer(app);
  server.listen(env.PORT, env.HOST);
  await once(server, 'listening');
  log.info({ address: server.address() }, 'listening');

  const stop = async (signal: string) => {
    if (shuttingDown) return;
    shuttingDown = true;
    log.info({ signal }, 'stopping');
    await Promise.all([closeServer(server), worker.stop()]);
    transport.close();
    await closeDatabase();
    log.info('stopped');
  };
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.on(signal, () => {
      stop(signal).catch((error: unknown) => {
        log.fatal({ err: error }, 'could not stop in order');
        process.exit(1);
      });
    });
  }
}

/** Takes no new connections, waits for requests at work, and cuts what is left at the limit. */
async function closeServer(server: Server): Promise<void> {
  const closed = once(server, 'close');
  server.close();
  server.closeIdleConnections();
  const timer = setTimeout(() => server.closeAllConnections(), shutdownLimitMs);
  await closed;
  clearTimeout(timer);
}

try {
  await serve(readEnv(process.env));
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
}
