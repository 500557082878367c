import { randomBytes } from 'node:crypto';
import { readdir, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { chooseClusterHome } from '../../server/dev/cluster-home.mjs';
import { removeCluster, startCluster, type Cluster } from '../../server/dev/postgres.mjs';
import { isRunning } from '../../server/dev/processes.mjs';

/**
 * A PostgreSQL server of this run's own, so that several runs in one checkout do not meet. It
 * ends with this process, however that ends.
 *
 * @throws SetupFailure where PostgreSQL is missing or cannot be started
 */
export async function startThrowawayCluster(): Promise<{
  cluster: Cluster;
  stop: () => Promise<void>;
}> {
  const runName = `${process.pid}-${randomBytes(3).toString('hex')}`;
  const home = await chooseClusterHome(join('test-postgres', runName));
  await removeDeadClusters(dirname(home.path));
  const cluster = await startCluster(home, { durable: false });
  return {
    cluster,
    stop: async () => {
      await cluster.program.stop();
      await removeCluster(home);
    },
  };
}

/** Removes the clusters of runs that were killed before they could do it themselves. */
async function removeDeadClusters(folder: string): Promise<void> {
  for (const name of await readdir(folder).catch(() => [])) {
    const pid = Number(name.split('-')[0]);
    if (pid > 0 && !isRunning(pid)) await rm(join(folder, name), { recursive: true, force: true });
  }
}
