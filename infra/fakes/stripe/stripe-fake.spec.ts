import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Stripe from 'stripe';
import { startStripeFake, type StripeFake } from './stripe-fake';

const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-stripe-'));
const dataFile = path.join(folder, 'stripe.jsonl');
let fake: StripeFake;
let stripe: Stripe;

function sdk(of: StripeFake): Stripe {
  return new Stripe('sk_test_fake', {
    host: '127.0.0.1',
    port: of.port,
    protocol: 'http',
    telemetry: false,
    maxNetworkRetries: 0,
  });
}

beforeAll(async () => {
  fake = await startStripeFake({ dataFile });
  stripe = sdk(fake);
});
afterAll(async () => {
  await fake.close();
  rmSync(folder, { recursive: true, force: true });
});

async function connected(): Promise<Stripe.RequestOptions> {
  const account = await stripe.accounts.create({ country: 'US', email: 'shop@shop.example' });
  return { stripeAccount: account.id };
}

async function pay(session: Stripe.Checkout.Session, number: string): Promise<Response> {
  const form = { number, expiry: '12 / 34', cvc: '123', name: 'Ada', email: 'ada@client.example' };
  return fetch(session.url ?? '', {
    method: 'POST',
    body: new URLSearchParams(form),
    redirect: 'manual',
  });
}

function session(on: Stripe.RequestOptions, amount = 12_345) {
  return stripe.checkout.sessions.create(
    {
      mode: 'payment',
      line_items: [
        {
          quantity: 1,
          price_data: {
            currency: 'usd',
            unit_amount: amount,
            product_data: { name: 'Statement 7' },
          },
        },
      ],
      payment_intent_data: { metadata: { statement: 's7' } },
      metadata: { statement: 's7' },
      success_url: 'https://web.example/paid?s={CHECKOUT_SESSION_ID}',
      cancel_url: 'https://web.example/statement',
    },
    on,
  );
}

describe('payment intents', () => {
  it('succeed and fail by the card, on the account they were asked for', async () => {
    const on = await connected();
    const intent = await stripe.paymentIntents.create(
      { amount: 5_000, currency: 'usd', metadata: { statement: 's1' } },
      on,
    );
    expect(intent.status).toBe('requires_payment_method');
    const paid = await stripe.paymentIntents.confirm(
      intent.id,
      { payment_method: 'pm_card_visa', expand: ['latest_charge.balance_transaction'] },
      on,
    );
    expect(paid).toMatchObject({
      status: 'succeeded',
      amount_received: 5_000,
      metadata: { statement: 's1' },
      latest_charge: { paid: true, balance_transaction: { amount: 5_000, fee: 175, net: 4_825 } },
    });
    expect(JSON.stringify(paid)).not.toContain('_refusal');

    await expect(stripe.paymentIntents.retrieve(intent.id)).rejects.toMatchObject({
      statusCode: 404,
      code: 'resource_missing',
    });
    await expect(
      stripe.paymentIntents.create(
        {
          amount: 700,
          currency: 'usd',
          confirm: true,
          payment_method: 'pm_card_chargeDeclinedInsufficientFunds',
        },
        on,
      ),
    ).rejects.toMatchObject({
      type: 'StripeCardError',
      statusCode: 402,
      decline_code: 'insufficient_funds',
      payment_intent: { status: 'requires_payment_method' },
    });
    await expect(
      stripe.paymentIntents.create({ amount: 49, currency: 'usd' }, on),
    ).rejects.toMatchObject({ code: 'amount_too_small' });
    await expect(
      stripe.paymentIntents.list({}, { stripeAccount: 'acct_unknown' }),
    ).rejects.toMatchObject({ statusCode: 403 });
  });

  it('list newest first, page by page', async () => {
    const on = await connected();
    for (const amount of [100, 200, 300]) {
      await stripe.paymentIntents.create({ amount, currency: 'usd' }, on);
    }
    const amounts: number[] = [];
    for await (const intent of stripe.paymentIntents.list({ limit: 2 }, on)) {
      amounts.push(intent.amount);
    }
    expect(amounts).toEqual([300, 200, 100]);
    const future = Math.floor(Date.now() / 1000) + 100;
    const none = await stripe.paymentIntents.list({ created: { gte: future } }, on);
    expect(none.data).toEqual([]);
  });

  it('are refunded in parts, never beyond what was paid', async () => {
    const on = await connected();
    const intent = await stripe.paymentIntents.create(
      { amount: 1_000, currency: 'usd', confirm: true, payment_method: 'pm_card_visa' },
      on,
    );
    const first = await stripe.refunds.create({ payment_intent: intent.id, amount: 400 }, on);
    expect(first).toMatchObject({ status: 'succeeded', amount: 400 });
    await expect(
      stripe.refunds.create({ payment_intent: intent.id, amount: 601 }, on),
    ).rejects.toMatchObject({ statusCode: 400 });
    await stripe.refunds.create({ payment_intent: intent.id }, on);
    const charge = await stripe.charges.retrieve(String(intent.latest_charge), {}, on);
    expect(charge).toMatchObject({ amount_refunded: 1_000, refunded: true });
    await expect(stripe.refunds.create({ payment_intent: intent.id }, on)).rejects.toMatchObject({
      code: 'charge_already_refunded',
    });
  });
});

describe('idempotency keys', () => {
  it('answer a repeat with the first answer and refuse another request', async () => {
    const on = { ...(await connected()), idempotencyKey: 'pay-1' };
    const first = await stripe.paymentIntents.create({ amount: 800, currency: 'usd' }, on);
    const again = await stripe.paymentIntents.create({ amount: 800, currency: 'usd' }, on);
    expect(again.id).toBe(first.id);
    expect(again.lastResponse.headers['idempotent-replayed']).toBe('true');
    await expect(
      stripe.paymentIntents.create({ amount: 801, currency: 'usd' }, on),
    ).rejects.toMatchObject({ statusCode: 400, type: 'StripeIdempotencyError' });
  });

  it('make a retry after a lost answer harmless, also after a restart', async () => {
    const on = { ...(await connected()), idempotencyKey: 'pay-2' };
    const wanted = {
      amount: 900,
      currency: 'usd',
      confirm: true,
      payment_method: 'pm_card_visa',
    };
    // The SDK itself tries once more when a kept connection breaks.
    fake.setRequestMode('drop-after', 2, '/v1/payment_intents');
    await expect(stripe.paymentIntents.create(wanted, on)).rejects.toMatchObject({
      type: 'StripeConnectionError',
    });
    await fake.close();
    fake = await startStripeFake({ dataFile });
    stripe = sdk(fake);
    await stripe.paymentIntents.create(wanted, on);
    const all = await stripe.paymentIntents.list({}, { stripeAccount: on.stripeAccount });
    expect(all.data.map((intent) => intent.status)).toEqual(['succeeded']);
  });

  it('are free again when the request was refused before anything began', async () => {
    const on = { ...(await connected()), idempotencyKey: 'pay-3' };
    await expect(
      stripe.paymentIntents.create({ amount: 1, currency: 'usd' }, on),
    ).rejects.toMatchObject({ code: 'amount_too_small' });
    const fixed = await stripe.paymentIntents.create({ amount: 100, currency: 'usd' }, on);
    expect(fixed.amount).toBe(100);
  });
});

describe('checkout', () => {
  it('shows its card page, declines and then charges once', async () => {
    const on = await connected();
    const open = await session(on);
    expect(open).toMatchObject({ status: 'open', payment_status: 'unpaid', amount_total: 12_345 });
    const shown = await (await fetch(open.url ?? '')).text();
    expect(shown).toContain('$123.45');
    expect(shown).toContain('local fake of Stripe');

    const declined = await pay(open, '4000 0000 0000 0002');
    expect(declined.status).toBe(402);
    expect(await declined.text()).toContain('Your card was declined.');
    expect(await (await pay(open, '4111 1111 1111 1112')).text()).toContain('test cards only');

    const done = await pay(open, '4242 4242 4242 4242');
    expect(done.status).toBe(303);
    expect(done.headers.get('location')).toBe(`https://web.example/paid?s=${open.id}`);
    expect((await pay(open, '4242424242424242')).status).toBe(303);

    const after = await stripe.checkout.sessions.retrieve(
      open.id,
      { expand: ['payment_intent', 'line_items'] },
      on,
    );
    expect(after).toMatchObject({
      status: 'complete',
      payment_status: 'paid',
      url: null,
      payment_intent: { status: 'succeeded', metadata: { statement: 's7' } },
      line_items: { data: [{ description: 'Statement 7' }] },
    });
    const charges = await stripe.charges.list({}, on);
    expect(charges.data.map((charge) => charge.status)).toEqual(['succeeded', 'failed']);
    const types = (await stripe.events.list({}, on)).data.map((event) => event.type).reverse();
    expect(types).toEqual([
      'product.created',
      'payment_intent.created',
      'charge.failed',
      'payment_intent.payment_failed',
      'charge.succeeded',
      'payment_intent.succeeded',
      'checkout.session.completed',
    ]);
  });

  it('can be ended before it is paid', async () => {
    const on = await connected();
    const open = await session(on);
    expect((await stripe.checkout.sessions.expire(open.id, {}, on)).status).toBe('expired');
    expect((await pay(open, '4242424242424242')).status).toBe(410);
    await expect(stripe.checkout.sessions.expire(open.id, {}, on)).rejects.toMatchObject({
      statusCode: 400,
    });
    const { data } = await stripe.paymentIntents.list({}, on);
    expect(data).toEqual([]);
  });
});

describe('subscriptions', () => {
  async function priced(): Promise<{ customer: string; price: string }> {
    const product = await stripe.products.create({ name: 'Plan' });
    const price = await stripe.prices.create({
      product: product.id,
      currency: 'usd',
      unit_amount: 4_900,
      recurring: { interval: 'month' },
    });
    const customer = await stripe.customers.create({ email: 'owner@shop.example' });
    return { customer: customer.id, price: price.id };
  }
  const advance = async (id: string): Promise<void> => {
    await fetch(`${fake.url}/fake/subscriptions/${id}/advance`, { method: 'POST' });
  };

  it('go from trial to active, past due, and back when the invoice is paid', async () => {
    const { customer, price } = await priced();
    const trial = await stripe.subscriptions.create({
      customer,
      items: [{ price }],
      trial_period_days: 14,
    });
    expect(trial).toMatchObject({
      status: 'trialing',
      items: { data: [{ price: { id: price } }] },
    });

    const good = await stripe.paymentMethods.attach('pm_card_visa', { customer });
    await stripe.customers.update(customer, {
      invoice_settings: { default_payment_method: good.id },
    });
    await advance(trial.id);
    expect((await stripe.subscriptions.retrieve(trial.id)).status).toBe('active');

    const bad = await stripe.paymentMethods.attach('pm_card_chargeCustomerFail', { customer });
    await stripe.subscriptions.update(trial.id, { default_payment_method: bad.id });
    await advance(trial.id);
    const due = await stripe.subscriptions.retrieve(trial.id, { expand: ['latest_invoice'] });
    expect(due).toMatchObject({ status: 'past_due', latest_invoice: { status: 'open' } });

    const invoice = due.latest_invoice as Stripe.Invoice;
    await stripe.invoices.pay(invoice.id ?? '', { payment_method: good.id });
    expect((await stripe.subscriptions.retrieve(trial.id)).status).toBe('active');
    const invoices = await stripe.invoices.list({ subscription: trial.id });
    expect(invoices.data.map((one) => [one.status, one.total])).toEqual([
      ['paid', 4_900],
      ['paid', 4_900],
    ]);
  });

  it('pause, end at the period, and are canceled', async () => {
    const { customer, price } = await priced();
    const started = await stripe.subscriptions.create({
      customer,
      items: [{ price }],
      default_payment_method: 'pm_card_visa',
    });
    expect(started.status).toBe('active');
    const paused = await stripe.subscriptions.update(started.id, {
      pause_collection: { behavior: 'void' },
    });
    expect(paused.pause_collection).toMatchObject({ behavior: 'void' });
    const resumed = await stripe.subscriptions.update(started.id, { pause_collection: '' });
    expect(resumed.pause_collection).toBeNull();
    await stripe.subscriptions.update(started.id, { cancel_at_period_end: true });
    await advance(started.id);
    expect((await stripe.subscriptions.retrieve(started.id)).status).toBe('canceled');

    const other = await stripe.subscriptions.create({
      customer,
      items: [{ price }],
      default_payment_method: 'pm_card_visa',
    });
    expect((await stripe.subscriptions.cancel(other.id)).status).toBe('canceled');
    await expect(
      stripe.subscriptions.create({
        customer,
        items: [{ price }],
        default_payment_method: 'pm_card_chargeDeclined',
        payment_behavior: 'error_if_incomplete',
      }),
    ).rejects.toMatchObject({ type: 'StripeCardError' });
  });
});

describe('the service itself', () => {
  it('asks for a key, names what is missing, and forgets nothing it was told to record', async () => {
    expect((await fetch(`${fake.url}/v1/customers`)).status).toBe(401);
    const empty = {} as Stripe.PaymentIntentCreateParams;
    await expect(stripe.paymentIntents.create(empty)).rejects.toMatchObject({
      code: 'parameter_missing',
    });
    await expect(stripe.payouts.list()).rejects.toMatchObject({ statusCode: 404 });
    const seen = await (await fetch(`${fake.url}/fake/requests`)).json();
    expect(seen).toContainEqual(expect.objectContaining({ path: '/v1/payouts', status: 404 }));
    fake.setRequestMode('rate-limit', 1);
    await expect(stripe.customers.list()).rejects.toMatchObject({ statusCode: 429 });
  });
});
