import {
  databaseUrls,
  type DatabaseUrls,
  ensureDatabase,
  withClient,
} from '../../infra/postgres/databases';
import { migrate } from '../../server/src/core/database/migrate';

const template = 'tw_template';

/** Where the run's PostgreSQL is; global-setup.ts or `npm test` has started it. */
function adminUrl(database = 'postgres'): string {
  const address = process.env.TEST_DATABASE_ADMIN;
  if (!address) throw new Error('TEST_DATABASE_ADMIN is not set: run by jest or npm test.');
  const url = new URL(address);
  url.pathname = `/${database}`;
  return url.href;
}

/** The test server's roles share its superuser's password, so one address tells all of them. */
function roleUrl(role: string, database: string): string {
  const url = new URL(adminUrl(database));
  url.username = role;
  return url.href;
}

/** Migrates once per run, whichever worker comes first; the others wait for it. */
async function ensureTemplate(): Promise<void> {
  await withClient(adminUrl(), async (client) => {
    await client.query('SELECT pg_advisory_lock(74001)');
    const ready = await client.query(
      'SELECT 1 FROM pg_database WHERE datname = $1 AND datistemplate',
      [template],
    );
    if (ready.rowCount) return;
    await client.query(`DROP DATABASE IF EXISTS ${template} WITH (FORCE)`);
    await ensureDatabase(adminUrl(), template);
    await migrate({ ownerUrl: roleUrl('tw_owner', template), log: () => undefined });
    await client.query(`ALTER DATABASE ${template} IS_TEMPLATE true ALLOW_CONNECTIONS false`);
  });
}

/** Databases of this worker's earlier files; one that is still in use is left for the next time. */
async function dropEarlier(prefix: string): Promise<void> {
  await withClient(adminUrl(), async (client) => {
    const { rows } = await client.query<{ datname: string }>(
      'SELECT datname FROM pg_database WHERE datname LIKE $1',
      [`${prefix.replaceAll('_', '\\_')}%`],
    );
    for (const { datname } of rows) {
      await client.query(`DROP DATABASE ${datname}`).catch(() => undefined);
    }
  });
}

/** A migrated, empty database that nobody else uses. */
async function freshDatabase(): Promise<DatabaseUrls> {
  await ensureTemplate();
  const prefix = `tw_test_${process.env.JEST_WORKER_ID ?? '0'}_`;
  await dropEarlier(prefix);
  const name = `${prefix}${process.pid}_${Date.now().toString(36)}`;
  // A copy is refused while anybody, even a finishing copy, is connected to the original.
  await withClient(adminUrl(), async (client) => {
    await client.query('SELECT pg_advisory_lock(74002)');
    await ensureDatabase(adminUrl(), name, template);
  });
  return databaseUrls({ url: roleUrl }, name);
}

let ofThisFile: Promise<DatabaseUrls> | undefined;

/** The database of the running spec file, made when first asked for. */
export function testDatabase(): Promise<DatabaseUrls> {
  ofThisFile ??= freshDatabase();
  return ofThisFile;
}
