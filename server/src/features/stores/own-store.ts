import { type Context } from '../../core/context';
import { type Bind } from '../../core/database/tenancy';
import { notFound } from '../../core/problems/problem';

/**
 * For lists: row-level security narrows a client's people to their client by itself, but only a
 * condition of the query lets an index of the client's rows be used.
 */
export function ownClient(context: Context, column: string, bind: Bind): string[] {
  if (context.clientId === null) return [];
  bind.ownClientId = context.clientId;
  return [`${column} = $ownClientId`];
}

/**
 * Row-level security narrows a client's people to their client; an attendant is narrowed further,
 * to the one store, by every query.
 */
export function ownStore(context: Context, column: string, bind: Bind): string[] {
  if (context.storeId === null) return [];
  bind.ownStoreId = context.storeId;
  return [`${column} = $ownStoreId`];
}

/** For a store named in the request: any but an attendant's own is not there. */
export function refuseOtherStore(context: Context, storeId: string): void {
  if (context.storeId !== null && context.storeId !== storeId.toLowerCase()) throw notFound();
}
