/**
 * The authorization table: which role may do what, and how far it reaches.
 *
 * - `shop`: everything in the shop the person works for
 * - `client`: everything of the client the membership names
 * - `store`: the one store the membership names
 * - `platform`: the platform area, which holds no business data of any shop
 *
 * It is data, not code, so that a reviewer reads it in a minute; routes name a permission, and the
 * server refuses to start with a route that names none.
 */
export const roles = [
  'platform_admin',
  'shop_owner',
  'office',
  'tech',
  'client_owner',
  'attendant',
] as const;
export type Role = (typeof roles)[number];
export type Reach = 'shop' | 'client' | 'store' | 'platform';
type Grants = Partial<Record<Role, Reach>>;

const shopOwner = { shop_owner: 'shop' } as const;
const desk = { shop_owner: 'shop', office: 'shop' } as const;
const shop = { ...desk, tech: 'shop' } as const;
const owners = { ...desk, client_owner: 'client' } as const;
const everyone = { ...shop, client_owner: 'client', attendant: 'store' } as const;

export const permissions = {
  'settings.read': shop,
  'settings.change': shopOwner,
  'crew.read': shop,
  'crew.manage': shopOwner,
  'prices.read': shop,
  'prices.change': shopOwner,
  'parts.change': desk,
  'clients.read': everyone,
  'clients.change': desk,
  'contacts.read': { ...shop, client_owner: 'client' },
  'machines.read': everyone,
  'machines.change': shop,
  'imports.run': desk,
  'exports.read': desk,
  'calls.read': everyone,
  'calls.report': everyone,
  'calls.change': desk,
  'visits.read': everyone,
  'visits.plan': desk,
  'visits.record': shop,
  'rulings.read': desk,
  'rulings.decide': shopOwner,
  'tickets.read': owners,
  'tickets.sign_off': desk,
  'contracts.read': owners,
  'contracts.change': desk,
  'statements.read': owners,
  'statements.close': desk,
  'payments.read': owners,
  'payments.record': desk,
  'payments.pay': { client_owner: 'client' },
  'ledger.read': desk,
  'files.read': everyone,
  'files.add': everyone,
  'deliveries.read': desk,
  'deliveries.decide': desk,
  'subscription.read': desk,
  'subscription.change': shopOwner,
  'audit.read': shopOwner,
  'live.follow': everyone,
  'invitations.manage': desk,
  'platform.read': { platform_admin: 'platform' },
  'platform.change': { platform_admin: 'platform' },
} as const satisfies Record<string, Grants>;

export type Permission = keyof typeof permissions;

/** How far `role` reaches with `permission`, or undefined when it may not. */
export function reachOf(role: Role, permission: Permission): Reach | undefined {
  return (permissions[permission] as Grants)[role];
}

/** Every permission a role holds, in the order of the table. */
export function permissionsOf(role: Role): Permission[] {
  return (Object.keys(permissions) as Permission[]).filter((p) => reachOf(role, p) !== undefined);
}
