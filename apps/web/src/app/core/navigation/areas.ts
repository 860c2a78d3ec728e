import { type Role } from '@lib/contracts/web';
import { type Copy } from '@lib/ui/tokens/tokens';

export interface Area {
  readonly name: string;
  readonly path: string;
  /** Whose copy of the ticket it is. */
  readonly copy: Copy;
}

export const areas = {
  shop: { name: 'Shop', path: '/shop', copy: 'white' },
  field: { name: 'Field', path: '/field', copy: 'canary' },
  client: { name: 'Client', path: '/client', copy: 'rose' },
  platform: { name: 'Platform', path: '/platform', copy: 'stub' },
} as const satisfies Record<string, Area>;

const homes: Record<Role, Area> = {
  shop_owner: areas.shop,
  office: areas.shop,
  tech: areas.field,
  client_owner: areas.client,
  attendant: areas.client,
  platform_admin: areas.platform,
};

export function areaOf(role: Role): Area {
  return homes[role];
}

export function homeOf(role: Role): string {
  return homes[role].path;
}

/** Only addresses inside this application; anything else could lead a person away after sign-in. */
export function safeNext(next: string | null | undefined): string | undefined {
  return next && /^\/(?![/\\])/.test(next) && !next.startsWith('/sign-in') ? next : undefined;
}
