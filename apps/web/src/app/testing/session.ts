import { type SessionAnswer } from '../core/session/snapshot';

const memberships: SessionAnswer['memberships'] = [
  {
    id: 'm1',
    role: 'tech',
    shopId: 's1',
    shopName: 'Thornbury Appliance Works',
    clientId: null,
    clientName: null,
    storeId: null,
  },
  {
    id: 'm2',
    role: 'client_owner',
    shopId: 's1',
    shopName: 'Thornbury Appliance Works',
    clientId: 'c1',
    clientName: 'Alder & Finch Laundries',
    storeId: null,
  },
];

/** A session as the server answers it, for specs. */
export function anAnswer(change: Partial<SessionAnswer> = {}): SessionAnswer {
  return {
    accessToken: 'token-1',
    expiresAt: '2031-05-06T10:15:00Z',
    person: { id: 'p1', name: 'Imre Valdo', email: 'imre@example.com', emailVerified: true },
    membership: memberships[0] ?? null,
    memberships,
    permissions: ['visits.read', 'calls.read'],
    shop: {
      name: 'Thornbury Appliance Works',
      currency: 'GBP',
      zone: 'Europe/London',
      locale: 'en-GB',
      subscriptionState: 'active',
      mayWrite: true,
    },
    ...change,
  };
}

/** Lets everything that waits for a promise go on. */
export function settled(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve));
}
