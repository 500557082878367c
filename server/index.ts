import { once } from 'node:events';
import { createServer, type Server } from 'node:http';
import { createApp } from './app.ts';
import { systemClock } from './clock.ts';
import { openDatabase } from './db/client.ts';
import { isConnectionLost } from './db/failures.ts';
import { EnvironmentProblem, readEnv, type Env } from './env.ts';
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
  // A browser keeps its connection open after the last answer; without this we wait for it.
  const sweep = setInterval(() => server.closeIdleConnections(), 50);
  const timer = setTimeout(() => server.closeAllConnections(), shutdownLimitMs);
  await closed;
  clearInterval(sweep);
  clearTimeout(timer);
}

/** One sentence for what a person can put right; null for a bug. */
function explainStart(error: unknown): string | null {
  if (error instanceof EnvironmentProblem) return error.message;
  if (isConnectionLost(error)) return 'PostgreSQL does not answer where DATABASE_URL points.';
  const code = (error as { code?: unknown } | null)?.code;
  if (code === 'EADDRINUSE') return 'Another program uses the port; choose another with PORT.';
  if (code === 'EACCES') return 'This user may not use the port; choose one above 1023 with PORT.';
  if (code === 'EADDRNOTAVAIL') return 'HOST is no address of this machine.';
  if (code === '3D000') return 'PostgreSQL has no database of the name in DATABASE_URL.';
  if (typeof code === 'string' && code.startsWith('28')) {
    return 'PostgreSQL does not accept the user and password in DATABASE_URL.';
  }
  return null;
}

try {
  await serve(readEnv(process.env));
} catch (error) {
  const sentence = explainStart(error);
  console.error(sentence ? `The server cannot start. ${sentence}` : error);
  // Half of it may be running already.
  process.exit(1);
}
