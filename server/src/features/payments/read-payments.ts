import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
import { ownClient } from '../stores/own-store';
import {
  paymentColumns,
  paymentFrom,
  type PaymentItem,
  type PaymentRow,
  type PaymentShown,
  presentPayment,
  readPayment,
} from './payment-rows';

export function listPayments(
  context: Context,
  query: InputOf<'payments.list'>['query'],
): Promise<AnswerOf<'payments.list'>> {
  return withTenant(context, () => {
    const bind: Bind = { shopId: context.shopId };
    const where = [
      'p.shop_id = $shopId',
      ...ownClient(context, 'p.client_id', bind),
      ...searched(query.q, ['s.name', 'c.name'], bind),
    ];
    const filter = (value: string | undefined, name: string, condition: string) => {
      if (value === undefined) return;
      bind[name] = value;
      where.push(condition);
    };
    filter(query.clientId, 'clientId', 'p.client_id = $clientId');
    filter(query.storeId, 'storeId', 'p.store_id = $storeId');
    filter(
      query.statementId,
      'statementId',
      `p.id in (select id from payments where shop_id = $shopId and statement_id = $statementId
         union select payment_id from allocations
         where shop_id = $shopId and statement_id = $statementId)`,
    );
    filter(query.method, 'method', 'p.method = $method');
    filter(query.state, 'state', 'p.state = $state');
    return page<PaymentRow, PaymentItem>(
      {
        select: `select ${paymentColumns} from ${paymentFrom}`,
        from: paymentFrom,
        where,
        bind,
        sort: { column: 'p.created_at', type: 'timestamptz', descending: true },
        id: 'p.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      presentPayment,
    );
  });
}

export function showPayment(context: Context, paymentId: string): Promise<PaymentShown> {
  return withTenant(context, () => readPayment(context, paymentId));
}
