import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import { problemMediaType, type Problem } from '#shared/api/problem.ts';
import { AppError, appErrorStatus } from '#shared/errors.ts';
import { isDatabaseAway } from '../db/failures.ts';

/** Seconds after which trying again is right while a service is away. */
const retryAfterSeconds = 5;

/** Any `/api/` address without a contract. */
export const unknownEndpoint: RequestHandler = () => {
  throw new AppError('not-found');
};

/** Turns whatever was thrown into an error answer; only bugs are logged as errors. */
export function answerErrors(log: Logger): ErrorRequestHandler {
  return (error: unknown, _request, response, next) => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const known = toAppError(error);
    if (known.code === 'server-error') {
      log.error({ requestId: response.get('X-Request-Id'), err: error }, 'bug');
    } else if (known.code === 'unavailable') {
      log.warn({ requestId: response.get('X-Request-Id'), err: error }, 'service away');
    }
    sendProblem(response, known, response.get('X-Request-Id') ?? '');
  };
}

function sendProblem(response: Response, error: AppError, requestId: string): void {
  const status = appErrorStatus[error.code];
  const problem: Problem = {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    code: error.code,
    details: error.details,
    requestId,
  };
  if (error.code === 'unavailable') response.setHeader('Retry-After', retryAfterSeconds);
  if (error.code === 'too-many-tries') {
    response.setHeader('Retry-After', String(error.details.retryAfterSeconds));
  }
  response.status(status).type(problemMediaType).send(JSON.stringify(problem));
}

/** The code for what Express, its body readers, the database or our own code threw. */
function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (isDatabaseAway(error)) return new AppError('unavailable');
  const { type, status, limit } = (error ?? {}) as Record<string, unknown>;
  if (type === 'entity.too.large') return new AppError('too-large', { limitBytes: limit });
  if (status === 404) return new AppError('not-found');
  if (typeof status === 'number' && status >= 400 && status < 500) {
    // Malformed JSON, an unknown charset or encoding, an address that cannot be decoded.
    return new AppError('invalid-request', {
      issues: [{ path: '', message: typeof type === 'string' ? type : 'malformed' }],
    });
  }
  return new AppError('server-error');
}
