import { type Context } from '../../core/context';
import { row } from '../../core/database/tenancy';
import { notFound, problem } from '../../core/problems/problem';

export type OwnerKind = 'job' | 'call' | 'store';

const tables: Record<OwnerKind, string> = {
  job: 'select client_id, store_id from jobs',
  call: 'select client_id, store_id from calls',
  store: 'select client_id, id as store_id from stores',
};

/**
 * The client a photo's owner belongs to; not there for whoever may not see the owner. In a tenant
 * transaction, so that a client's people find their own client's only.
 */
export async function clientOfOwner(
  context: Context,
  kind: OwnerKind,
  ownerId: string,
): Promise<string> {
  const owner = await row<{ client_id: string; store_id: string }>(
    `${tables[kind]} where shop_id = $shopId and id = $ownerId`,
    { shopId: context.shopId, ownerId },
  );
  if (!owner) throw notFound();
  if (context.storeId !== null && owner.store_id !== context.storeId) throw notFound();
  return owner.client_id;
}

/** A job's photos are the shop's proof: people of the client look at them and add none. */
export function refuseProofByOthers(context: Context, kind: OwnerKind): void {
  if (kind === 'job' && context.clientId !== null) throw problem('not-allowed');
}
