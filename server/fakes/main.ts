import { startMailPage } from './mail-page.ts';
import { startSmtpCatcher } from './smtp-catcher.ts';

/**
 * The local stand-ins for outside services. SMTP_PORT and MAIL_PAGE_PORT say where they listen
 * (left out or 0: on free ports); one JSON line on stdout says when they do, and where.
 */
const portFrom = (name: string) => Number(process.env[name] ?? 0);

const catcher = await startSmtpCatcher(portFrom('SMTP_PORT'));
const mailPage = await startMailPage(catcher, portFrom('MAIL_PAGE_PORT'));
console.log(JSON.stringify({ ready: true, smtpPort: catcher.port, pagePort: mailPage.port }));

for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    mailPage.server.close();
    mailPage.server.closeAllConnections();
    void catcher.close().then(() => process.exit(0));
  });
}
