import { systemContext } from '../core/context';
import { withTenant, write } from '../core/database/tenancy';

/** Sets back what the database's own clock wrote: lists are ordered by it. */
export async function setClocksBack(shopId: string): Promise<void> {
  await withTenant(systemContext(shopId, new Date()), async () => {
    const bind = { shopId };
    await write(
      `update visits v set created_at = (v.planned_on - 1)::timestamp + interval '16 hours'
       where shop_id = $shopId and round_id is null`,
      bind,
    );
    await write(
      `update payments set created_at = received_on::timestamp + interval '11 hours'
       where shop_id = $shopId and received_on is not null`,
      bind,
    );
  });
}
