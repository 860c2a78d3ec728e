import { type InputOf, type AnswerOf } from '../../core/http/route';
import { v7 as uuid } from 'uuid';
import type Stripe from 'stripe';
import { config } from '../../core/config';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { stripe } from '../../core/payments/stripe';
import { found, invalid, problem } from '../../core/problems/problem';
import { shopFacts } from '../../core/shop-facts';
import { toPayInAll, toPayUpTo } from '../receivables/to-pay';
import { statementName } from '../statements/document-names';
import { callCardService } from './card-calls';
import { lockStore } from './post-payment';

type Body = InputOf<'payments.startCard'>['body'];

/** A payment that was asked for, with what the card payment service must be told of it. */
export interface AskedPayment {
  id: string;
  cardKey: string;
  amount: number;
  currency: string;
  cardAccount: string;
  /** What the card page calls it. */
  title: string;
}

/**
 * Begins a card payment: the row with our own key is committed before the card payment service is
 * called, so that whatever happens to the call, the same payment stays one payment.
 */
export async function startCardPayment(
  context: Context,
  body: Body,
): Promise<AnswerOf<'payments.startCard'>> {
  const asked = await withTenant(context, () => askPayment(context, body));
  const session = await callCardService(() => openSession(context, asked));
  if (!session.url) throw problem('conflict', 'This payment was made already.');
  await withTenant(context, () => noteSession(context, asked.id, session));
  return { paymentId: asked.id, url: session.url };
}

async function askPayment(context: Context, body: Body): Promise<AskedPayment> {
  const shop = await shopFacts(context);
  if (!shop.cardAccount) throw problem('conflict', 'The shop does not take cards.');
  const about = await whatIsPaid(context, body);
  const { clientId } = await lockStore(context, about.storeId);
  const toPay = about.statementId
    ? await toPayUpTo(context, about.storeId, about.dueOn, about.statementId)
    : await toPayInAll(context, about.storeId);
  if (toPay === 0) throw problem('conflict', 'There is nothing to pay.');
  const amount = body.amount ?? toPay;
  if (amount > toPay) throw invalid([{ pointer: '/amount', detail: 'is more than is to be paid' }]);
  const bind = {
    shopId: context.shopId,
    clientId,
    storeId: about.storeId,
    statementId: about.statementId,
    amount,
    currency: shop.currency,
    userId: context.userId,
  };
  const payment = (await openPayment(bind)) ?? (await newPayment(bind));
  return {
    id: payment.id,
    cardKey: payment.cardKey,
    amount,
    currency: shop.currency,
    cardAccount: shop.cardAccount,
    title: about.title,
  };
}

interface WhatIsPaid {
  storeId: string;
  statementId: string | null;
  dueOn: string;
  /** Of what never changes: under the same key, the card payment service takes only the same words. */
  title: string;
}

async function whatIsPaid(context: Context, body: Body): Promise<WhatIsPaid> {
  if (body.statementId !== undefined) {
    const statement = found(
      await row<{ storeId: string; dueOn: string; number: number; storeName: string }>(
        `select s.store_id as "storeId", s.due_on as "dueOn", s.number,
           s.snapshot -> 'store' ->> 'name' as "storeName"
         from statements s
         where s.shop_id = $shopId and s.id = $statementId`,
        { shopId: context.shopId, statementId: body.statementId },
      ),
    );
    return {
      storeId: statement.storeId,
      statementId: body.statementId,
      dueOn: statement.dueOn,
      title: `Statement ${statementName(statement.number)}, ${statement.storeName}`,
    };
  }
  const store = found(
    await row<{ id: string }>('select id from stores where shop_id = $shopId and id = $storeId', {
      shopId: context.shopId,
      storeId: body.storeId,
    }),
  );
  return { storeId: store.id, statementId: null, dueOn: '', title: 'Open balance' };
}

interface Key {
  id: string;
  cardKey: string;
}

/** The same payment asked for again within the life of its card page. */
function openPayment(bind: Record<string, unknown>): Promise<Key | undefined> {
  return row<Key>(
    `select id, card_key as "cardKey" from payments
     where shop_id = $shopId and store_id = $storeId and state in ('asked', 'failed') and method = 'card'
       and statement_id is not distinct from $statementId::uuid and amount = $amount
       and created_at > now() - interval '23 hours'
     order by created_at desc limit 1`,
    bind,
  );
}

async function newPayment(bind: Record<string, unknown>): Promise<Key> {
  const id = uuid();
  const cardKey = `payment-${id}`;
  await write(
    `insert into payments (shop_id, id, client_id, store_id, method, state, amount, currency,
       statement_id, card_key, asked_by)
     values ($shopId, $id, $clientId, $storeId, 'card', 'asked', $amount, $currency, $statementId,
       $cardKey, $userId)`,
    { ...bind, id, cardKey },
  );
  return { id, cardKey };
}

/** Asked again with the same key, the card payment service answers with the same session. */
function openSession(
  context: Pick<Context, 'shopId'>,
  asked: AskedPayment,
): Promise<Stripe.Checkout.Session> {
  const back = `${config().publicUrl}/client/payments/${asked.id}`;
  const metadata = { payment: asked.id, shop: context.shopId };
  return stripe().checkout.sessions.create(
    {
      mode: 'payment',
      client_reference_id: asked.id,
      line_items: [
        {
          quantity: 1,
          price_data: {
            currency: asked.currency.toLowerCase(),
            unit_amount: asked.amount,
            product_data: { name: asked.title },
          },
        },
      ],
      metadata,
      payment_intent_data: { metadata },
      success_url: back,
      cancel_url: `${back}?cancelled=1`,
    },
    { idempotencyKey: asked.cardKey, stripeAccount: asked.cardAccount },
  );
}

/** A payment that failed or was given up is taken up again: its page is being shown. */
function noteSession(
  context: Context,
  paymentId: string,
  session: Stripe.Checkout.Session,
): Promise<unknown> {
  return write(
    `update payments set card_session = $session,
       state = 'asked', problem = null
     where shop_id = $shopId and id = $paymentId and state <> 'succeeded'`,
    { shopId: context.shopId, paymentId, session: session.id },
  );
}
