import { permissionsOf } from '@lib/contracts';
import { mayWrite, type SubscriptionState } from '@lib/domain';
import { signAccessToken } from '../../core/auth/access-token';
import { config } from '../../core/config';
import { platformRow, platformRows } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { problem } from '../../core/problems/problem';
import { type Membership, membershipsOf } from './memberships-of';
import { personById } from './people';

export type SessionAnswer = AnswerOf<'session.signIn'>;

interface Session {
  id: string;
  user_id: string;
  membership_id: string | null;
}

/** What the browser learns of a session, with a fresh access token for it. */
export async function sessionAnswer(sessionId: string, now: Date): Promise<SessionAnswer> {
  const session = await platformRow<Session>(
    'select id, user_id, membership_id from sessions where id = $sessionId and ended_at is null',
    { sessionId },
  );
  const person = session && (await personById(session.user_id));
  if (!person) throw problem('not-signed-in');
  const memberships = await membershipsOf(person);
  const membership = await workingAs(session, memberships);
  const { token, expiresAt } = signAccessToken(
    {
      sub: person.id,
      sid: session.id,
      name: person.name,
      ...(membership && membership.shopId ? { mid: membership.id } : {}),
      ...(membership ? { role: membership.role } : {}),
      ...(membership?.shopId ? { shop: membership.shopId } : {}),
      ...(membership?.clientId ? { client: membership.clientId } : {}),
      ...(membership?.storeId ? { store: membership.storeId } : {}),
    },
    config().sessionSecret,
  );
  return {
    accessToken: token,
    expiresAt: expiresAt.toISOString(),
    person: {
      id: person.id,
      name: person.name,
      email: person.email,
      emailVerified: person.email_verified_at !== null,
    },
    membership,
    memberships,
    permissions: membership ? permissionsOf(membership.role) : [],
    shop: membership?.shopId ? await shopOf(membership.shopId, now) : null,
  };
}

/** The membership the device was on, or when that has ended the first other; noted for next time. */
async function workingAs(session: Session, memberships: Membership[]): Promise<Membership | null> {
  const wanted = session.membership_id;
  const same = memberships.find((m) =>
    wanted === null ? m.role === 'platform_admin' : m.id === wanted,
  );
  if (same) return same;
  const other = memberships[0] ?? null;
  if (other) await workAs(session.id, other);
  return other;
}

export async function workAs(sessionId: string, membership: Membership): Promise<void> {
  await platformRows(
    'update sessions set shop_id = $shopId, membership_id = $membershipId where id = $sessionId',
    {
      sessionId,
      shopId: membership.shopId,
      membershipId: membership.shopId ? membership.id : null,
    },
  );
}

async function shopOf(shopId: string, now: Date): Promise<SessionAnswer['shop']> {
  const shop = await platformRow<{
    name: string;
    currency: string;
    zone: string;
    locale: string;
    state: SubscriptionState;
    state_since: Date;
    grace_days: number;
  }>(
    `select s.name, s.currency, s.zone, s.locale, b.state, b.state_since, p.grace_days
     from shops s join subscriptions b on b.shop_id = s.id join plans p on p.id = b.plan_id
     where s.id = $shopId`,
    { shopId },
  );
  if (!shop) return null;
  return {
    name: shop.name,
    currency: shop.currency,
    zone: shop.zone,
    locale: shop.locale,
    subscriptionState: shop.state,
    mayWrite: mayWrite(shop.state, shop.state_since, now, shop.grace_days),
  };
}
