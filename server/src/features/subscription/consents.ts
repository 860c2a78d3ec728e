import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { instantOrNull } from '../../core/database/times';
import { row, rows, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { found } from '../../core/problems/problem';

type Consent = AnswerOf<'consents.give'>;

interface ConsentRow {
  id: string;
  given_by_name: string | null;
  until: Date;
  created_at: Date;
  withdrawn_at: Date | null;
}

const select = `select c.id, c.until, c.created_at, c.withdrawn_at,
  (select m.name from memberships m where m.shop_id = c.shop_id and m.user_id = c.given_by
   order by m.ended_at is null desc limit 1) as given_by_name
  from consents c where c.shop_id = $shopId`;

function present(consent: ConsentRow, now: Date): Consent {
  return {
    id: consent.id,
    givenByName: consent.given_by_name ?? '',
    until: consent.until.toISOString(),
    createdAt: consent.created_at.toISOString(),
    withdrawnAt: instantOrNull(consent.withdrawn_at),
    inForce: consent.withdrawn_at === null && consent.until > now,
  };
}

export function listConsents(context: Context): Promise<AnswerOf<'consents.list'>> {
  return withTenant(context, async () => {
    const consents = await rows<ConsentRow>(
      `${select} order by c.created_at desc, c.id desc limit 50`,
      { shopId: context.shopId },
    );
    return { items: consents.map((consent) => present(consent, context.now)) };
  });
}

/** Lets support in for some hours; it ends by itself. */
export function giveConsent(context: Context, hours: number): Promise<Consent> {
  return withTenant(context, async () => {
    const id = uuid();
    await write(
      `insert into consents (shop_id, id, given_by, until, created_at)
       values ($shopId, $id, $userId, $now::timestamptz + make_interval(hours => $hours), $now)`,
      { shopId: context.shopId, id, userId: context.userId, hours, now: context.now },
    );
    await record(context, 'support let in', { kind: 'consent', id }, { hours });
    return showConsent(context, id);
  });
}

export function withdrawConsent(context: Context, consentId: string): Promise<Consent> {
  return withTenant(context, async () => {
    const [withdrawn] = await write(
      `update consents set withdrawn_at = $now
       where shop_id = $shopId and id = $consentId and withdrawn_at is null returning id`,
      { shopId: context.shopId, consentId, now: context.now },
    );
    if (withdrawn) {
      await record(context, 'support kept out', { kind: 'consent', id: consentId });
    }
    return showConsent(context, consentId);
  });
}

async function showConsent(context: Context, id: string): Promise<Consent> {
  const consent = await row<ConsentRow>(`${select} and c.id = $id`, {
    shopId: context.shopId,
    id,
  });
  return present(found(consent), context.now);
}
