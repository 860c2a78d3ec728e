import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';
import { stripe } from '../../core/payments/stripe';
import { shopFacts } from '../../core/shop-facts';
import { callCardService } from './card-calls';

type Connection = AnswerOf<'payments.connection'>;

export function showConnection(context: Context): Promise<Connection> {
  return withTenant(context, async () => {
    const { cardAccount } = await shopFacts(context);
    return { connected: cardAccount !== null, account: cardAccount };
  });
}

/** The shop's own account at the card payment service, where its clients' money goes; made once. */
export async function connectCardAccount(context: Context): Promise<Connection> {
  const before = await showConnection(context);
  if (before.connected) return before;
  const owner = await withTenant(context, () =>
    row<{ name: string; email: string | null }>(
      `select s.name, (select m.email from memberships m
         where m.shop_id = s.id and m.id = $membershipId) as email
       from shops s where s.id = $shopId`,
      { shopId: context.shopId, membershipId: context.membershipId },
    ),
  );
  const account = await callCardService(() =>
    stripe().accounts.create(
      {
        type: 'standard',
        email: owner?.email ?? undefined,
        business_profile: { name: owner?.name },
        metadata: { shop: context.shopId },
      },
      // Two who press the button at once get the same account.
      { idempotencyKey: `card-account-${context.shopId}` },
    ),
  );
  return withTenant(context, async () => {
    await write(
      'update shops set card_account = $account where id = $shopId and card_account is null',
      { shopId: context.shopId, account: account.id },
    );
    await record(context, 'card account connected', { kind: 'shop', id: context.shopId });
    return showConnection(context);
  });
}
