import { type PlatformContext } from '../../core/context';
import { type Bind, platformRow, platformRows } from '../../core/database/tenancy';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { platformPage, searched } from '../../core/lists/keyset';
import { found } from '../../core/problems/problem';
import {
  type EventRow,
  newestEvents,
  planColumns,
  type PlanRow,
  presentEvent,
  presentPlan,
  presentStanding,
  presentUsage,
  subscriptionColumns,
  type SubscriptionRow,
} from '../subscription/subscription-row';

type ShopItem = AnswerOf<'platform.shops'>['items'][number];
type ShopPage = AnswerOf<'platform.shop'>;

interface ShopRow extends Omit<ShopItem, 'stateSince' | 'createdAt'> {
  stateSince: Date;
  createdAt: Date;
}

const select = `select s.id, s.name, s.zone, s.currency, b.plan_id as "planId", p.name as "planName",
  b.state, b.state_since as "stateSince", coalesce(u.stores, 0) as stores,
  coalesce(u.machines, 0) as machines, coalesce(u.crew, 0) as crew, s.created_at as "createdAt"
  from shops s join subscriptions b on b.shop_id = s.id join plans p on p.id = b.plan_id
  left join shop_usage u on u.shop_id = s.id`;

function present(shop: ShopRow): ShopItem {
  return {
    id: shop.id,
    name: shop.name,
    zone: shop.zone,
    currency: shop.currency,
    planId: shop.planId,
    planName: shop.planName,
    state: shop.state,
    stateSince: shop.stateSince.toISOString(),
    stores: shop.stores,
    machines: shop.machines,
    crew: shop.crew,
    createdAt: shop.createdAt.toISOString(),
  };
}

export function listShops(
  query: InputOf<'platform.shops'>['query'],
): Promise<AnswerOf<'platform.shops'>> {
  const bind: Bind = {};
  const where = ['true', ...searched(query.q, ['s.name'], bind)];
  if (query.state) {
    where.push('b.state = $state');
    bind.state = query.state;
  }
  if (query.planId) {
    where.push('b.plan_id = $planId');
    bind.planId = query.planId;
  }
  return platformPage<ShopRow, ShopItem>(
    {
      select,
      from: 'shops s join subscriptions b on b.shop_id = s.id',
      where,
      bind,
      sort:
        query.sort === 'name'
          ? { column: 's.name', type: 'text' }
          : { column: 's.created_at', type: 'timestamptz', descending: true },
      id: 's.id',
      limit: query.limit,
      cursor: query.cursor,
    },
    present,
  );
}

export async function showShop(
  context: Pick<PlatformContext, 'now'>,
  shopId: string,
): Promise<ShopPage> {
  const bind = { shopId };
  const shop = found(await platformRow<ShopRow>(`${select} where s.id = $shopId`, bind));
  const [subscription, plan, events, owners, consent] = await Promise.all([
    platformRow<SubscriptionRow>(
      `select ${subscriptionColumns} from subscriptions b where b.shop_id = $shopId`,
      bind,
    ),
    platformRow<PlanRow>(`select ${planColumns} from plans p where p.id = $planId`, {
      planId: shop.planId,
    }),
    platformRows<EventRow>(newestEvents, bind),
    platformRows<{ name: string; email: string }>(
      `select name, email from memberships
       where shop_id = $shopId and role = 'shop_owner' and ended_at is null order by created_at`,
      bind,
    ),
    platformRow<{ until: Date | null }>(
      `select max(until) as until from consents
       where shop_id = $shopId and withdrawn_at is null and until > $now`,
      { ...bind, now: context.now },
    ),
  ]);
  const standing = presentStanding(found(subscription), found(plan), context.now);
  return {
    ...present(shop),
    ...standing,
    plan: presentPlan(found(plan)),
    usage: presentUsage(found(plan), shop),
    events: events.map(presentEvent),
    owners,
    consentUntil: instantOrNull(consent?.until ?? null),
    version: found(subscription).version,
  };
}
