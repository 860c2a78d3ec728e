import { removeCluster } from '../../infra/postgres/cluster';

export default async function globalTeardown(): Promise<void> {
  const started = globalThis.testCluster;
  if (!started) return;
  await started.cluster.stop('immediate');
  await removeCluster(started.folder);
}
