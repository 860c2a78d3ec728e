import { AsyncLocalStorage } from 'node:async_hooks';
import pg from 'pg';
import { type QueryOptions, Sequelize, type Transaction } from 'sequelize';

// bigint columns hold money in minor units: within the safe range they are numbers, past it an error
// beats a silently wrong amount.
pg.types.setTypeParser(pg.types.builtins.INT8, (text) => {
  const value = Number(text);
  if (!Number.isSafeInteger(value)) throw new RangeError(`${text} is past the safe integer range`);
  return value;
});
// Tax rates with fractions and a machine's amperes: exact as numbers at the few digits they have.
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number);
// A trade day has no time and no zone: it stays the text it is.
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

/**
 * A Sequelize whose queries join the transaction that is open around them. Sequelize's own `useCLS`
 * is one for all instances, and we have two roles that must never share a connection.
 */
export class Database extends Sequelize {
  readonly open = new AsyncLocalStorage<Transaction>();

  override query(sql: string | { query: string; values: unknown[] }, options?: QueryOptions) {
    const transaction = options?.transaction ?? this.open.getStore();
    return super.query(sql, { ...options, transaction } as QueryOptions) as never;
  }

  /** Runs `work` in a new transaction, which every query within joins. */
  inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
    return this.transaction((transaction) => this.open.run(transaction, () => work(transaction)));
  }
}

export function connect(url: string, pool: number, name: string): Database {
  return new Database(url, {
    dialect: 'postgres',
    logging: false,
    pool: { max: pool, min: 0, idle: 10_000, acquire: 15_000 },
    dialectOptions: { application_name: name, keepAlive: true },
    define: { underscored: true, timestamps: false, freezeTableName: true },
    retry: { max: 0 },
  });
}

let tenant: Database | undefined;
let platform: Database | undefined;

/** The database as role tw_app sees it: rows of one shop, inside `withTenant` only. */
export function tenantDb(): Database {
  if (!tenant) throw new Error('The database is not open: call openDatabase first.');
  return tenant;
}

/** The database as role tw_platform sees it: people, sign-in and subscriptions; no business data. */
export function platformDb(): Database {
  if (!platform) throw new Error('The database is not open: call openDatabase first.');
  return platform;
}

export function openDatabase(options: { appUrl: string; platformUrl: string; pool: number }): void {
  tenant = connect(options.appUrl, options.pool, 'tumblewright');
  platform = connect(options.platformUrl, Math.max(2, options.pool >> 1), 'tumblewright-platform');
}

export async function closeDatabase(): Promise<void> {
  await Promise.all([tenant?.close(), platform?.close()]);
  tenant = platform = undefined;
}
