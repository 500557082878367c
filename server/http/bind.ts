import express, { Router, type Request, type RequestHandler, type Response } from 'express';
import type { z } from 'zod';
import type { Endpoint, EndpointRequest, EndpointResponse } from '#shared/api/endpoint.ts';
import { AppError } from '#shared/errors.ts';
import type { Person, Sessions } from '../accounts/sessions.ts';
import { withDeadline } from './deadline.ts';
import { createOutageGate } from './outage-gate.ts';

/** JSON bodies of endpoints that say nothing else. */
const defaultBodyLimitBytes = 64 * 1024;

/** No request keeps anybody waiting longer than this. */
const requestDeadlineMs = 15_000;

/** Who asks, and what a handler may do to the answer beside returning it. */
export type Caller<Who extends Person | null> = {
  /** Null for a visitor. */
  readonly person: Who;
  /** The network address the request came from, for counting tries. */
  readonly networkAddress: string;
  /**
   * Signs this browser in as the person, under a new cookie; the session it came with ends.
   * Called whenever what somebody may do changes, so that a cookie known from before is worth
   * nothing.
   */
  startSession(userId: string): Promise<void>;
  /** Signs this browser out. */
  endSession(): Promise<void>;
};

/** Somebody who may be a visitor. */
export type Anyone = Caller<Person | null>;
export type SignedIn = Caller<Person>;

type Handler<E extends Endpoint, Who extends Anyone> = (
  input: EndpointRequest<E>,
  caller: Who,
) => Promise<EndpointResponse<E>>;

/** A contract with its handler, ready to be mounted. */
export type BoundEndpoint = {
  readonly endpoint: Endpoint;
  readonly forVisitors: boolean;
  readonly handler: (input: never, caller: never) => Promise<unknown>;
};

/**
 * Ties a handler to a contract: it gets parsed input and must return what the contract says.
 * A visitor is refused with `sign-in-required` before a byte of the body is read.
 */
export function bind<E extends Endpoint>(
  endpoint: E,
  handler: Handler<E, SignedIn>,
): BoundEndpoint {
  return { endpoint, forVisitors: false, handler };
}

/** The same for the few endpoints that visitors may call too. */
export function bindForVisitors<E extends Endpoint>(
  endpoint: E,
  handler: Handler<E, Anyone>,
): BoundEndpoint {
  return { endpoint, forVisitors: true, handler };
}

/** Answers the bound endpoints. Expects the origin check and request ids before it. */
export function endpointRouter(bound: readonly BoundEndpoint[], sessions: Sessions): Router {
  const router = Router({ caseSensitive: true, strict: true });
  const gate = createOutageGate();
  const inTime = <Result>(work: () => Promise<Result>) =>
    gate.pass(() => withDeadline(requestDeadlineMs, work()));
  for (const { endpoint, forVisitors, handler } of bound) {
    const method = endpoint.method.toLowerCase() as Lowercase<Endpoint['method']>;
    router[method](
      endpoint.path,
      async (request, response, next) => {
        // The log names a request by its pattern, never by its URL.
        response.locals.routePattern = endpoint.path;
        response.setHeader('Cache-Control', 'no-store');
        const caller = await inTime(() => readCaller(sessions, request, response));
        if (!caller.person && !forVisitors) throw new AppError('sign-in-required');
        response.locals.caller = caller;
        next();
      },
      ...bodyReaders(endpoint),
      async (request, response) => {
        const input = parseInput(endpoint, request) as never;
        const caller = response.locals.caller as never;
        send(endpoint, await inTime(() => handler(input, caller)), response);
      },
    );
  }
  return router;
}

function bodyReaders(endpoint: Endpoint): RequestHandler[] {
  if (endpoint.bodyBytes) {
    const { mediaType, limitBytes } = endpoint.bodyBytes;
    return [express.raw({ type: mediaType, limit: limitBytes, inflate: false })];
  }
  if (endpoint.body) {
    return [
      express.json({ limit: endpoint.bodyLimitBytes ?? defaultBodyLimitBytes, inflate: false }),
    ];
  }
  return [];
}

function parseInput(endpoint: Endpoint, request: Request): Record<string, unknown> {
  const input: Record<string, unknown> = {};
  if (endpoint.params) {
    const params = endpoint.params.safeParse({ ...request.params });
    // A key that cannot be one is the address of nothing.
    if (!params.success) throw new AppError('not-found');
    input.params = params.data;
  }
  if (endpoint.query) {
    input.query = parsePart('query', endpoint.query, { ...request.query });
  } else if (Object.keys(request.query).length > 0) {
    throw new AppError('invalid-request', { issues: [{ path: 'query', message: 'unknown' }] });
  }
  if (endpoint.body) input.body = parsePart('body', endpoint.body, request.body);
  if (endpoint.bodyBytes) {
    if (!(request.body instanceof Uint8Array)) {
      throw new AppError('invalid-request', {
        issues: [{ path: 'body', message: `expected ${endpoint.bodyBytes.mediaType}` }],
      });
    }
    input.bytes = request.body;
  }
  return input;
}

function parsePart(part: string, schema: z.ZodType, value: unknown): unknown {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw new AppError('invalid-request', {
    issues: result.error.issues.slice(0, 20).map((issue) => ({
      path: [part, ...issue.path].join('.'),
      message: issue.message,
    })),
  });
}

async function readCaller(
  sessions: Sessions,
  request: Request,
  response: Response,
): Promise<Anyone> {
  const signedIn = await sessions.read(request.headers.cookie ?? '');
  if (signedIn?.renewedCookie) response.append('Set-Cookie', signedIn.renewedCookie);
  let sessionId = signedIn?.sessionId ?? null;
  const endSession = async () => {
    if (sessionId) await sessions.end(sessionId);
    sessionId = null;
    response.setHeader('Set-Cookie', sessions.blankCookie());
  };
  return {
    person: signedIn?.person ?? null,
    networkAddress: request.ip ?? 'unknown',
    endSession,
    async startSession(userId) {
      await endSession();
      const started = await sessions.start(userId);
      sessionId = started.sessionId;
      response.setHeader('Set-Cookie', started.cookie);
    },
  };
}

function send(endpoint: Endpoint, answer: unknown, response: Response): void {
  if (endpoint.responseBytes) {
    response.type(endpoint.responseBytes.mediaType).send(Buffer.from(answer as Uint8Array));
  } else if (endpoint.response) {
    // Parsing the answer keeps what the contract does not name from leaving the server.
    response.json(endpoint.response.parse(answer));
  } else {
    response.status(204).end();
  }
}
