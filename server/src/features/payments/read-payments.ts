import { type Context } from '../../core/context';
import { type Bind, withTenant } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { page, searched } from '../../core/lists/keyset';
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
    const where = ['p.shop_id = $shopId', ...searched(query.q, ['s.name', 'c.name'], bind)];
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
      `(p.statement_id = $statementId or exists (select 1 from allocations a
         where a.shop_id = p.shop_id and a.payment_id = p.id and a.statement_id = $statementId))`,
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
