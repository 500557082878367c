import type { Endpoint, EndpointInput, EndpointResponse } from '#shared/api/endpoint.ts';
import { problemMediaType, problemSchema } from '#shared/api/problem.ts';
import { AppError } from '#shared/errors.ts';

/** The parts an input may have, whatever the contract. */
type AnyInput = {
  params?: Record<string, unknown>;
  query?: Record<string, unknown>;
  body?: unknown;
  bytes?: Uint8Array<ArrayBuffer>;
};

/** The contract's path with its parameters filled in and its query behind it. */
export function addressOf(endpoint: Endpoint, input: AnyInput): string {
  const path = endpoint.path.replace(/:([A-Za-z]+)/g, (_, name: string) => {
    const value = input.params?.[name];
    if (typeof value !== 'string' && typeof value !== 'number')
      throw new Error(`${endpoint.path} needs the parameter ${name}`);
    return encodeURIComponent(value);
  });
  const query = new URLSearchParams();
  for (const [key, value] of Object.entries(input.query ?? {}))
    if (typeof value === 'string' || typeof value === 'number') query.set(key, String(value));
  return query.size === 0 ? path : `${path}?${query.toString()}`;
}

/** The AppError an answer stands for; an answer that is no problem detail gets the nearest code. */
async function errorOf(response: Response): Promise<AppError> {
  const isProblem = response.headers.get('content-type')?.startsWith(problemMediaType) === true;
  const parsed = isProblem ? problemSchema.safeParse(await response.json()) : undefined;
  if (parsed?.success === true) {
    const { code, details, requestId } = parsed.data;
    return new AppError(code, { ...details, requestId });
  }
  const gatewayFailed = [502, 503, 504].includes(response.status);
  return new AppError(gatewayFailed ? 'unavailable' : 'server-error');
}

async function send(endpoint: Endpoint, input: AnyInput, signal?: AbortSignal): Promise<Response> {
  const headers: Record<string, string> = {};
  let body: BodyInit | null = null;
  if (endpoint.bodyBytes !== undefined && input.bytes !== undefined) {
    headers['content-type'] = endpoint.bodyBytes.mediaType;
    body = input.bytes;
  } else if (endpoint.body !== undefined) {
    headers['content-type'] = 'application/json';
    body = JSON.stringify(input.body ?? {});
  }
  try {
    return await fetch(addressOf(endpoint, input), {
      method: endpoint.method,
      headers,
      body,
      signal: signal ?? null,
      credentials: 'same-origin',
    });
  } catch (error) {
    if (signal?.aborted === true) throw error;
    throw new AppError('offline');
  }
}

/** Sends a request and parses the answer; what it is follows from the contract alone. */
async function exchange(
  endpoint: Endpoint,
  input: AnyInput,
  signal?: AbortSignal,
): Promise<unknown> {
  const response = await send(endpoint, input, signal);
  if (!response.ok) throw await errorOf(response);
  if (endpoint.responseBytes !== undefined) return new Uint8Array(await response.arrayBuffer());
  if (endpoint.response === null) return null;
  return endpoint.response.parse(await response.json());
}

/**
 * Calls an endpoint and parses its answer by the contract. Throws AppError: what the server
 * said as a problem detail (its request id in `details.requestId`), or `offline`. An answer
 * that breaks the contract is a bug and throws zod's own error.
 */
export async function call<const E extends Endpoint>(
  endpoint: E,
  input: EndpointInput<E>,
  signal?: AbortSignal,
): Promise<EndpointResponse<E>> {
  return (await exchange(endpoint, input as AnyInput, signal)) as EndpointResponse<E>;
}
