import { platformRow, platformRows } from '../../core/database/tenancy';
import { stripe } from '../../core/payments/stripe';
import { found } from '../../core/problems/problem';
import { callCardService } from '../payments/card-calls';
import { type PlanRow } from './subscription-row';

/** The plan's price at the card payment service, made when it is first paid for. */
export async function cardPriceOf(plan: PlanRow): Promise<string> {
  if (plan.card_price) return plan.card_price;
  const price = await callCardService(() =>
    stripe().prices.create(
      {
        currency: plan.currency.toLowerCase(),
        unit_amount: plan.monthly_amount,
        recurring: { interval: 'month' },
        nickname: plan.name,
        product_data: { name: `Tumblewright ${plan.name}` },
        metadata: { plan: plan.id },
      },
      { idempotencyKey: `plan-${plan.id}-${plan.currency}-${plan.monthly_amount}-${plan.name}` },
    ),
  );
  await platformRows(
    `update plans set card_price = $price
     where id = $id and card_price is null and monthly_amount = $amount and currency = $currency`,
    { id: plan.id, price: price.id, amount: plan.monthly_amount, currency: plan.currency },
  );
  return price.id;
}

/** The shop as a customer of the platform's own account; made once, whoever asks twice. */
export async function cardCustomerOf(
  shopId: string,
  known: string | null,
  email: string | undefined,
): Promise<string> {
  if (known) return known;
  const shop = found(
    await platformRow<{ name: string }>('select name from shops where id = $shopId', { shopId }),
  );
  const customer = await callCardService(() =>
    stripe().customers.create(
      { name: shop.name, email, metadata: { shop: shopId } },
      { idempotencyKey: `customer-${shopId}-${email}-${shop.name}` },
    ),
  );
  const [kept] = await platformRows<{ card_customer: string }>(
    `update subscriptions set card_customer = coalesce(card_customer, $customer)
     where shop_id = $shopId returning card_customer`,
    { shopId, customer: customer.id },
  );
  return found(kept).card_customer;
}
