import { AsyncLocalStorage } from 'node:async_hooks';
import { QueryTypes, type Transaction } from 'sequelize';
import { platformDb, tenantDb } from './database';

/** Whose rows a transaction may touch. */
export interface TenantScope {
  shopId: string;
  clientId?: string | null;
}

export type Bind = Record<string, unknown>;

const scopes = new AsyncLocalStorage<TenantScope>();

/**
 * Runs `work` in one transaction that sees the rows of one shop, and of one client when the scope
 * names one. The setting is local to the transaction, so a pool in front cannot leak it. Within a
 * transaction of the same scope the work simply joins it; another scope is a mistake in the code.
 *
 * No call to SMTP, the card payment service or the disk belongs inside.
 */
export function withTenant<T>(scope: TenantScope, work: () => Promise<T>): Promise<T> {
  const open = scopes.getStore();
  const clientId = scope.clientId ?? null;
  if (open) {
    if (open.shopId !== scope.shopId || (open.clientId ?? null) !== clientId) {
      throw new Error('withTenant: a transaction of another scope is open');
    }
    return work();
  }
  return tenantDb().inTransaction(() =>
    scopes.run({ shopId: scope.shopId, clientId }, async () => {
      await tenantDb().query(
        "select set_config('app.shop_id', $shopId, true), set_config('app.client_id', $clientId, true)",
        { bind: { shopId: scope.shopId, clientId: clientId ?? '' }, type: QueryTypes.SELECT },
      );
      return work();
    }),
  );
}

/** Whether a tenant transaction is open here. */
export function inTenant(): boolean {
  return scopes.getStore() !== undefined;
}

/** The open tenant transaction, for a library that writes through it (the job queue). */
export function tenantTransaction(): Transaction {
  const transaction = tenantDb().open.getStore();
  if (!transaction || !inTenant()) throw new Error('A tenant query ran outside withTenant.');
  return transaction;
}

/** Every row of a named SQL statement, its parameters bound as `$name`. Inside `withTenant` only. */
export function rows<T extends object>(sql: string, bind: Bind = {}): Promise<T[]> {
  tenantTransaction();
  return tenantDb().query(sql, { bind, type: QueryTypes.SELECT, raw: true }) as Promise<T[]>;
}

/** The first row, or undefined. */
export async function row<T extends object>(sql: string, bind: Bind = {}): Promise<T | undefined> {
  return (await rows<T>(sql, bind))[0];
}

/** A statement that writes; answers with what it returns (`returning`). */
export async function write<T extends object>(sql: string, bind: Bind = {}): Promise<T[]> {
  return rows<T>(sql, bind);
}

/** Runs `work` in one transaction of the platform role, or joins the one that is open. */
export function withPlatform<T>(work: () => Promise<T>): Promise<T> {
  const db = platformDb();
  return db.open.getStore() ? work() : db.inTransaction(() => work());
}

/** Rows as the platform role sees them; outside a transaction each statement is its own. */
export function platformRows<T extends object>(sql: string, bind: Bind = {}): Promise<T[]> {
  return platformDb().query(sql, { bind, type: QueryTypes.SELECT, raw: true }) as Promise<T[]>;
}

export async function platformRow<T extends object>(
  sql: string,
  bind: Bind = {},
): Promise<T | undefined> {
  return (await platformRows<T>(sql, bind))[0];
}
