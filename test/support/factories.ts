import { v7 as uuid } from 'uuid';
import { signAccessToken } from '../../server/src/core/auth/access-token';
import { systemContext } from '../../server/src/core/context';
import { platformRows, withTenant, write } from '../../server/src/core/database/tenancy';
import { sessionSecret } from './app';

export type TenantRole = 'shop_owner' | 'office' | 'tech' | 'client_owner' | 'attendant';

export interface TestShop {
  id: string;
  name: string;
}

export interface TestPerson {
  userId: string;
  membershipId: string;
  email: string;
  /** An access token, as signing in would give. */
  token: string;
}

let serial = 0;
/** A number no other row of this test file has. */
export const next = (): number => ++serial;

/** Writes as the shop itself would. */
export function inShop<T>(shop: TestShop, work: () => Promise<T>): Promise<T> {
  return withTenant(systemContext(shop.id, new Date()), work);
}

/** Inserts one row of a tenant table and answers with its id. */
export async function insert(
  shop: TestShop,
  table: string,
  values: Record<string, unknown>,
): Promise<string> {
  const id = (values.id as string | undefined) ?? uuid();
  const all: Record<string, unknown> = { shop_id: shop.id, ...values, id };
  const names = Object.keys(all);
  await inShop(shop, () =>
    write(
      `insert into ${table} (${names.join(', ')}) values (${names.map((n) => `$${n}`).join(', ')})`,
      all,
    ),
  );
  return id;
}

/** A shop on a generous plan, with settings, as signing up leaves it. */
export async function buildShop(
  values: { name?: string; zone?: string; currency?: string; state?: string } = {},
): Promise<TestShop> {
  const shop = { id: uuid(), name: values.name ?? `Shop ${next()}` };
  const planId = uuid();
  await platformRows(
    `insert into plans (id, code, name, monthly_amount, currency, store_limit, machine_limit, crew_limit)
     values ($id, $code, 'Bench', 4900, 'USD', 1000, 100000, 100)`,
    { id: planId, code: `plan-${next()}-${planId}` },
  );
  await platformRows(
    'insert into shops (id, name, zone, currency) values ($id, $name, $zone, $currency)',
    { ...shop, zone: values.zone ?? 'America/New_York', currency: values.currency ?? 'USD' },
  );
  await platformRows(
    `insert into subscriptions (shop_id, id, plan_id, state, state_since)
     values ($shopId, $id, $planId, $state, now())`,
    { shopId: shop.id, id: uuid(), planId, state: values.state ?? 'active' },
  );
  await insert(shop, 'shop_settings', { set_up_at: new Date() });
  return shop;
}

/** A person who works in the shop, signed in. */
export async function buildPerson(
  shop: TestShop,
  role: TenantRole,
  of: { clientId?: string; storeId?: string; name?: string } = {},
): Promise<TestPerson> {
  const userId = uuid();
  const membershipId = uuid();
  const email = `${role}-${next()}-${userId.slice(-6)}@people.example`;
  const name = of.name ?? `${role} ${serial}`;
  await platformRows(
    'insert into users (id, email, name, email_verified_at) values ($userId, $email, $name, now())',
    { userId, email, name },
  );
  await platformRows(
    `insert into memberships (shop_id, id, user_id, role, client_id, store_id, name, email)
     values ($shopId, $membershipId, $userId, $role, $clientId, $storeId, $name, $email)`,
    {
      shopId: shop.id,
      membershipId,
      userId,
      role,
      name,
      email,
      clientId: of.clientId ?? null,
      storeId: of.storeId ?? null,
    },
  );
  const { token } = signAccessToken(
    {
      sub: userId,
      sid: uuid(),
      name,
      mid: membershipId,
      role,
      shop: shop.id,
      client: of.clientId,
      store: of.storeId,
    },
    sessionSecret,
  );
  return { userId, membershipId, email, token };
}

export async function buildClient(
  shop: TestShop,
  values: Record<string, unknown> = {},
): Promise<string> {
  return insert(shop, 'clients', { name: `Client ${next()}`, number: `C-${next()}`, ...values });
}

export async function buildStore(
  shop: TestShop,
  values: Record<string, unknown> & { client_id: string },
): Promise<string> {
  return insert(shop, 'stores', { name: `Store ${next()}`, number: `S-${next()}`, ...values });
}

export async function buildBank(
  shop: TestShop,
  values: Record<string, unknown> & { client_id: string; store_id: string },
): Promise<string> {
  return insert(shop, 'banks', { letter: 'A', ...values });
}

export async function buildMachine(
  shop: TestShop,
  values: Record<string, unknown> & { client_id: string; store_id: string; bank_id: string },
): Promise<string> {
  const n = next();
  return insert(shop, 'machines', {
    bay: `A-${String(n).padStart(2, '0')}`,
    bay_number: n,
    kind: 'top_loader',
    sticker_code: `K${uuid().slice(-10)}`,
    ...values,
  });
}

/** A client with one store, one bank and some machines: enough to work on. */
export async function buildLaundry(shop: TestShop, machines = 3) {
  const clientId = await buildClient(shop);
  const storeId = await buildStore(shop, { client_id: clientId });
  const bankId = await buildBank(shop, { client_id: clientId, store_id: storeId });
  const of = { client_id: clientId, store_id: storeId, bank_id: bankId };
  const machineIds: string[] = [];
  for (let i = 0; i < machines; i++) machineIds.push(await buildMachine(shop, of));
  return { clientId, storeId, bankId, machineIds };
}
