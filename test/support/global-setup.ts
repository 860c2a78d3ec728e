import { chmodSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type Cluster, startCluster } from '../../infra/postgres/cluster';
import { ensureRoles } from '../../infra/postgres/databases';

declare global {
  var testCluster: { folder: string; cluster: Cluster } | undefined;
}

/**
 * One PostgreSQL for all spec files of a run. `npm test` brings its own and names it in
 * TEST_DATABASE_ADMIN; when jest is run by itself, this starts one and global-teardown.ts ends it.
 */
export default async function globalSetup(): Promise<void> {
  if (process.env.TEST_DATABASE_ADMIN) return;
  const { folder, cluster } = await startTestCluster();
  process.env.TEST_DATABASE_ADMIN = cluster.url('postgres', 'postgres');
  globalThis.testCluster = { folder, cluster };
}

export async function startTestCluster(): Promise<{ folder: string; cluster: Cluster }> {
  const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-test-'));
  // As root, PostgreSQL runs as a lent user, who must be able to pass through.
  chmodSync(folder, 0o711);
  const cluster = await startCluster({ folder, durable: false });
  await ensureRoles(cluster.url('postgres', 'postgres'), cluster.password);
  return { folder, cluster };
}
