import { openThrowAwayCluster, type Cluster } from '../../database/cluster/cluster';

// Jest runs these outside its module system, where aliases mean nothing: relative imports only.

/** The environment variable that tells tests where their cluster is. */
export const TEST_CLUSTER_URL = 'FETTLE_TEST_CLUSTER_URL';

let cluster: Cluster | undefined;

/** Starts a throw-away cluster, unless the test run (or another project of this run) has one already. */
export async function startTestCluster(): Promise<void> {
  if (process.env[TEST_CLUSTER_URL] !== undefined) return;
  cluster = await openThrowAwayCluster();
  process.env[TEST_CLUSTER_URL] = cluster.url;
}

/** Stops and removes what `startTestCluster` started. */
export async function stopTestCluster(): Promise<void> {
  await cluster?.stop();
  cluster = undefined;
}
