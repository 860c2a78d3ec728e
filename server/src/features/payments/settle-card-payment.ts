import { tradeDayOf } from '@lib/domain';
import type Stripe from 'stripe';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { announce } from '../../core/live/live';
import { stripe } from '../../core/payments/stripe';
import { postPayment } from './post-payment';
import { postRefund } from './post-refund';

interface CardPayment {
  id: string;
  clientId: string;
  storeId: string;
  state: 'asked' | 'succeeded' | 'failed' | 'expired';
  session: string | null;
  cardAccount: string | null;
  createdAt: Date;
  zone: string;
}

/** What went back to the payer: a refund, or a dispute that was lost. */
interface GoneBack {
  id: string;
  amount: number;
  created: number;
  words: string;
}

/** How the card payment service names the payment an event is about. */
export type CardPaymentKey = { id: string } | { intent: string } | { session: string };

const keyColumns = { id: 'id', intent: 'card_intent', session: 'card_session' } as const;
/** A payer who never got the address of the card page cannot have paid. */
const unseenMinutes = 60;

/**
 * Brings a card payment to what the card payment service says of it now. Whoever asks (an event, the
 * payer's page, the sweep), the object is read again, so that order and repeats do not matter.
 *
 * @returns whether there is such a payment in the shop
 */
export async function settleCardPayment(context: Context, key: CardPaymentKey): Promise<boolean> {
  const payment = await withTenant(context, () => findPayment(context, key));
  if (!payment) return false;
  if (!payment.session || !payment.cardAccount) {
    await withTenant(context, () => giveUpUnseen(context, payment));
    return true;
  }
  const account = { stripeAccount: payment.cardAccount };
  const session = await stripe().checkout.sessions.retrieve(
    payment.session,
    { expand: ['payment_intent.latest_charge'] },
    account,
  );
  const intent = session.payment_intent as Stripe.PaymentIntent | null;
  const back = intent?.status === 'succeeded' ? await goneBack(intent.id, account) : [];
  await withTenant(context, () => bringUpToDate(context, payment, session, intent, back));
  return true;
}

function findPayment(context: Context, key: CardPaymentKey): Promise<CardPayment | undefined> {
  const [name, value] = Object.entries(key)[0] as [keyof typeof keyColumns, string];
  return row<CardPayment>(
    `select p.id, p.client_id as "clientId", p.store_id as "storeId", p.state,
       p.card_session as session, h.card_account as "cardAccount", p.created_at as "createdAt",
       h.zone
     from payments p join shops h on h.id = p.shop_id
     where p.shop_id = $shopId and p.method = 'card' and p.${keyColumns[name]} = $value
     limit 1`,
    { shopId: context.shopId, value },
  );
}

async function giveUpUnseen(context: Context, payment: CardPayment): Promise<void> {
  const old = payment.createdAt.getTime() < context.now.getTime() - unseenMinutes * 60_000;
  if (old && payment.state === 'asked') await end(context, payment, 'expired', null);
  else await noteChecked(context, payment.id);
}

async function goneBack(intent: string, account: Stripe.RequestOptions): Promise<GoneBack[]> {
  const refunds = await stripe().refunds.list({ payment_intent: intent, limit: 100 }, account);
  return refunds.data
    .filter((refund) => refund.status === 'succeeded')
    .map(({ id, amount, created }) => ({ id, amount, created, words: 'Given back to the card' }));
}

async function bringUpToDate(
  context: Context,
  payment: CardPayment,
  session: Stripe.Checkout.Session,
  intent: Stripe.PaymentIntent | null,
  back: GoneBack[],
): Promise<void> {
  if (intent?.status === 'succeeded' && intent.amount_received > 0) {
    await postPayment(context, {
      id: payment.id,
      storeId: payment.storeId,
      amount: intent.amount_received,
      receivedOn: tradeDayOf(paidAt(intent), payment.zone),
      intent: intent.id,
    });
    for (const refund of back) await giveBack(context, payment, refund);
    return;
  }
  if (payment.state === 'succeeded') return;
  if (session.status === 'expired') return end(context, payment, 'expired', null);
  const refusal = intent?.last_payment_error?.message;
  if (refusal) return end(context, payment, 'failed', refusal);
  await noteChecked(context, payment.id);
}

/** When the card was charged: the word of it may come days later. */
function paidAt(intent: Stripe.PaymentIntent): Date {
  const charge = intent.latest_charge;
  const seconds = charge !== null && typeof charge === 'object' ? charge.created : intent.created;
  return new Date(seconds * 1000);
}

async function giveBack(
  context: Context,
  payment: { id: string; storeId: string; zone: string },
  back: GoneBack,
): Promise<void> {
  await postRefund(context, {
    paymentId: payment.id,
    storeId: payment.storeId,
    amount: back.amount,
    refundedOn: tradeDayOf(new Date(back.created * 1000), payment.zone),
    words: back.words,
    cardRefund: back.id,
  });
}

/** A declined card may be followed by another on the same page: a failed payment can still succeed. */
async function end(
  context: Context,
  payment: CardPayment,
  state: 'failed' | 'expired',
  words: string | null,
): Promise<void> {
  await write(
    `update payments set state = $state, problem = $words, checked_at = now()
     where shop_id = $shopId and id = $id and state <> 'succeeded'`,
    { shopId: context.shopId, id: payment.id, state, words },
  );
  await announce(context, 'payment', payment.id, payment.clientId);
}

function noteChecked(context: Context, id: string): Promise<unknown> {
  return write('update payments set checked_at = now() where shop_id = $shopId and id = $id', {
    shopId: context.shopId,
    id,
  });
}

/** A dispute that is open is shown on the payment; one that is lost takes the money back. */
export async function noteDispute(
  context: Context,
  dispute: { id: string; intent: string; amount: number; created: number; status: string },
): Promise<boolean> {
  return withTenant(context, async () => {
    const payment = await findPayment(context, { intent: dispute.intent });
    if (!payment) return false;
    if (dispute.status === 'lost') {
      await giveBack(context, payment, { ...dispute, words: 'Taken back after a dispute' });
    }
    const words: Record<string, string | null> = {
      lost: 'The payer disputed this payment and the card service gave the money back.',
      won: null,
      warning_closed: null,
    };
    const problem =
      dispute.status in words
        ? (words[dispute.status] ?? null)
        : 'The payer disputes this payment: answer at the card payment service.';
    await write('update payments set problem = $problem where shop_id = $shopId and id = $id', {
      shopId: context.shopId,
      id: payment.id,
      problem,
    });
    await announce(context, 'payment', payment.id, payment.clientId);
    return true;
  });
}
