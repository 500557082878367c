import type { z } from 'zod';

/** Methods that change nothing; every other one is refused without our own Origin. */
export const safeMethods = ['GET', 'HEAD', 'OPTIONS'] as const;

/** Bytes that travel as they are instead of JSON. */
export type ByteBody = {
  /** The exact Content-Type of the bytes, without parameters. */
  readonly mediaType: string;
  /** The most bytes that are accepted; a larger body is AppError `too-large`. */
  readonly limitBytes: number;
};

/**
 * One HTTP endpoint, written once: the server binds a handler to it, the client calls it.
 * `path` is an Express pattern (`/api/projects/:projectId`); every `:name` is a key of `params`.
 * `query` and `body` are strict objects: an unknown field is an error, not a silence.
 * `response` is what a 200 carries; `null` means 204 and no body.
 * An endpoint that carries bytes has `bodyBytes` instead of `body`, or `responseBytes` beside
 * `response: null`; it then answers 200 with the bytes.
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
  readonly bodyBytes?: ByteBody;
  readonly response: Response;
  readonly responseBytes?: ByteBody;
  /** The most bytes of JSON body; 64 KiB where nothing is said. */
  readonly bodyLimitBytes?: number;
};

/** A part the caller may leave out when every field of it may be left out. */
type Input<Schema, Key extends string> = Schema extends z.ZodType
  ? Record<never, never> extends z.input<Schema>
    ? { [K in Key]?: z.input<Schema> }
    : { [K in Key]: z.input<Schema> }
  : unknown;

type Parsed<Schema, Key extends string> = Schema extends z.ZodType
  ? { [K in Key]: z.output<Schema> }
  : unknown;

type Part<E, Key extends string> = E extends { readonly [K in Key]: infer Value }
  ? Value
  : undefined;

/** What a caller hands over: the parts the contract names, and no other. */
export type EndpointInput<E extends Endpoint> = Input<Part<E, 'params'>, 'params'> &
  Input<Part<E, 'query'>, 'query'> &
  Input<Part<E, 'body'>, 'body'> &
  (Part<E, 'bodyBytes'> extends ByteBody ? { bytes: Uint8Array<ArrayBuffer> } : unknown);

/** What a handler receives after parsing. */
export type EndpointRequest<E extends Endpoint> = Parsed<Part<E, 'params'>, 'params'> &
  Parsed<Part<E, 'query'>, 'query'> &
  Parsed<Part<E, 'body'>, 'body'> &
  (Part<E, 'bodyBytes'> extends ByteBody ? { bytes: Uint8Array } : unknown);

/** What a caller gets back and a handler returns: parsed JSON, bytes, or null. */
export type EndpointResponse<E extends Endpoint> =
  Part<E, 'responseBytes'> extends ByteBody
    ? Uint8Array
    : E['response'] extends z.ZodType
      ? z.output<E['response']>
      : null;

/** Keeps the literal types of a contract. */
export function defineEndpoint<const E extends Endpoint>(endpoint: E): E {
  return endpoint;
}
