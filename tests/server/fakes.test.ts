import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { createInterface } from 'node:readline';
import { createTransport } from 'nodemailer';
import { afterAll, beforeAll, expect, it } from 'vitest';

/** The mail catcher as a program, as the start script runs it. */
let stop: () => Promise<unknown>;
let smtpPort: number;
let page: string;
beforeAll(async () => {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/fakes/main.ts'], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  stop = () => {
    child.kill('SIGTERM');
    return once(child, 'exit');
  };
  const [line] = (await once(createInterface(child.stdout), 'line')) as [string];
  const ready = JSON.parse(line) as { ready: boolean; smtpPort: number; pagePort: number };
  expect(ready.ready).toBe(true);
  smtpPort = ready.smtpPort;
  page = `http://127.0.0.1:${ready.pagePort}`;
});
afterAll(async () => {
  expect(await stop()).toEqual([0, null]);
});

async function get(path: string): Promise<{ status: number; text: string; policy: string }> {
  const answer = await fetch(page + path);
  const policy = answer.headers.get('content-security-policy') ?? '';
  return { status: answer.status, text: await answer.text(), policy };
}

it('shows what was sent, newest first, and lets no mail run a script', async () => {
  const transport = createTransport({ host: '127.0.0.1', port: smtpPort });
  for (const [to, subject] of [
    ['a@x.example', 'First'],
    ['b@x.example', 'Second <script>alert(1)</script>'],
  ] as const) {
    await transport.sendMail({
      from: 'from@x.example',
      ...{ to, subject, text: `Text of ${subject}` },
      html: '<p>Grüße</p><script>alert(2)</script>',
    });
  }
  transport.close();

  const list = await get('/');
  expect(list.text.indexOf('Second')).toBeLessThan(list.text.indexOf('First'));
  expect(list.text).not.toContain('<script>');

  const one = await get('/mails/2');
  expect(one.text).toContain('sandbox="allow-popups allow-popups-to-escape-sandbox"');
  expect(one.text).not.toContain('<script>');
  const html = await get('/mails/2/html');
  expect(html.text).toContain('Grüße');
  expect(html.policy).toContain("default-src 'none'");
  expect((await get('/mails/3')).status).toBe(404);

  const json = JSON.parse((await get('/api/mails?to=A@x.example')).text) as { mails: object[] };
  expect(json.mails).toHaveLength(1);
  expect(json.mails[0]).toMatchObject({ to: ['a@x.example'], subject: 'First' });
});
