import express from 'express';
import { pino } from 'pino';
import request from 'supertest';
import { expect, it, vi } from 'vitest';
import { z } from 'zod';
import { defineEndpoint } from '#shared/api/endpoint.ts';
import type { Sessions } from '../../server/accounts/sessions.ts';
import { bind, bindForVisitors, endpointRouter } from '../../server/http/bind.ts';
import { answerErrors } from '../../server/http/problem.ts';

const things = defineEndpoint({
  method: 'POST',
  path: '/api/things/:thingId',
  params: z.strictObject({ thingId: z.coerce.number().int() }),
  query: z.strictObject({ times: z.coerce.number().default(1) }),
  body: z.strictObject({ name: z.string().trim() }),
  response: z.strictObject({ name: z.string() }),
});
const bytes = defineEndpoint({
  method: 'PUT',
  path: '/api/bytes',
  bodyBytes: { mediaType: 'application/gzip', limitBytes: 4 },
  response: null,
});

/** Knows one cookie. */
const sessions = {
  read: (header: string) =>
    Promise.resolve(
      header === 'in'
        ? { person: { userId: '1', name: 'A', email: 'a' }, sessionId: 's', renewedCookie: null }
        : null,
    ),
} as Sessions;

function appOf(...bound: Parameters<typeof endpointRouter>[0]) {
  const app = express();
  app.use(endpointRouter(bound, sessions), answerErrors(pino({ level: 'silent' })));
  return app;
}

it('hands over parsed parts, defaults filled in', async () => {
  const handler = vi.fn(() => Promise.resolve({ name: 'x' }));
  await request(appOf(bindForVisitors(things, handler)))
    .post('/api/things/7')
    .send({ name: ' a ' });
  expect(handler).toHaveBeenCalledWith(
    { params: { thingId: 7 }, query: { times: 1 }, body: { name: 'a' } },
    expect.objectContaining({ person: null }),
  );
});

it('lets nothing out that the contract does not name', async () => {
  const answer = { name: 'x', passwordHash: 'secret' };
  const app = appOf(bindForVisitors(things, () => Promise.resolve(answer)));
  const { status, text } = await request(app).post('/api/things/7').send({ name: 'a' });
  expect([status, text.includes('secret')]).toEqual([500, false]);
});

it('turns a visitor away before the body is looked at', async () => {
  const app = appOf(bind(things, () => Promise.resolve({ name: 'x' })));
  const post = (cookie: string) =>
    request(app)
      .post('/api/things/7')
      .set('Cookie', cookie)
      .set('Content-Type', 'application/json')
      .send('{broken');
  expect((await post('')).status).toBe(401);
  expect((await post('in')).status).toBe(400);
});

it('takes bytes of the named type up to the limit', async () => {
  const handler = vi.fn(() => Promise.resolve(null));
  const app = appOf(bind(bytes, handler));
  const put = (type: string, body: Buffer) =>
    request(app).put('/api/bytes').set('Cookie', 'in').set('Content-Type', type).send(body);
  expect((await put('application/gzip', Buffer.from('1234'))).status).toBe(204);
  expect((await put('application/gzip', Buffer.from('12345'))).status).toBe(413);
  expect((await put('application/json', Buffer.from('1234'))).status).toBe(400);
  expect(handler).toHaveBeenCalledTimes(1);
});
