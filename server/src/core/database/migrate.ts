import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { QueryTypes } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { createQueues } from '../jobs/queues';
import { connect } from './database';

/** The folder of numbered SQL files at the project's root, seen from the sources or the bundle. */
function migrationsFolder(): string {
  for (let folder = __dirname; ; folder = dirname(folder)) {
    const candidate = join(folder, 'migrations');
    if (existsSync(join(candidate, '0001-tenancy.sql'))) return candidate;
    if (folder === dirname(folder)) throw new Error('The folder migrations/ is missing.');
  }
}

/**
 * Brings the schema up to date as its owner, each numbered file in a transaction of its own, and
 * creates the job queues, which need the owner too. Two that start at once take turns.
 */
export async function migrate(options: {
  ownerUrl: string;
  log?: (line: string) => void;
}): Promise<void> {
  const db = connect(options.ownerUrl, 2, 'tumblewright-migrate');
  const folder = migrationsFolder();
  try {
    await db.query('select pg_advisory_lock(724001)', { type: QueryTypes.SELECT });
    const umzug = new Umzug({
      migrations: readdirSync(folder)
        .filter((name) => name.endsWith('.sql'))
        .sort()
        .map((name) => ({
          name,
          up: () =>
            db.transaction((transaction) =>
              db.query(readFileSync(join(folder, name), 'utf8'), { transaction }),
            ),
        })),
      storage: new SequelizeStorage({ sequelize: db, tableName: 'schema_migrations' }),
      logger: undefined,
    });
    for (const { name } of await umzug.up()) options.log?.(`Migrated ${name}`);
    await createQueues(options.ownerUrl);
  } finally {
    await db.close();
  }
}
