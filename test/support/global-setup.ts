import { type Cluster } from '../../infra/postgres/cluster';
import { startTestCluster } from './test-cluster';

declare global {
  var testCluster: { folder: string; cluster: Cluster } | undefined;
}

/**
 * One PostgreSQL for all spec files of a run. `npm test` brings its own and names it in
 * TEST_DATABASE_ADMIN; when jest is run by itself, this starts one and global-teardown.ts ends it.
 */
export default async function globalSetup(): Promise<void> {
  if (process.env.TEST_DATABASE_ADMIN) return;
  const started = await startTestCluster();
  process.env.TEST_DATABASE_ADMIN = started.cluster.url('postgres', 'postgres');
  globalThis.testCluster = started;
}
