import { migrate, seed, startFakes, startServer } from '../../server/dev/application.mjs';
import { findOutdated } from '../../server/dev/build.mjs';
import { inCheckout } from '../../server/dev/checkout.mjs';
import { ensureDatabase } from '../../server/dev/databases.mjs';
import { freePort, loopback } from '../../server/dev/ports.mjs';
import { runProgram } from '../../server/dev/processes.mjs';
import { announceProduct } from './product.ts';
import { startThrowawayCluster } from './throwaway-cluster.ts';

/**
 * Playwright calls this once before the browser tests, and what it returns after them: the built
 * product on a free port, with its local mail catcher and the reference scenario in a database
 * of its own.
 */
// eslint-disable-next-line import-x/no-default-export -- Playwright looks for the default export
export default async function startProduct(): Promise<() => Promise<void>> {
  await buildWhatChanged();
  const logFolder = inCheckout('.data', 'test-log');
  const { cluster, stop: stopCluster } = await startThrowawayCluster();
  const databaseUrl = await ensureDatabase(cluster, 'flightcase');
  await migrate(databaseUrl, 'built');
  const signIns = await seed(databaseUrl, 'built');

  const smtpPort = await freePort();
  const mailPagePort = await freePort();
  const port = await freePort();
  const origin = `http://${loopback}:${port}`;
  const fakes = await startFakes({ form: 'built', smtpPort, mailPagePort, logFolder });
  const server = await startServer({
    form: 'built',
    port,
    publicOrigin: origin,
    databaseUrl,
    smtpPort,
    logFolder,
  });
  announceProduct({ origin, mailPage: `http://${loopback}:${mailPagePort}`, databaseUrl, signIns });

  return async () => {
    await server.stop();
    await fakes.stop();
    await stopCluster();
  };
}

/** In a process of its own, which sets the environment that builds need. */
async function buildWhatChanged(): Promise<void> {
  if ((await findOutdated()).length === 0) return;
  const command = [process.execPath, inCheckout('server/dev/build.mjs'), '--quiet'];
  const { code, stdout, stderr } = await runProgram(command, { cwd: inCheckout() });
  if (code !== 0) throw new Error(`${stdout}\n${stderr}`);
}
