import { monthOf } from '@lib/domain';
import { type Context } from '../../core/context';
import { row, withTenant } from '../../core/database/tenancy';
import { found } from '../../core/problems/problem';
import { addEdition } from './add-edition';
import { firstBook } from './first-book';

/**
 * Gives a new shop a price book to start with, in its currency. Valid from the beginning of the
 * running month, so that visits of the last days can be entered too. A shop that has one keeps it.
 */
export function createFirstEdition(context: Context): Promise<void> {
  return withTenant(context, async () => {
    const bind = { shopId: context.shopId };
    const any = await row('select 1 from editions where shop_id = $shopId limit 1', bind);
    if (any) return;
    const shop = found(
      await row<{ zone: string; currency: string }>(
        'select zone, currency from shops where id = $shopId',
        bind,
      ),
    );
    await addEdition(context, {
      validFrom: `${monthOf(context.now, shop.zone)}-01`,
      note: 'To start with',
      book: firstBook(shop.currency),
    });
  });
}
