import { randomUUID } from 'node:crypto';
import compression from 'compression';
import express, { type Express, type Response } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import { accountRoutes } from './accounts/routes.ts';
import { createSessions } from './accounts/sessions.ts';
import type { Clock } from './clock.ts';
import type { Database } from './db/client.ts';
import { endpointRouter } from './http/bind.ts';
import { clientFiles } from './http/client-files.ts';
import { healthRoutes } from './http/health.ts';
import { createLimits } from './http/limits.ts';
import { refuseForeignOrigins } from './http/origin.ts';
import { answerErrors, unknownEndpoint } from './http/problem.ts';
import { securityHeaders } from './http/security-headers.ts';
import { invitationRoutes } from './invitations/routes.ts';
import type { MailQueue } from './mail/outbox.ts';
import { projectRoutes } from './projects/routes.ts';
import type { rejudge } from './reports/rejudge.ts';
import { reportRoutes } from './reports/routes.ts';
import { ruleRoutes } from './rules/routes.ts';
import type { Services } from './services.ts';
import { studioRoutes } from './studios/routes.ts';

export type AppParts = {
  db: Database;
  mail: MailQueue;
  clock: Clock;
  log: Logger;
  rejudge: typeof rejudge;
  /** Scheme, host and port of our own pages: the only ones that may change anything. */
  origin: string;
  /** The built client; null where something else serves it (Vite in development). */
  clientDir: string | null;
  /** How many proxies of our own stand in front and add to X-Forwarded-For. */
  trustedProxies: number;
  /** Turned true when the server begins to shut down. */
  isShuttingDown: () => boolean;
};

/** The whole server as a function of its parts: it neither listens nor reads the environment. */
export function createApp(parts: AppParts): Express {
  const { db, log, origin, clientDir } = parts;
  const { clock, mail } = parts;
  const sessions = createSessions(db, clock);
  const limits = createLimits(db);
  const services: Services = { db, clock, mail, sessions, limits, rejudge: parts.rejudge };

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', parts.trustedProxies);
  app.use(logRequests(log));
  app.use(...securityHeaders(origin));
  app.use(compression());
  app.use(healthRoutes(db, parts.isShuttingDown));
  app.use('/api', refuseForeignOrigins(origin));
  app.use(
    endpointRouter(
      [
        ...accountRoutes(services),
        ...studioRoutes(services),
        ...invitationRoutes(services),
        ...projectRoutes(services),
        ...ruleRoutes(services),
        ...reportRoutes(services),
      ],
      sessions,
    ),
  );
  app.use('/api', unknownEndpoint);
  if (clientDir !== null) app.use(clientFiles(clientDir));
  app.use(unknownEndpoint);
  app.use(answerErrors(log));
  return app;
}

/**
 * One line a request: which pattern, which status, how long. The id is made here and answered,
 * so that a person can quote it; one from outside is not believed.
 */
function logRequests(log: Logger) {
  return pinoHttp({
    logger: log,
    genReqId: (_request, response) => {
      const id = randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    serializers: {
      req: ({ id, method }: { id: string; method: string }) => ({ id, method }),
      res: ({ statusCode }: { statusCode: number }) => ({ status: statusCode }),
    },
    quietReqLogger: true,
    customProps: (_request, response) => ({
      route: (response as Response).locals.routePattern as string | undefined,
    }),
    // Errors are logged by their handler, in the words that are fit for a log.
    customErrorObject: (_request, _response, _error, value: Record<string, unknown>) =>
      Object.fromEntries(Object.entries(value).filter(([name]) => name !== 'err')),
    autoLogging: { ignore: ({ url }) => url === '/healthz' || url === '/readyz' },
  });
}
