import { platformRows } from '../../server/src/core/database/tenancy';
import { type TestShop } from './factories';

/** Narrows the plan that `buildShop` made for this shop alone. */
export async function limitPlan(
  shop: TestShop,
  limits: { store_limit?: number; machine_limit?: number; crew_limit?: number },
): Promise<void> {
  for (const [column, limit] of Object.entries(limits)) {
    await platformRows(
      `update plans set ${column} = $limit
       where id = (select plan_id from subscriptions where shop_id = $shopId)`,
      { shopId: shop.id, limit },
    );
  }
}

/** Pauses the shop, as the platform area does. */
export async function pauseShop(shop: TestShop): Promise<void> {
  await platformRows("update subscriptions set state = 'paused' where shop_id = $shopId", {
    shopId: shop.id,
  });
}
