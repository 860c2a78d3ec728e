import { tradeDayOf } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { withTenant, write } from '../../core/database/tenancy';
import { type InputOf } from '../../core/http/route';
import { invalid } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { type PaymentShown, readPayment } from './payment-rows';
import { lockStore, postPayment } from './post-payment';

/** Money that came by transfer, cheque or in cash, as the office writes it down. */
export function recordPayment(
  context: Context,
  body: InputOf<'payments.record'>['body'],
): Promise<PaymentShown> {
  return withTenant(context, async () => {
    const shop = await shopFacts(context);
    if (body.receivedOn > tradeDayOf(context.now, shop.zone)) {
      throw invalid([{ pointer: '/receivedOn', detail: 'is in the future' }]);
    }
    const { clientId } = await lockStore(context, body.storeId);
    const id = uuid();
    await write(
      `insert into payments (shop_id, id, client_id, store_id, method, state, amount, currency, words, asked_by)
       values ($shopId, $id, $clientId, $storeId, $method, 'asked', $amount, $currency, $words, $userId)`,
      {
        shopId: context.shopId,
        id,
        clientId,
        storeId: body.storeId,
        method: body.method,
        amount: body.amount,
        currency: shop.currency,
        words: body.words,
        userId: context.userId,
      },
    );
    await postPayment(context, {
      id,
      storeId: body.storeId,
      amount: body.amount,
      receivedOn: body.receivedOn,
    });
    await record(context, 'payment recorded', { kind: 'payment', id }, { method: body.method });
    return readPayment(context, id);
  });
}
