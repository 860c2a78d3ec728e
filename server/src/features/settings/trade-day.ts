import { tradeDayOf } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, withTenant } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';

/** What day it is for the shop: its own clock decides, not the server's. */
export async function tradeDayNow(context: Context): Promise<string> {
  const shop = await withTenant(context, () =>
    row<{ zone: string }>('select zone from shops where id = $shopId', {
      shopId: context.shopId,
    }),
  );
  return tradeDayOf(context.now, found(shop).zone);
}
