import type Stripe from 'stripe';
import { type StripeFake, startStripeFake } from '../../infra/fakes/stripe/stripe-fake';
import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { sweepSubscriptions } from '../../server/src/features/subscription/sweep-subscriptions';
import { workPlatformEvent } from '../../server/src/features/subscription/work-platform-event';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { payOnCardPage } from '../support/card';
import {
  buildLaundry,
  buildPerson,
  buildShop,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import { limitPlan } from '../support/plans';
import { countUsage } from '../../server/src/features/subscription/plan-limits';
import { systemContext } from '../../server/src/core/context';

const bench = '01963a10-0000-7000-8000-000000000001';
const workshop = '01963a10-0000-7000-8000-000000000002';
const day = 86_400_000;

describe('a shop’s subscription', () => {
  let server: TestServer;
  let card: StripeFake;
  let shop: TestShop;
  let owner: TestPerson;

  beforeAll(async () => {
    card = await startStripeFake();
    server = await startTestServer({ STRIPE_API_BASE: card.url });
  });
  afterAll(async () => {
    await server.close();
    await card.close();
  });
  beforeEach(async () => {
    card.setRequestMode('normal');
    shop = await buildShop({ state: 'trialing' });
    owner = await buildPerson(shop, 'shop_owner');
  });

  const by = (person: TestPerson) => api(server.app, person.token);
  const show = async () => (await by(owner).call('subscription.show')).body;
  const choose = (planId: string) => by(owner).call('subscription.choose', { body: { planId } });
  const check = () => by(owner).call('subscription.check');
  const sweep = (now: Date) => sweepSubscriptions(now, server.log);
  const set = (values: string) =>
    platformRows(`update subscriptions set ${values} where shop_id = $shop`, { shop: shop.id });
  const history = async () => (await show()).events.map((e: { event: string }) => e.event);
  const events = () => card.books.all('', 'event') as unknown as Stripe.Event[];
  const cardSubscription = async () =>
    (
      await platformRow<{ id: string }>(
        'select card_subscription as id from subscriptions where shop_id = $shop',
        { shop: shop.id },
      )
    )?.id as string;
  async function pay(planId: string): Promise<void> {
    const { body } = await choose(planId);
    expect((await payOnCardPage(body.url)).status).toBe(303);
    expect((await check()).body.state).toBe('active');
  }

  it('shows the plan, what is used of it, and when to look after it', async () => {
    await buildLaundry(shop, 4);
    await limitPlan(shop, { store_limit: 1, machine_limit: 5, crew_limit: 50 });
    const shown = await show();
    expect(shown).toMatchObject({ state: 'trialing', mayWrite: true, graceEndsAt: null });
    expect(
      shown.usage.map((u: { kind: string; used: number; level: string }) => [
        u.kind,
        u.used,
        u.level,
      ]),
    ).toEqual([
      ['stores', 1, 'at'],
      ['machines', 4, 'near'],
      ['crew', 1, 'within'],
    ]);
    expect(shown.usage[0].words).toContain('Everything you have stays');
    const plans = (await by(owner).call('subscription.plans')).body.items;
    expect(plans.map((p: { name: string }) => p.name)).toEqual(
      expect.arrayContaining(['Bench', 'Workshop', 'Depot']),
    );
  });

  it('is paid on the card page, once, and found without any event', async () => {
    const first = await choose(workshop);
    expect(first.status).toBe(200);
    const again = await choose(workshop);
    expect(again.body.url).toBe(first.body.url);
    expect((await show()).state).toBe('trialing');
    expect((await payOnCardPage(first.body.url)).headers.get('location')).toContain(
      '/shop/subscription?paid=1',
    );
    const paid = await check();
    expect(paid.body).toMatchObject({ state: 'active', plan: { name: 'Workshop' } });
    expect(paid.body.paidUntil).not.toBeNull();
    expect(await history()).toEqual(expect.arrayContaining(['resubscribed', 'plan_changed']));
    expect((await check()).body.version).toBe((await show()).version);
  });

  it('stays as it is when the card is refused or the person turns back', async () => {
    const { body } = await choose(workshop);
    expect((await payOnCardPage(body.url, '4000000000000002')).status).toBe(402);
    expect((await check()).body.state).toBe('trialing');
  });

  it('follows events told late, twice and in any order', async () => {
    const { body } = await choose(workshop);
    await payOnCardPage(body.url);
    const told = events();
    for (const event of [...told].reverse()) await workPlatformEvent(event);
    for (const event of told) await workPlatformEvent(event);
    expect(await show()).toMatchObject({ state: 'active', plan: { name: 'Workshop' } });
    expect((await history()).filter((e: string) => e === 'resubscribed')).toHaveLength(1);
  });

  it('is found by the sweep when no event ever comes', async () => {
    const { body } = await choose(bench);
    await payOnCardPage(body.url);
    await sweep(new Date());
    expect((await show()).state).toBe('active');
    // Unpaid later, and again nobody tells.
    const id = await cardSubscription();
    const customer = card.books.get('', id)?.customer as string;
    const method = card.books.get('', customer)?.invoice_settings as {
      default_payment_method: string;
    };
    const present = card.books.get('', method.default_payment_method);
    card.books.put('', {
      ...(present as NonNullable<typeof present>),
      _refusal: { code: 'card_declined', decline_code: 'generic_decline', message: 'No.' },
    });
    await fetch(`${card.url}/fake/subscriptions/${id}/advance`, { method: 'POST' });
    await set(`current_period_ends_at = now() - interval '2 hours', card_checked_at = null`);
    await sweep(new Date());
    expect(await show()).toMatchObject({ state: 'past_due', mayWrite: true });
  });

  it('moves to another plan without a card page once it is paid', async () => {
    await pay(bench);
    const moved = await choose(workshop);
    expect(moved.body).toMatchObject({ url: null, subscription: { plan: { name: 'Workshop' } } });
    const kept = card.books.get('', await cardSubscription());
    const items = kept?.items as { data: { price: { unit_amount: number } }[] };
    expect(items.data.map((item) => item.price.unit_amount)).toEqual([12_900]);
    expect((await check()).body.plan.name).toBe('Workshop');
  });

  it('says so when the card payment service does not answer, and changes nothing', async () => {
    card.setRequestMode('error-500', 10);
    const failed = await choose(workshop);
    expect([failed.status, failed.body.type]).toEqual([502, '/problems/card-payment-failed']);
    card.setRequestMode('normal');
    expect((await show()).state).toBe('trialing');
    expect((await choose(workshop)).status).toBe(200);
  });

  it('falls past due when the trial ends, then pauses after the grace, then opens when paid', async () => {
    const end = new Date('2031-05-01T00:00:00Z');
    await set(`trial_ends_at = '2031-05-01T00:00:00Z'`);
    await sweep(new Date(end.getTime() - 1000));
    expect((await show()).state).toBe('trialing');
    await sweep(end);
    const unpaid = await show();
    expect(unpaid).toMatchObject({ state: 'past_due' });
    expect(unpaid.graceEndsAt).toBe('2031-05-15T00:00:00.000Z');
    await sweep(new Date(end.getTime() + 13 * day));
    expect((await show()).state).toBe('past_due');
    await sweep(new Date(end.getTime() + 14 * day));
    await sweep(new Date(end.getTime() + 15 * day));
    expect(await show()).toMatchObject({ state: 'paused', mayWrite: false });
    expect(await history()).toEqual(['grace_ended', 'trial_ended']);
    await pay(workshop);
    expect((await show()).mayWrite).toBe(true);
  });

  it('refuses writing at the very end of the grace, whether or not the sweep has run', async () => {
    await set(`state = 'past_due', state_since = now() - interval '14 days 1 minute'`);
    const write = () => by(owner).call('clients.create', { body: { name: 'Late Laundry' } });
    expect((await write()).body.type).toBe('/problems/shop-paused');
    await set(`state_since = now() - interval '13 days'`);
    expect((await write()).status).toBe(201);
  });

  it('writes to its owners before the trial ends and when something changes, once each', async () => {
    await set(`trial_ends_at = now() + interval '2 days'`);
    await sweep(new Date());
    await sweep(new Date());
    await set(`trial_ends_at = now() - interval '1 minute'`);
    await sweep(new Date());
    const mails = await platformRows<{ words: string }>(
      `select params->>'words' as words from platform_mails
       where shop_id = $shop and recipient = $to order by created_at, id`,
      { shop: shop.id, to: owner.email },
    );
    expect(mails.map((m) => m.words.slice(0, 14))).toEqual(['The trial ends', 'The subscripti']);
  });

  it('is ended by the card payment service, and revived only by taking a plan again', async () => {
    await pay(bench);
    const id = await cardSubscription();
    const late = events().filter((event) => event.type === 'invoice.paid');
    await fetch(`${card.url}/v1/subscriptions/${id}`, {
      method: 'DELETE',
      headers: { authorization: 'Bearer sk_test_local' },
    });
    for (const event of events()) await workPlatformEvent(event);
    expect(await show()).toMatchObject({ state: 'canceled', mayWrite: false });
    for (const event of late) await workPlatformEvent(event);
    expect((await show()).state).toBe('canceled');
    await pay(workshop);
    expect(await cardSubscription()).not.toBe(id);
  });

  it('is chosen by the owner, seen by the office, and hidden from everybody else', async () => {
    const office = await buildPerson(shop, 'office');
    const tech = await buildPerson(shop, 'tech');
    expect((await by(office).call('subscription.show')).status).toBe(200);
    const body = { planId: workshop };
    expect((await by(office).call('subscription.choose', { body })).status).toBe(403);
    expect((await by(tech).call('subscription.show')).status).toBe(403);
  });

  it('writes what is used where the platform area sees it', async () => {
    await buildLaundry(shop, 2);
    await inShop(shop, () => countUsage(systemContext(shop.id, new Date())));
    const used = await platformRow(
      'select stores, machines, crew from shop_usage where shop_id = $shop',
      { shop: shop.id },
    );
    expect(used).toEqual({ stores: 1, machines: 2, crew: 1 });
  });

  it('lets support in for some hours only, until it is taken back', async () => {
    const given = await by(owner).call('consents.give', { body: { hours: 2 } });
    expect(given.body).toMatchObject({ inForce: true, withdrawnAt: null });
    const params = { consentId: given.body.id as string };
    const back = await by(owner).call('consents.withdraw', { params });
    expect(back.body.inForce).toBe(false);
    expect((await by(owner).call('consents.withdraw', { params })).body).toEqual(back.body);
    const tooLong = await by(owner).call('consents.give', { body: { hours: 10_000 } });
    expect(tooLong.status).toBe(422);
    const audit = await by(owner).call('audit.list');
    expect(audit.body.items.map((a: { what: string }) => a.what)).toEqual([
      'support kept out',
      'support let in',
    ]);
  });
});
