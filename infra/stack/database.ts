import { randomBytes } from 'node:crypto';
import path from 'node:path';
import { Advice } from '../bootstrap/progress.cjs';
import { type Cluster, startCluster } from '../postgres/cluster';
import {
  databaseUrls,
  type DatabaseUrls,
  ensureDatabase,
  ensureRoles,
  withClient,
} from '../postgres/databases';
import { readState, writeState } from '../process/state-file';

const databaseName = 'tumblewright';

export async function startPrivateDatabase(
  folder: string,
  durable: boolean,
): Promise<{ cluster: Cluster; urls: DatabaseUrls }> {
  const cluster = await startCluster({ folder, durable });
  const adminUrl = cluster.url('postgres', 'postgres');
  await ensureRoles(adminUrl, cluster.password);
  await ensureDatabase(adminUrl, databaseName);
  return { cluster, urls: databaseUrls(cluster, databaseName) };
}

export async function recreatePrivateDatabase(cluster: Cluster): Promise<void> {
  const adminUrl = cluster.url('postgres', 'postgres');
  await withClient(adminUrl, (client) =>
    client.query(`DROP DATABASE IF EXISTS ${databaseName} WITH (FORCE)`),
  );
  await ensureDatabase(adminUrl, databaseName);
}

function withUser(address: string, user: string, password: string): string {
  const url = new URL(address);
  url.username = user;
  url.password = password;
  return url.href;
}

function neverAnswered(error: unknown): boolean {
  const code = (error as { code?: string }).code ?? '';
  return ['ECONNREFUSED', 'ENOTFOUND', 'EAI_AGAIN', 'EHOSTUNREACH', 'ETIMEDOUT'].includes(code);
}

/**
 * A database of somebody else's: DATABASE_URL is its owner's address. The two roles that serve are
 * either given by address too, or made here when the owner may make roles.
 */
export async function useGivenDatabase(ownerUrl: string, dataDir: string): Promise<DatabaseUrls> {
  const given = { app: process.env.DATABASE_APP_URL, platform: process.env.DATABASE_PLATFORM_URL };
  const file = path.join(dataDir, 'given-database.json');
  const password =
    readState<{ password: string }>(file)?.password ?? randomBytes(18).toString('hex');
  const wanted = [...(given.app ? [] : ['tw_app']), ...(given.platform ? [] : ['tw_platform'])];
  try {
    await withClient(ownerUrl, async (client) => {
      for (const role of wanted) {
        const found = await client.query('SELECT 1 FROM pg_roles WHERE rolname = $1', [role]);
        if (found.rowCount) continue;
        await client.query(
          `CREATE ROLE ${role} LOGIN NOSUPERUSER NOBYPASSRLS PASSWORD '${password}'`,
        );
        writeState(file, { password });
      }
    });
    const urls: DatabaseUrls = {
      ownerUrl,
      appUrl: given.app ?? withUser(ownerUrl, 'tw_app', password),
      platformUrl: given.platform ?? withUser(ownerUrl, 'tw_platform', password),
      readerUrl: ownerUrl,
    };
    await withClient(urls.appUrl, (client) => client.query('SELECT 1'));
    await withClient(urls.platformUrl, (client) => client.query('SELECT 1'));
    return urls;
  } catch (error) {
    if (neverAnswered(error)) {
      throw new Advice(
        `The database of DATABASE_URL does not answer: ${(error as Error).message}`,
        'Check host and port, and that the server runs; or unset DATABASE_URL for a private one.',
      );
    }
    throw new Advice(
      `The database of DATABASE_URL cannot be used: ${(error as Error).message}`,
      [
        'DATABASE_URL is the address of the role that owns the database. Two more roles serve:',
        "    CREATE ROLE tw_app LOGIN NOSUPERUSER NOBYPASSRLS PASSWORD '...';",
        "    CREATE ROLE tw_platform LOGIN NOSUPERUSER NOBYPASSRLS PASSWORD '...';",
        'Make them, and set DATABASE_APP_URL and DATABASE_PLATFORM_URL to their addresses.',
      ].join('\n'),
    );
  }
}
