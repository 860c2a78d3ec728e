import type Stripe from 'stripe';
import { v7 as uuid } from 'uuid';
import { type StripeFake, startStripeFake } from '../../infra/fakes/stripe/stripe-fake';
import { platformRows } from '../../server/src/core/database/tenancy';
import { addAdmin } from '../../server/src/features/platform/add-admin';
import { queuePlatformMail } from '../../server/src/features/platform-mails/queue-platform-mail';
import { workPlatformEvent } from '../../server/src/features/subscription/work-platform-event';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { payOnCardPage } from '../support/card';
import { buildPerson, buildShop, type TestPerson, type TestShop } from '../support/factories';
import { walk } from '../support/lists';
import { buildAdmin, goodPassword } from '../support/people';

const workshop = '01963a10-0000-7000-8000-000000000002';

describe('the platform area', () => {
  let server: TestServer;
  let card: StripeFake;
  let admin: ReturnType<typeof api>;
  let shop: TestShop;
  let owner: TestPerson;

  beforeAll(async () => {
    card = await startStripeFake();
    server = await startTestServer({ STRIPE_API_BASE: card.url });
    const { email } = await buildAdmin();
    const signedIn = await new Browser(server.app).call('session.signIn', {
      body: { email, password: goodPassword },
    });
    admin = api(server.app, signedIn.body.accessToken as string);
  });
  afterAll(async () => {
    await server.close();
    await card.close();
  });
  beforeEach(async () => {
    shop = await buildShop({ name: 'Harbour Appliance' });
    owner = await buildPerson(shop, 'shop_owner', { name: 'Olive Owner' });
  });

  const params = () => ({ shopId: shop.id });
  const decide = (id: 'platform.pause' | 'platform.resume' | 'platform.cancel', note = 'Asked') =>
    admin.call(id, { params: params(), body: { note } });
  const audit = async () =>
    (await admin.call('platform.audit', { query: { shopId: shop.id } })).body.items.map(
      (a: { what: string; byName: string }) => [a.byName, a.what],
    );
  const write = () =>
    api(server.app, owner.token).call('clients.create', { body: { name: 'Some Laundry' } });

  it('lists shops by name and by age, page by page, and finds them', async () => {
    const names = [`Quay ${uuid().slice(-6)} A`, `Quay ${uuid().slice(-6)} B`];
    for (const name of names) await buildShop({ name });
    await buildShop({ name: 'Quay paused', state: 'paused' });
    const all = await walk(admin, 'platform.shops', { limit: 2 });
    expect(new Set(all.map((s) => s.id)).size).toBe(all.length);
    expect(all.map((s) => s.name)).toEqual([...all.map((s) => s.name as string)].sort());
    const youngest = await walk(admin, 'platform.shops', { limit: 2, sort: '-createdAt' });
    expect(youngest[0]?.name).toBe('Quay paused');
    const found = await walk(admin, 'platform.shops', { q: 'quay' });
    expect(found.map((s) => s.name)).toEqual([...names, 'Quay paused'].sort());
    const paused = await walk(admin, 'platform.shops', { q: 'quay', state: 'paused' });
    expect(paused).toEqual([expect.objectContaining({ state: 'paused', planName: 'Bench' })]);
  });

  it('shows a shop’s plan, standing and owners, and until when support may look', async () => {
    await api(server.app, owner.token).call('consents.give', { body: { hours: 3 } });
    const shown = (await admin.call('platform.shop', { params: params() })).body;
    expect(shown).toMatchObject({
      name: 'Harbour Appliance',
      state: 'active',
      owners: [{ name: 'Olive Owner', email: owner.email }],
    });
    expect(shown.consentUntil).not.toBeNull();
    const absent = await admin.call('platform.shop', { params: { shopId: uuid() } });
    expect(absent.status).toBe(404);
  });

  it('pauses and resumes a shop, with who and why written down, once however often asked', async () => {
    expect((await write()).status).toBe(201);
    const paused = await decide('platform.pause', 'Unpaid since spring');
    expect(paused.body).toMatchObject({ state: 'paused', mayWrite: false });
    await decide('platform.pause');
    expect((await write()).body.type).toBe('/problems/shop-paused');
    expect((await api(server.app, owner.token).call('clients.list')).status).toBe(200);
    expect((await decide('platform.resume')).body.state).toBe('active');
    expect((await write()).status).toBe(201);
    expect(await audit()).toEqual([
      ['Ada Admin', 'shop resumed'],
      ['Ada Admin', 'shop paused'],
    ]);
    const shown = await api(server.app, owner.token).call('subscription.show');
    expect(shown.body.events).toEqual([
      expect.objectContaining({ event: 'resumed', fromState: 'paused', toState: 'active' }),
      expect.objectContaining({ event: 'paused', note: 'Unpaid since spring' }),
    ]);
  });

  it('ends a subscription, after which only the shop itself begins another', async () => {
    expect((await decide('platform.cancel')).body.state).toBe('canceled');
    expect((await decide('platform.cancel')).status).toBe(200);
    expect((await decide('platform.pause')).status).toBe(409);
    expect((await decide('platform.resume')).status).toBe(409);
    expect(await audit()).toEqual([['Ada Admin', 'subscription ended']]);
  });

  it('stops billing a shop it pauses or ends', async () => {
    const desk = api(server.app, owner.token);
    const chosen = await desk.call('subscription.choose', { body: { planId: workshop } });
    await payOnCardPage(chosen.body.url as string);
    await desk.call('subscription.check');
    const [kept] = await platformRows<{ id: string }>(
      'select card_subscription as id from subscriptions where shop_id = $shop',
      { shop: shop.id },
    );
    const billed = () => card.books.get('', kept?.id ?? '');
    await decide('platform.pause');
    expect(billed()?.pause_collection).toMatchObject({ behavior: 'void' });
    await decide('platform.resume');
    expect(billed()?.pause_collection).toBeNull();
    await decide('platform.cancel');
    expect(billed()?.status).toBe('canceled');
  });

  it('keeps a shop paused until an admin resumes it, whatever is paid or chosen meanwhile', async () => {
    const desk = api(server.app, owner.token);
    const choose = () => desk.call('subscription.choose', { body: { planId: workshop } });
    const chosen = await choose();
    expect((await decide('platform.pause')).body).toMatchObject({ pausedByPlatform: true });
    // The card page was open before the pause, and is paid after it.
    await payOnCardPage(chosen.body.url as string);
    expect((await desk.call('subscription.check')).body).toMatchObject({
      state: 'paused',
      pausedByPlatform: true,
      mayWrite: false,
    });
    const paid = card.books.all('', 'event').filter((e) => e.type === 'invoice.paid');
    expect(paid.length).toBeGreaterThan(0);
    for (const event of paid) await workPlatformEvent(event as unknown as Stripe.Event);
    expect((await write()).body.type).toBe('/problems/shop-paused');
    expect((await choose()).body.type).toBe('/problems/conflict');
    expect((await decide('platform.resume')).body).toMatchObject({
      state: 'active',
      pausedByPlatform: false,
    });
    expect((await write()).status).toBe(201);
  });

  it('resumes a shop on trial to its trial, not to a plan nobody pays', async () => {
    await platformRows(`update subscriptions set state = 'trialing' where shop_id = $shop`, {
      shop: shop.id,
    });
    await decide('platform.pause');
    expect((await decide('platform.resume')).body.state).toBe('trialing');
  });

  it('puts a shop on another plan, also one that is not on offer', async () => {
    const plan = {
      code: `friends-${uuid().slice(-6)}`,
      name: 'Friends',
      monthlyAmount: 100,
      currency: 'USD',
      storeLimit: 2,
      machineLimit: 20,
      crewLimit: 1,
      trialDays: 0,
      graceDays: 30,
      offered: false,
    };
    const created = await admin.call('platform.createPlan', { body: plan });
    expect(created.status).toBe(201);
    expect((await admin.call('platform.createPlan', { body: plan })).body).toEqual(created.body);
    const other = { ...plan, monthlyAmount: 5 };
    expect((await admin.call('platform.createPlan', { body: other })).status).toBe(409);
    const changed = await admin.call('platform.changePlan', {
      params: params(),
      body: { planId: created.body.id, note: 'As agreed' },
    });
    expect(changed.body).toMatchObject({ planName: 'Friends', plan: { graceDays: 30 } });
    expect(changed.body.events[0]).toMatchObject({
      event: 'plan_changed',
      note: 'Friends: As agreed',
    });
    const unknown = { planId: uuid(), note: '' };
    const refused = await admin.call('platform.changePlan', { params: params(), body: unknown });
    expect(refused.status).toBe(422);
    const own = await api(server.app, owner.token).call('subscription.choose', {
      body: { planId: created.body.id },
    });
    expect(own.status).toBe(422);

    const edit = (version: number, body: object) =>
      admin.call('platform.editPlan', {
        params: { planId: created.body.id as string },
        version,
        body,
      });
    const edited = await edit(created.body.version, { crewLimit: 2 });
    expect(edited.body.crewLimit).toBe(2);
    expect((await edit(created.body.version, { crewLimit: 3 })).status).toBe(412);
    const listed = (await admin.call('platform.plans')).body.items;
    expect(listed.find((p: { code: string }) => p.code === plan.code)).toMatchObject({
      shops: 1,
      crewLimit: 2,
    });
  });

  it('gives a plan of another price a new price at the card payment service', async () => {
    const desk = api(server.app, owner.token);
    await desk.call('subscription.choose', { body: { planId: workshop } });
    const before = (await admin.call('platform.plans')).body.items.find(
      (p: { id: string }) => p.id === workshop,
    );
    await admin.call('platform.editPlan', {
      params: { planId: workshop },
      version: before.version as number,
      body: { monthlyAmount: 13_900 },
    });
    const chosen = await desk.call('subscription.choose', { body: { planId: workshop } });
    const page = await (await fetch(chosen.body.url as string)).text();
    expect(page).toContain('$139.00');
  });

  it('shows the queues', async () => {
    await queuePlatformMail({
      to: 'q@people.example',
      template: 'password_changed',
      params: { name: 'Q' },
      dedupeKey: uuid(),
    });
    const { body } = await admin.call('platform.queues');
    const mails = body.items.find((q: { queue: string }) => q.queue === 'platform-mails-send');
    expect(mails.waiting).toBeGreaterThan(0);
    expect(mails.oldestWaitingAt).not.toBeNull();
    expect(body.items.map((q: { queue: string }) => q.queue)).toContain('sweep');
  });

  it('shows mails with their addresses masked, and lets a person settle what no program can', async () => {
    const to = `${uuid().slice(-8)}@people.example`;
    const dedupeKey = uuid();
    await queuePlatformMail({
      to,
      template: 'password_changed',
      params: { name: 'Rosa' },
      dedupeKey,
    });
    const listed = async () =>
      (await admin.call('platform.mails', { query: { q: to } })).body.items;
    const [mail] = await listed();
    expect(mail.recipient).toBe(`${to[0]}...@people.example`);
    const settle = (decision: string) =>
      admin.call('platform.decideMail', { params: { mailId: mail.id }, body: { decision } });
    expect((await settle('arrived')).status).toBe(409);
    await platformRows(
      `update platform_mails set state = 'uncertain', attempt = 1,
         last_error = '550 no such person: ' || recipient where dedupe_key = $dedupeKey`,
      { dedupeKey },
    );
    expect((await listed())[0].lastError).not.toContain(to);
    expect((await settle('send_again')).body).toMatchObject({ state: 'waiting', attempt: 0 });
    await platformRows(
      `update platform_mails set state = 'uncertain' where dedupe_key = $dedupeKey`,
      { dedupeKey },
    );
    expect((await settle('arrived')).body.state).toBe('sent');
    expect((await settle('arrived')).status).toBe(200);
  });

  it('shows events of the card payment service without what they hold', async () => {
    const ids = ['evt_one', 'evt_two', 'evt_three'];
    for (const id of ids) {
      await platformRows(
        `insert into stripe_events (id, type, object_id, payload)
         values ($id, 'charge.succeeded', 'ch_1', '{"secret":"not for the list"}')`,
        { id },
      );
    }
    const all = await walk(admin, 'platform.cardEvents', { limit: 1 });
    expect(all.map((e) => e.id).sort()).toEqual([...ids].sort());
    expect(JSON.stringify(all)).not.toContain('not for the list');
    const worked = await walk(admin, 'platform.cardEvents', { state: 'worked' });
    expect(worked).toEqual([]);
  });

  it('gets its first admin from whoever runs the installation, by a mail to choose a password', async () => {
    const email = `first-${uuid().slice(-6)}@platform.example`;
    expect(await addAdmin(email, 'Fia First')).toBe('added');
    expect(await addAdmin(email, 'Fia First')).toBe('already');
    const mails = await platformRows<{ template: string }>(
      'select template from platform_mails where recipient = $email',
      { email },
    );
    expect(mails.map((mail) => mail.template)).toContain('reset_password');
    const known = await addAdmin(owner.email, 'Olive Owner');
    expect(known).toBe('added');
    const person = await platformRows('select name, platform_admin from users where email = $e', {
      e: owner.email,
    });
    expect(person).toEqual([{ name: 'Olive Owner', platform_admin: true }]);
  });

  it('is closed to everybody who is not a platform admin, and reaches into no shop', async () => {
    for (const role of ['shop_owner', 'office', 'tech'] as const) {
      const { token } = await buildPerson(shop, role);
      const asked = await api(server.app, token).call('platform.shops');
      expect([role, asked.status]).toEqual([role, 403]);
    }
    for (const id of ['clients.list', 'audit.list', 'crew.list'] as const) {
      expect((await admin.call(id)).status).toBe(403);
    }
  });
});
