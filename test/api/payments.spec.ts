import { type Server } from 'node:http';
import Stripe from 'stripe';
import request from 'supertest';
import { type StripeFake, startStripeFake } from '../../infra/fakes/stripe/stripe-fake';
import { anyPort } from '../../infra/process/ports';
import { systemContext } from '../../server/src/core/context';
import { platformRows, rows } from '../../server/src/core/database/tenancy';
import { sweepPayments } from '../../server/src/features/payments/sweep-payments';
import { sweepStripeEvents } from '../../server/src/features/payments/work-stripe-event';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildPerson,
  buildShop,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import {
  bookTroubles,
  buildPayingStore,
  buildSignedOff,
  closedMonths,
  type MoneyStore,
  workClose,
} from '../support/money';
import { workQueue } from '../support/queue';

const secret = 'whsec_test_local';
const { last } = closedMonths();

describe('payments', () => {
  let server: TestServer;
  let fake: StripeFake;
  let listening: Server;
  let shop: TestShop;
  let owner: TestPerson;
  let office: TestPerson;
  let client: TestPerson;
  let store: MoneyStore;
  let statementId: string;
  beforeAll(async () => {
    const port = await anyPort();
    fake = await startStripeFake({
      webhookUrl: `http://127.0.0.1:${port}/api/stripe/webhook`,
      webhookSecret: secret,
    });
    server = await startTestServer({ STRIPE_API_BASE: fake.url, STRIPE_WEBHOOK_SECRET: secret });
    await new Promise<void>((resolve) => {
      listening = server.app.listen(port, '127.0.0.1', () => resolve());
    });
  });
  afterAll(async () => {
    await fake.close();
    listening.close();
    await server.close();
  });
  beforeEach(async () => {
    fake.setWebhookMode('normal');
    fake.setRequestMode('normal');
    shop = await buildShop();
    owner = await buildPerson(shop, 'shop_owner');
    office = await buildPerson(shop, 'office');
    store = await buildPayingStore(shop);
    client = await buildPerson(shop, 'client_owner', { clientId: store.clientId });
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 20_000, tax: 1_650 });
    const closed = await as(office).call('statements.close', { body: { month: last } });
    expect(closed.status).toBe(201);
    await workClose(server);
    const { body } = await as(client).call('statements.list');
    statementId = body.items[0].id as string;
    expect(await connect()).toMatchObject({ connected: true });
  });

  const as = (person: TestPerson) => api(server.app, person.token);
  const connect = async () => (await as(owner).call('payments.connect')).body;
  const balance = async () =>
    (await as(client).call('balances.list')).body.items[0].balance as number;
  const show = async (paymentId: string) =>
    (await as(client).call('payments.show', { params: { paymentId } })).body;

  async function start(body: Record<string, unknown> = { statementId }) {
    const answer = await as(client).call('payments.startCard', { body });
    expect(answer.status).toBe(201);
    return answer.body as { paymentId: string; url: string };
  }

  function enterCard(url: string, number = '4242 4242 4242 4242') {
    const form = {
      number,
      expiry: '12 / 34',
      cvc: '123',
      name: 'Ada Roe',
      email: 'ada@laundry.example',
    };
    return fetch(url, { method: 'POST', body: new URLSearchParams(form), redirect: 'manual' });
  }

  async function workEvents() {
    await fake.flushWebhooks();
    await workQueue(server, 'stripe-event');
  }

  it('lets a client pay a statement by card on the shop’s own account, to a balance of zero', async () => {
    expect(await balance()).toBe(21_650);
    const { paymentId, url } = await start();
    expect(await show(paymentId)).toMatchObject({ state: 'asked', amount: 21_650, number: null });
    const paid = await enterCard(url);
    expect(paid.status).toBe(303);
    expect(paid.headers.get('location')).toContain(`/client/payments/${paymentId}`);
    await workEvents();
    expect(await show(paymentId)).toMatchObject({
      state: 'succeeded',
      number: 1,
      balance: 0,
      credit: 0,
      allocations: [{ statementId, amount: 21_650 }],
    });
    expect(await balance()).toBe(0);
    const { body } = await as(client).call('statements.show', { params: { statementId } });
    expect(body).toMatchObject({ state: 'paid', open: 0, toPay: 0 });
    const nothing = await as(client).call('payments.startCard', { body: { statementId } });
    expect(nothing.status).toBe(409);
    const [account] = await platformRows<{ card_account: string }>(
      'select card_account from shops where id = $id',
      { id: shop.id },
    );
    const charged = fake.traffic.seen.filter((call) => call.path === '/v1/checkout/sessions');
    expect(charged.at(-1)).toMatchObject({
      account: account?.card_account,
      idempotencyKey: `payment-${paymentId}`,
    });
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('gives the same page to who asks twice, also when the first answer was lost', async () => {
    const first = await start();
    expect(await start()).toEqual(first);
    fake.setRequestMode('drop-after', 3, '/v1/checkout/sessions');
    const lost = await as(client).call('payments.startCard', {
      body: { storeId: store.storeId, amount: 5_000 },
    });
    expect(lost.status).toBe(502);
    expect(lost.body.type).toContain('card-payment-failed');
    const found = await start({ storeId: store.storeId, amount: 5_000 });
    const { body } = await as(client).call('payments.list');
    expect(body.items.map((p: { id: string }) => p.id).sort()).toEqual(
      [first.paymentId, found.paymentId].sort(),
    );
  });

  it('gives the same page also after the store was given another name', async () => {
    const first = await start();
    const whole = { storeId: store.storeId, amount: 5_000 };
    const second = await start(whole);
    await inShop(shop, () =>
      rows('update stores set name = $name where shop_id = $shopId and id = $storeId', {
        shopId: shop.id,
        storeId: store.storeId,
        name: 'Another name',
      }),
    );
    expect(await start()).toEqual(first);
    expect(await start(whole)).toEqual(second);
  });

  it.each(['twice', 'reversed'] as const)('posts once when events come %s', async (mode) => {
    fake.setWebhookMode(mode);
    const { paymentId, url } = await start();
    await enterCard(url);
    await workEvents();
    await workEvents();
    expect(await show(paymentId)).toMatchObject({ state: 'succeeded', balance: 0, number: 1 });
    const entries = await inShop(shop, () =>
      rows<{ n: number }>(
        `select count(*)::int as n from entries where shop_id = $shopId and document_kind = 'payment'`,
        { shopId: shop.id },
      ),
    );
    expect(entries[0]?.n).toBe(2);
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('believes no event with a wrong, missing or old signature', async () => {
    fake.setWebhookMode('badsignature');
    const { paymentId, url } = await start();
    await enterCard(url);
    await workEvents();
    expect(await show(paymentId)).toMatchObject({ state: 'asked', balance: 21_650 });
    const payload = JSON.stringify({
      id: 'evt_x',
      object: 'event',
      type: 'x',
      data: { object: {} },
    });
    const send = (signature?: string) => {
      const sent = request(server.app).post('/api/stripe/webhook').type('application/json');
      return (signature ? sent.set('Stripe-Signature', signature) : sent).send(payload);
    };
    const signer = new Stripe('sk_test_x').webhooks;
    const sign = (timestamp: number, key = secret) =>
      signer.generateTestHeaderString({ payload, secret: key, timestamp });
    const now = Math.floor(Date.now() / 1000);
    expect((await send()).status).toBe(400);
    expect((await send(sign(now, 'whsec_other'))).status).toBe(400);
    expect((await send(sign(now - 301))).status).toBe(400);
    expect((await send(sign(now))).status).toBe(200);
    expect((await send(sign(now))).status).toBe(200);
    const stored = await platformRows(`select 1 from stripe_events where id = 'evt_x'`);
    expect(stored).toHaveLength(1);
  });

  it('finds a payment whose event never came by its sweep', async () => {
    fake.setWebhookMode('hold');
    const { paymentId, url } = await start();
    await enterCard(url);
    await sweepPayments(systemContext(shop.id, new Date()), server.log);
    expect(await show(paymentId)).toMatchObject({ state: 'asked' });
    await sweepPayments(systemContext(shop.id, new Date(Date.now() + 6 * 60_000)), server.log);
    expect(await show(paymentId)).toMatchObject({ state: 'succeeded', balance: 0 });
    await workEvents();
    expect(await balance()).toBe(0);
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('asks by itself when the payer comes back before the event', async () => {
    fake.setWebhookMode('hold');
    const { paymentId, url } = await start();
    await enterCard(url);
    const checked = await as(client).call('payments.check', { params: { paymentId } });
    expect(checked.body).toMatchObject({ state: 'succeeded', balance: 0 });
  });

  it('says why a card was declined, and takes another one on the same page', async () => {
    const { paymentId, url } = await start();
    expect((await enterCard(url, '4000 0000 0000 0002')).status).toBe(402);
    await workEvents();
    expect(await show(paymentId)).toMatchObject({ state: 'failed', problem: expect.any(String) });
    expect((await enterCard(url)).status).toBe(303);
    await workEvents();
    expect(await show(paymentId)).toMatchObject({ state: 'succeeded', problem: null, balance: 0 });
  });

  it('takes a part of it, and refuses more than is to be paid', async () => {
    const { url } = await start({ storeId: store.storeId, amount: 10_000 });
    await enterCard(url);
    await workEvents();
    expect(await balance()).toBe(11_650);
    const { body } = await as(client).call('statements.show', { params: { statementId } });
    expect(body).toMatchObject({ state: 'open', open: 11_650, toPay: 11_650 });
    const more = await as(client).call('payments.startCard', {
      body: { statementId, amount: 11_651 },
    });
    expect(more.status).toBe(422);
    const small = await as(client).call('payments.startCard', { body: { statementId, amount: 1 } });
    expect(small.status).toBe(409);
    const neither = await as(client).call('payments.startCard', { body: {} });
    expect(neither.status).toBe(422);
  });

  it('owes again what was given back, once', async () => {
    const { paymentId, url } = await start();
    await enterCard(url);
    await workEvents();
    const [{ card_intent, card_account } = { card_intent: '', card_account: '' }] = await inShop(
      shop,
      () =>
        rows<{ card_intent: string; card_account: string }>(
          `select p.card_intent, s.card_account from payments p join shops s on s.id = p.shop_id
         where p.shop_id = $shopId and p.id = $paymentId`,
          { shopId: shop.id, paymentId },
        ),
    );
    const sdk = new Stripe('sk_test_local', {
      host: '127.0.0.1',
      port: fake.port,
      protocol: 'http',
      telemetry: false,
    });
    await sdk.refunds.create(
      { payment_intent: card_intent, amount: 5_000 },
      { stripeAccount: card_account },
    );
    await workEvents();
    await workEvents();
    expect(await show(paymentId)).toMatchObject({
      refunded: 5_000,
      balance: 5_000,
      allocations: [{ statementId, amount: 16_650 }],
      refunds: [{ amount: 5_000 }],
    });
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('shows a dispute on the payment, and owes again what a lost one takes', async () => {
    const { paymentId, url } = await start();
    await enterCard(url);
    await workEvents();
    const [paid] = await inShop(shop, () =>
      rows<{ intent: string; account: string }>(
        `select p.card_intent as intent, s.card_account as account
         from payments p join shops s on s.id = p.shop_id
         where p.shop_id = $shopId and p.id = $paymentId`,
        { shopId: shop.id, paymentId },
      ),
    );
    const tell = async (type: string, status: string) => {
      const payload = JSON.stringify({
        id: `evt_${type}_${paymentId}`,
        object: 'event',
        account: paid?.account,
        type,
        data: {
          object: {
            id: `dp_${paymentId}`,
            object: 'dispute',
            amount: 21_650,
            created: Math.floor(Date.now() / 1000),
            status,
            payment_intent: paid?.intent,
          },
        },
      });
      const signature = new Stripe('sk_test_x').webhooks.generateTestHeaderString({
        payload,
        secret,
      });
      const sent = request(server.app).post('/api/stripe/webhook').type('application/json');
      expect((await sent.set('Stripe-Signature', signature).send(payload)).status).toBe(200);
      await workQueue(server, 'stripe-event');
    };
    await tell('charge.dispute.created', 'needs_response');
    expect(await show(paymentId)).toMatchObject({ problem: expect.any(String), balance: 0 });
    await tell('charge.dispute.closed', 'lost');
    expect(await show(paymentId)).toMatchObject({ refunded: 21_650, balance: 21_650 });
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('keeps an over-payment as credit', async () => {
    const recorded = await as(office).call('payments.record', {
      body: {
        storeId: store.storeId,
        method: 'transfer',
        amount: 30_000,
        receivedOn: `${last}-28`,
        words: 'RF reference',
      },
    });
    expect(recorded.status).toBe(201);
    expect(recorded.body).toMatchObject({ state: 'succeeded', credit: 8_350, balance: -8_350 });
    expect(await balance()).toBe(-8_350);
    const { body: aged } = await as(office).call('receivables.list');
    expect(aged.items[0]).toMatchObject({ credit: -8_350, total: -8_350, current: 0 });
    expect(aged.totals).toMatchObject({ total: -8_350 });
    const future = await as(office).call('payments.record', {
      body: { storeId: store.storeId, method: 'cash', amount: 1, receivedOn: '2999-01-01' },
    });
    expect(future.status).toBe(422);
  });

  it('is not for the office to pay, nor for a client to record', async () => {
    const office_ = await as(office).call('payments.startCard', { body: { statementId } });
    expect(office_.status).toBe(403);
    const client_ = await as(client).call('payments.record', {
      body: { storeId: store.storeId, method: 'cash', amount: 1, receivedOn: `${last}-28` },
    });
    expect(client_.status).toBe(403);
    const stranger = await buildPerson(shop, 'client_owner', {
      clientId: (await buildPayingStore(shop)).clientId,
    });
    const foreign = await as(stranger).call('payments.startCard', { body: { statementId } });
    expect(foreign.status).toBe(404);
  });

  it('works an event again that was stored and not worked', async () => {
    const { paymentId, url } = await start();
    await enterCard(url);
    await fake.flushWebhooks();
    await platformRows(`delete from pgboss.job where name = 'stripe-event'`);
    await platformRows(
      `update stripe_events set received_at = now() - interval '3 minutes' where worked_at is null`,
    );
    await sweepStripeEvents();
    await workQueue(server, 'stripe-event');
    expect(await show(paymentId)).toMatchObject({ state: 'succeeded', balance: 0 });
  });
});
