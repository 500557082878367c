import { once } from 'node:events';
import { createServer, type Server } from 'node:http';
import express from 'express';
import type { CaughtMail, SmtpCatcher } from './smtp-catcher.ts';

function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}

function page(title: string, body: string, refreshSeconds?: number): string {
  const refresh = refreshSeconds ? `<meta http-equiv="refresh" content="${refreshSeconds}">` : '';
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">${refresh}
<title>${escapeHtml(title)}</title><style>
:root{color-scheme:light dark;--paper:#f3f0e8;--sheet:#fbfaf5;--ink:#1b211d;--ink-2:#59625b;--line:#dad5c6;--case:#0d5b4b}
@media(prefers-color-scheme:dark){:root{--paper:#131715;--sheet:#1a1f1c;--ink:#ece8de;--ink-2:#9ba59d;--line:#2c3430;--case:#58bfa4}}
body{margin:0 auto;max-width:60rem;padding:2rem 1rem;background:var(--paper);color:var(--ink);font:1rem/1.6 system-ui,sans-serif}
a{color:var(--case)}h1{font-size:1.5rem}p.hint{color:var(--ink-2)}
table{width:100%;border-collapse:collapse;background:var(--sheet)}th,td{padding:.5rem .75rem;border:1px solid var(--line);text-align:left;vertical-align:top}
iframe{width:100%;height:38rem;border:1px solid var(--line);background:#fff}pre{padding:1rem;background:var(--sheet);border:1px solid var(--line);white-space:pre-wrap;overflow-wrap:anywhere}
</style></head><body>${body}</body></html>`;
}

function listPage(mails: CaughtMail[]): string {
  const rows = mails.map(
    (mail) =>
      `<tr><td>${escapeHtml(mail.receivedAt.slice(11, 19))}</td><td>${escapeHtml(mail.to.join(', '))}</td><td><a href="/mails/${mail.id}">${escapeHtml(mail.subject)}</a></td></tr>`,
  );
  const table =
    rows.length > 0
      ? `<table><thead><tr><th>Time (UTC)</th><th>To</th><th>Subject</th></tr></thead><tbody>${rows.join('')}</tbody></table>`
      : '<p>No mail yet.</p>';
  return page(
    'Caught mail',
    `<h1>Caught mail</h1><p class="hint">What the server "sent", newest first. Nothing leaves this machine.</p>${table}`,
    4,
  );
}

function mailPage(mail: CaughtMail): string {
  return page(
    mail.subject,
    `<p><a href="/">All mail</a></p><h1>${escapeHtml(mail.subject)}</h1>
<p class="hint">From ${escapeHtml(mail.from)} to ${escapeHtml(mail.to.join(', '))}, ${escapeHtml(mail.receivedAt)}</p>
<iframe title="The mail as HTML" sandbox="allow-popups allow-popups-to-escape-sandbox" src="/mails/${mail.id}/html"></iframe>
<h2>As plain text</h2><pre>${escapeHtml(mail.text)}</pre>`,
  );
}

/**
 * Shows caught mail on loopback: `/` the list, `/mails/7` one mail as HTML (in a frame without
 * scripts) and as text, `/api/mails?to=address` everything as JSON `{ mails }`, newest first.
 */
export async function startMailPage(
  catcher: SmtpCatcher,
  port: number,
): Promise<{ port: number; server: Server }> {
  const app = express();
  app.disable('x-powered-by');
  app.use((_request, response, next) => {
    response.setHeader(
      'Content-Security-Policy',
      "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; frame-ancestors 'self'",
    );
    next();
  });
  app.get('/', (_request, response) => {
    response.type('html').send(listPage(catcher.mails()));
  });
  app.get('/api/mails', ({ query }, response) => {
    const wanted = typeof query.to === 'string' ? query.to.toLowerCase() : null;
    const mails = catcher
      .mails()
      .filter(
        ({ to }) => wanted === null || to.some((address) => address.toLowerCase() === wanted),
      );
    response.json({ mails });
  });
  const findMail = (id: string) => catcher.mails().find((mail) => String(mail.id) === id);
  app.get('/mails/:id', ({ params }, response) => {
    const mail = findMail(params.id);
    if (mail) response.type('html').send(mailPage(mail));
    else response.status(404).type('html').send(page('No such mail', '<p>No such mail.</p>'));
  });
  app.get('/mails/:id/html', ({ params }, response) => {
    const mail = findMail(params.id);
    // Links open beside the list, not inside the little frame.
    if (mail) response.type('html').send(`<base target="_blank">${mail.html}`);
    else response.status(404).end();
  });
  const server = createServer(app);
  server.listen(port, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  return { port: typeof address === 'object' && address ? address.port : port, server };
}
