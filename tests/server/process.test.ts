import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { createServer } from 'node:http';
import { connect, type AddressInfo } from 'node:net';
import { setTimeout as delay } from 'node:timers/promises';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readEnv } from '../../server/env.ts';
import { createTestDatabase, type TestDatabase } from '../support/test-database.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await createTestDatabase();
});
afterAll(() => database.drop());

const origin = 'http://127.0.0.1:9';

/** Starts the server as a program; its port is found in the log. */
function startProgram(variables: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    env: {
      PATH: process.env.PATH,
      DATABASE_URL: database.url,
      APP_ORIGIN: origin,
      SMTP_URL: 'smtp://127.0.0.1:1',
      PORT: '0',
      CLIENT_DIR: '',
      ...variables,
    },
  });
  let output = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (chunk: Buffer) => (output += chunk.toString()));
  }
  const ended = once(child, 'exit').then(([code]) => code as number | null);
  return {
    child,
    ended,
    output: () => output,
    async port(): Promise<number> {
      for (let turn = 0; turn < 200; turn += 1) {
        const port = /"port":(\d+)\},"msg":"listening"/.exec(output)?.[1];
        if (port) return Number(port);
        await delay(100);
      }
      throw new Error(`the server does not listen: ${output}`);
    },
  };
}

describe('a start that cannot be', () => {
  const right = {
    DATABASE_URL: 'postgres://a:b@127.0.0.1/c',
    APP_ORIGIN: 'https://flightcase.example',
    SMTP_URL: 'smtp://127.0.0.1',
  };

  it.each([
    [{ DATABASE_URL: 'not-so-secret' }, /^DATABASE_URL is not right: it must look like postgres:/],
    [{ APP_ORIGIN: 'https://host/path' }, /^APP_ORIGIN is not right: it must look like https:/],
    [
      { APP_ORIGIN: undefined, SMTP_URL: undefined },
      /^Please set APP_ORIGIN\. Please set SMTP_URL/,
    ],
    [{ SMTP_URL: 'mail.example' }, /^SMTP_URL is not right: it must look like smtp:/],
    [{ PORT: '70000' }, /^PORT is not right/],
  ])('names the variable, never its value: %j', (variables, sentence) => {
    const read = () => readEnv({ ...right, ...variables });
    expect(read).toThrow(sentence);
    expect(read).not.toThrow(/not-so-secret/);
  });

  it('says in one sentence what is wrong outside, and ends', async () => {
    const noDatabase = new URL(database.url);
    noDatabase.pathname = '/no_such_database';
    const noServer = new URL(database.url);
    noServer.port = '1';
    const other = createServer().listen(0, '127.0.0.1');
    await once(other, 'listening');
    const { port } = other.address() as AddressInfo;
    const attempts: [Record<string, string>, string][] = [
      [{ DATABASE_URL: '' }, 'DATABASE_URL is not right'],
      [{ DATABASE_URL: noServer.href }, 'PostgreSQL does not answer where DATABASE_URL points'],
      [{ DATABASE_URL: noDatabase.href }, 'no database of the name in DATABASE_URL'],
      [{ PORT: String(port) }, 'Another program uses the port'],
    ];
    for (const [variables, words] of attempts) {
      const program = startProgram(variables);
      expect(await program.ended).toBe(1);
      expect(program.output()).toMatch(/^The server cannot start\. [^\n]+\n$/);
      expect(program.output()).toContain(words);
    }
    other.close();
  }, 60_000);
});

/** Sends the head of a sign-in and half of its body. */
async function beginSignIn(port: number) {
  const body = JSON.stringify({ email: 'a@b.example', password: 'wrong password' });
  const socket = connect(port, '127.0.0.1');
  let answer = '';
  socket.on('data', (chunk: Buffer) => (answer += chunk.toString()));
  socket.on('error', () => undefined);
  await once(socket, 'connect');
  socket.write(
    `POST /api/session HTTP/1.1\r\nHost: x\r\nOrigin: ${origin}\r\n` +
      `Content-Type: application/json\r\nContent-Length: ${body.length}\r\n\r\n${body.slice(0, 9)}`,
  );
  await delay(300);
  return {
    finish: () => socket.write(body.slice(9)),
    closed: once(socket, 'close'),
    answer: () => answer,
  };
}

describe('a stop', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)(
    'on %s takes nothing new, finishes what is at work, and ends in order',
    async (signal) => {
      const program = startProgram({});
      const port = await program.port();
      const request = await beginSignIn(port);
      program.child.kill(signal);
      await delay(500);
      await expect(fetch(`http://127.0.0.1:${port}/healthz`)).rejects.toThrow();
      request.finish();
      expect(await program.ended).toBe(0);
      expect(request.answer()).toContain('HTTP/1.1 401');
      expect(program.output()).toContain('"msg":"stopped"');
    },
  );

  it('cuts a request that never ends after ten seconds', async () => {
    const program = startProgram({});
    const request = await beginSignIn(await program.port());
    const start = performance.now();
    program.child.kill('SIGTERM');
    expect(await program.ended).toBe(0);
    const seconds = (performance.now() - start) / 1_000;
    expect(seconds).toBeGreaterThan(9);
    expect(seconds).toBeLessThan(14);
    await request.closed;
  });
});
