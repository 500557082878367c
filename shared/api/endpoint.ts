import type { z } from 'zod';

/** Methods that change nothing; every other one is refused without our own Origin. */
export const safeMethods = ['GET', 'HEAD', 'OPTIONS'] as const;

/**
 * One HTTP endpoint, written once: the server binds a handler to it, the client calls it.
 * `path` is an Express pattern (`/api/projects/:projectId`); every `:name` is a key of `params`.
 * `query` and `body` are strict objects: an unknown field is an error, not a silence.
 * `response` is what a 200 carries; `null` means 204 and no body.
 */
export type Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Response extends z.ZodType | null = z.ZodType | null,
> = {
  readonly method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  readonly path: `/api/${string}`;
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  readonly response: Response;
};

type Input<Schema, Key extends string> = Schema extends z.ZodType
  ? { [K in Key]: z.input<Schema> }
  : unknown;

type Parsed<Schema, Key extends string> = Schema extends z.ZodType
  ? { [K in Key]: z.output<Schema> }
  : unknown;

/** What a caller hands over: the parts the contract names, and no other. */
export type EndpointInput<E extends Endpoint> = Input<E['params'], 'params'> &
  Input<E['query'], 'query'> &
  Input<E['body'], 'body'>;

/** What a handler receives after parsing. */
export type EndpointRequest<E extends Endpoint> = Parsed<E['params'], 'params'> &
  Parsed<E['query'], 'query'> &
  Parsed<E['body'], 'body'>;

export type EndpointResponse<E extends Endpoint> = E['response'] extends z.ZodType
  ? z.output<E['response']>
  : null;

/** Keeps the literal types of a contract. */
export function defineEndpoint<const E extends Endpoint>(endpoint: E): E {
  return endpoint;
}
