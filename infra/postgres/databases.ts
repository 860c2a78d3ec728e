import { Client } from 'pg';
import { type Cluster } from './cluster';

export async function withClient<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** The roles of docs/decisions: one owns, two serve, none of them may pass by row security. */
const roles: Record<string, string> = {
  tw_owner: 'LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS',
  tw_app: 'LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS',
  tw_platform: 'LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS',
  // For a person or a check that looks at everything and changes nothing.
  tw_reader: 'LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE BYPASSRLS',
};

/** Makes the roles of a private server. Needs its superuser; passwords are plain hex. */
export async function ensureRoles(adminUrl: string, password: string): Promise<void> {
  await withClient(adminUrl, async (client) => {
    const { rows } = await client.query<{ rolname: string }>('SELECT rolname FROM pg_roles');
    const existing = new Set(rows.map((row) => row.rolname));
    for (const [role, attributes] of Object.entries(roles)) {
      const verb = existing.has(role) ? 'ALTER' : 'CREATE';
      await client.query(`${verb} ROLE ${role} ${attributes} PASSWORD '${password}'`);
    }
    await client.query('GRANT pg_read_all_data TO tw_reader');
    await client.query('ALTER ROLE tw_reader SET default_transaction_read_only = on');
  });
}

/** Makes a database of tw_owner's, optionally as a copy; false when it was there already. */
export async function ensureDatabase(
  adminUrl: string,
  name: string,
  template?: string,
): Promise<boolean> {
  return withClient(adminUrl, async (client) => {
    const found = await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [name]);
    if (found.rowCount) return false;
    const copy = template ? ` TEMPLATE ${template}` : '';
    await client.query(`CREATE DATABASE ${name} OWNER tw_owner${copy}`);
    await client.query(`REVOKE ALL ON DATABASE ${name} FROM PUBLIC`);
    await client.query(
      `GRANT CONNECT, TEMPORARY ON DATABASE ${name} TO tw_app, tw_platform, tw_reader`,
    );
    return true;
  });
}

export interface DatabaseUrls {
  ownerUrl: string;
  appUrl: string;
  platformUrl: string;
  readerUrl: string;
}

export function databaseUrls(cluster: Pick<Cluster, 'url'>, database: string): DatabaseUrls {
  return {
    ownerUrl: cluster.url('tw_owner', database),
    appUrl: cluster.url('tw_app', database),
    platformUrl: cluster.url('tw_platform', database),
    readerUrl: cluster.url('tw_reader', database),
  };
}
