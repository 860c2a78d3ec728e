import { type Role } from '@lib/contracts';
import { platformRows, rows, withTenant } from '../../core/database/tenancy';
import { type Person } from './people';

export interface Membership {
  id: string;
  role: Role;
  shopId: string | null;
  shopName: string | null;
  clientId: string | null;
  clientName: string | null;
  storeId: string | null;
}

interface Row {
  id: string;
  role: Role;
  shop_id: string;
  shop_name: string;
  client_id: string | null;
  store_id: string | null;
}

/**
 * Everything a person can work as. A platform admin has the platform area beside the memberships;
 * it is in no table of shops, so its id is the person's own.
 */
export async function membershipsOf(
  person: Pick<Person, 'id' | 'platform_admin'>,
): Promise<Membership[]> {
  const found = await platformRows<Row>(
    `select m.id, m.role, m.shop_id, s.name as shop_name, m.client_id, m.store_id
     from memberships m join shops s on s.id = m.shop_id
     where m.user_id = $userId and m.ended_at is null
     order by s.name, m.created_at, m.id`,
    { userId: person.id },
  );
  const clients = await clientNames(found);
  const memberships: Membership[] = found.map((row) => ({
    id: row.id,
    role: row.role,
    shopId: row.shop_id,
    shopName: row.shop_name,
    clientId: row.client_id,
    clientName: row.client_id ? (clients.get(row.client_id) ?? null) : null,
    storeId: row.store_id,
  }));
  return person.platform_admin ? [platformMembership(person.id), ...memberships] : memberships;
}

function platformMembership(userId: string): Membership {
  const nothing = { shopId: null, shopName: null, clientId: null, clientName: null, storeId: null };
  return { id: userId, role: 'platform_admin', ...nothing };
}

/** Names of clients are a shop's business: the platform role cannot read them, the shop's can. */
async function clientNames(found: Row[]): Promise<Map<string, string>> {
  const names = new Map<string, string>();
  for (const shopId of new Set(found.filter((m) => m.client_id).map((m) => m.shop_id))) {
    const ids = found.filter((m) => m.shop_id === shopId).map((m) => m.client_id);
    const clients = await withTenant({ shopId }, () =>
      rows<{ id: string; name: string }>(
        'select id, name from clients where shop_id = $shopId and id = any($ids::uuid[])',
        { shopId, ids: ids.filter((id) => id !== null) },
      ),
    );
    for (const { id, name } of clients) names.set(id, name);
  }
  return names;
}
