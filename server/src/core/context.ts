import { type Role } from '@lib/contracts';

/** Of a request nobody has signed in for. */
export interface PublicContext {
  requestId: string;
  now: Date;
  /** Where the request came from, for rate limits and sign-in failures. */
  source: string;
  /** What the browser says it is, shortened; shown to people in their list of devices. */
  device: string;
}

/** Of a person who signed in, whatever they work as. */
export interface SignedInContext extends PublicContext {
  userId: string;
  sessionId: string;
  name: string;
  membershipId: string | null;
  role: Role | null;
}

/** What a use case is given: who acts, in which shop, and how far they reach there. */
export interface Context {
  requestId: string;
  now: Date;
  shopId: string;
  userId: string | null;
  membershipId: string | null;
  name: string;
  role: Role | 'system';
  /** Set for people of a client laundry: they see this client's rows only. */
  clientId: string | null;
  /** Set for an attendant: they see this store's rows only. */
  storeId: string | null;
}

/** Of a platform admin: no shop, and no way to one. */
export interface PlatformContext extends SignedInContext {
  platform: true;
}

/** For jobs and schedules: the shop itself acts. */
export function systemContext(shopId: string, now: Date, requestId = 'system'): Context {
  return {
    requestId,
    now,
    shopId,
    userId: null,
    membershipId: null,
    name: 'Tumblewright',
    role: 'system',
    clientId: null,
    storeId: null,
  };
}
