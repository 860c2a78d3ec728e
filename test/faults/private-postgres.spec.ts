import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createServer } from 'node:net';
import { isAlive } from '../../infra/process/alive';
import { removeCluster, startCluster } from '../../infra/postgres/cluster';
import {
  databaseUrls,
  ensureDatabase,
  ensureRoles,
  withClient,
} from '../../infra/postgres/databases';

// A mkdtemp folder is private to us: as root this is the case of a checkout in a closed home.
const home = mkdtempSync(path.join(tmpdir(), 'tw cluster, "quoted" '));
const folder = path.join(home, 'postgres');

afterAll(async () => {
  await removeCluster(folder);
  rmSync(home, { recursive: true, force: true });
});

describe('the private PostgreSQL', () => {
  it('starts, keeps its data over a stop, and ends a server that was left behind', async () => {
    const first = await startCluster({ folder, durable: false });
    const admin = first.url('postgres', 'postgres');
    await ensureRoles(admin, first.password);
    expect(await ensureDatabase(admin, 'sample')).toBe(true);
    expect(await ensureDatabase(admin, 'sample')).toBe(false);
    const urls = databaseUrls(first, 'sample');
    await withClient(urls.ownerUrl, async (owner) => {
      await owner.query('CREATE TABLE kept (word text)');
      await owner.query("INSERT INTO kept VALUES ('ticket')");
    });

    // The second start finds the first still running, as after a killed `npm start`.
    const second = await startCluster({ folder, durable: false });
    expect(isAlive(first.pid)).toBe(false);
    expect(second.port).toBe(first.port);
    const { rows } = await withClient(urls.readerUrl, (reader) => reader.query('TABLE kept'));
    expect(rows).toEqual([{ word: 'ticket' }]);
    await expect(
      withClient(urls.readerUrl, (reader) => reader.query("INSERT INTO kept VALUES ('no')")),
    ).rejects.toThrow(/read-only/);
    await expect(withClient(urls.appUrl, (app) => app.query('TABLE kept'))).rejects.toThrow(
      /permission denied/,
    );

    await second.stop('immediate');
    await second.exited;
    const blocker = createServer().listen(second.port, '127.0.0.1');
    await new Promise((resolve) => blocker.once('listening', resolve));
    const third = await startCluster({ folder, durable: true });
    blocker.close();
    expect(third.port).not.toBe(second.port);
    const checks = await withClient(third.url('postgres', 'sample'), (client) =>
      client.query(
        `SELECT current_setting('server_encoding') encoding, datcollate collation,
                current_setting('data_checksums') checksums, current_setting('fsync') fsync
           FROM pg_database WHERE datname = current_database()`,
      ),
    );
    expect(checks.rows).toEqual([
      { encoding: 'UTF8', collation: 'C.UTF-8', checksums: 'on', fsync: 'on' },
    ]);
    await third.stop();
    expect(statSync(path.join(folder, 'cluster.json')).mode & 0o777).toBe(0o600);
  }, 60_000);
});
