import { systemContext } from '../core/context';
import { withTenant, write } from '../core/database/tenancy';

/** Sets back what the database's own clock wrote: lists are ordered by it. */
export async function setClocksBack(shopId: string): Promise<void> {
  await withTenant(systemContext(shopId, new Date()), async () => {
    await write(
      `update payments set created_at = received_on::timestamp + interval '11 hours'
       where shop_id = $shopId and received_on is not null`,
      { shopId },
    );
  });
}
