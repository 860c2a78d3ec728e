import { chmodSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type Cluster, startCluster } from '../../infra/postgres/cluster';
import { ensureRoles } from '../../infra/postgres/databases';

/** A PostgreSQL for one run of tests, with the roles the application needs. */
export async function startTestCluster(): Promise<{ folder: string; cluster: Cluster }> {
  const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-test-'));
  // As root, PostgreSQL runs as a lent user, who must be able to pass through.
  chmodSync(folder, 0o711);
  const cluster = await startCluster({ folder, durable: false });
  await ensureRoles(cluster.url('postgres', 'postgres'), cluster.password);
  return { folder, cluster };
}
