import { v7 as uuid } from 'uuid';
import { type Role } from '@lib/contracts';
import { hashPassword } from '../core/auth/password';
import { type Context } from '../core/context';
import { platformRows } from '../core/database/tenancy';

/** The one password of everybody in the demo; it is printed at every start. */
export const demoPassword = 'tumble-and-wring';

export interface DemoAccount {
  role: Role;
  shop: string | null;
  email: string;
  password: string;
}

export interface Person {
  userId: string;
  membershipId: string;
  name: string;
  email: string;
  /** What this person acts with at a moment. */
  at(now: Date): Context;
}

let hash: string | undefined;

/** `Imre Kovalik` of `Brackwater ...` signs in as imre.kovalik@brackwater.example. */
function addressOf(name: string, shopName: string): string {
  const plain = (words: string) =>
    words
      .normalize('NFD')
      .replace(/[^\w\s-]|[\u0300-\u036f]/g, '')
      .toLowerCase();
  return `${plain(name).trim().replace(/\s+/g, '.')}@${plain(shopName).split(/\s+/).at(-1)}.example`;
}

async function addUser(name: string, email: string, admin: boolean): Promise<string> {
  hash ??= await hashPassword(demoPassword, 12);
  const [user] = await platformRows<{ id: string }>(
    `insert into users (id, email, name, password_hash, email_verified_at, platform_admin)
     values ($id, $email, $name, $hash, now(), $admin)
     on conflict (email) do update set name = excluded.name returning id`,
    { id: uuid(), email, name, hash, admin },
  );
  return (user as { id: string }).id;
}

export async function addPlatformAdmin(): Promise<DemoAccount> {
  const email = 'admin@tumblewright.example';
  await addUser('Ines Varga', email, true);
  return { role: 'platform_admin', shop: null, email, password: demoPassword };
}

interface Membership {
  role: Exclude<Role, 'platform_admin'>;
  clientId?: string;
  storeId?: string;
}

export async function addPerson(
  shop: { id: string; name: string },
  name: string,
  membership: Membership,
): Promise<Person> {
  const email = addressOf(name, shop.name);
  const userId = await addUser(name, email, false);
  const membershipId = uuid();
  const { role, clientId = null, storeId = null } = membership;
  await platformRows(
    `insert into memberships (shop_id, id, user_id, role, client_id, store_id, name, email)
     values ($shopId, $membershipId, $userId, $role, $clientId, $storeId, $name, $email)`,
    { shopId: shop.id, membershipId, userId, role, clientId, storeId, name, email },
  );
  return {
    userId,
    membershipId,
    name,
    email,
    at: (now) => ({
      requestId: 'demo',
      now,
      shopId: shop.id,
      userId,
      membershipId,
      name,
      role,
      clientId,
      storeId,
    }),
  };
}
