import { z } from 'zod';
import { defineEndpoint } from '#shared/api/endpoint.ts';
import { AppError } from '#shared/errors.ts';
import { describe, expect, it, vi } from 'vitest';
import { addressOf, call } from '../../../src/app/api-client.ts';
import { answerApi, problem } from '../../support/answer-api.ts';

const getThing = defineEndpoint({
  method: 'GET',
  path: '/api/things/:thingId',
  params: z.strictObject({ thingId: z.string() }),
  query: z.strictObject({ limit: z.number().optional(), cursor: z.string().optional() }),
  response: z.strictObject({ title: z.string() }),
});

const removeThing = defineEndpoint({
  method: 'DELETE',
  path: '/api/things/:thingId',
  params: z.strictObject({ thingId: z.string() }),
  response: null,
});

const getBytes = defineEndpoint({
  method: 'GET',
  path: '/api/bytes',
  response: null,
  responseBytes: { mediaType: 'application/gzip', limitBytes: 10 },
});

const thing = { params: { thingId: 'one' } };

async function errorFrom(promise: Promise<unknown>): Promise<AppError> {
  const error = await promise.catch((thrown: unknown) => thrown);
  expect(error).toBeInstanceOf(AppError);
  return error as AppError;
}

describe('addressOf', () => {
  it('fills in and escapes parameters, and leaves out what is not given', () => {
    expect(addressOf(getThing, { params: { thingId: 'a/b ?' }, query: { limit: 5 } })).toBe(
      '/api/things/a%2Fb%20%3F?limit=5',
    );
    expect(addressOf(getThing, { params: { thingId: 'a' }, query: { cursor: undefined } })).toBe(
      '/api/things/a',
    );
  });

  it('is a bug when a parameter is missing', () => {
    expect(() => addressOf(getThing, {})).toThrow('thingId');
  });
});

describe('call', () => {
  it('parses the answer by the contract', async () => {
    answerApi({ 'GET /api/things/one': { body: { title: 'Paper Ferry' } } });
    await expect(call(getThing, thing)).resolves.toEqual({ title: 'Paper Ferry' });
  });

  it('throws where the answer breaks the contract, instead of passing it on', async () => {
    answerApi({ 'GET /api/things/one': { body: { title: 7 } } });
    await expect(call(getThing, thing)).rejects.toBeInstanceOf(z.ZodError);
  });

  it('answers null where the contract has no body', async () => {
    answerApi({ 'DELETE /api/things/one': {} });
    await expect(call(removeThing, thing)).resolves.toBeNull();
  });

  it('hands over bytes as they came', async () => {
    vi.stubGlobal('fetch', () => Promise.resolve(new Response(new Uint8Array([31, 139, 8]))));
    await expect(call(getBytes, {})).resolves.toEqual(new Uint8Array([31, 139, 8]));
  });

  it('turns a problem detail into an AppError with its request id', async () => {
    answerApi({ 'GET /api/things/one': problem(429, 'too-many-tries', { retryAfterSeconds: 40 }) });
    const error = await errorFrom(call(getThing, thing));
    expect(error.code).toBe('too-many-tries');
    expect(error.details).toEqual({ retryAfterSeconds: 40, requestId: 'request-7' });
  });

  it.each([
    [502, 'unavailable'],
    [503, 'unavailable'],
    [500, 'server-error'],
    [404, 'server-error'],
  ])('knows what a bare %i of a proxy means', async (status, code) => {
    answerApi({
      'GET /api/things/one': { status, body: 'x', headers: { 'content-type': 'text/html' } },
    });
    expect((await errorFrom(call(getThing, thing))).code).toBe(code);
  });

  it('is offline when nothing answers', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')));
    expect((await errorFrom(call(getThing, thing))).code).toBe('offline');
  });

  it('lets a wanted abort pass as what it is', async () => {
    const controller = new AbortController();
    vi.stubGlobal('fetch', () => {
      controller.abort();
      return Promise.reject(new DOMException('aborted', 'AbortError'));
    });
    await expect(call(getThing, thing, controller.signal)).rejects.toMatchObject({
      name: 'AbortError',
    });
  });
});
