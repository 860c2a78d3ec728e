import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import {
  buildLaundry,
  buildPerson,
  buildShop,
  next,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import { newestMail, tokenIn } from '../support/mail';
import { givePassword, goodPassword } from '../support/people';
import { limitPlan, pauseShop } from '../support/plans';
import { setUpMailServer } from '../support/set-ups';

describe('invitations', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let shop: TestShop;
  let owner: TestPerson;
  let invite: (body: Record<string, unknown>, by?: TestPerson) => ReturnType<Browser['call']>;

  setUpMailServer((made) => ({ server, mailbox } = made));
  beforeEach(async () => {
    shop = await buildShop({ name: 'Harbour Appliance' });
    owner = await buildPerson(shop, 'shop_owner', { name: 'Olive Owner' });
    invite = (body, by = owner) => api(server.app, by.token).call('invitations.send', { body });
  });

  const browser = () => new Browser(server.app);
  const somebody = () => `new-${next()}-${Date.now()}@people.example`;
  const tech = (values: Record<string, unknown> = {}) => ({
    role: 'tech',
    email: somebody(),
    name: 'Tim Tech',
    ...values,
  });
  const tokenFor = async (email: string) => tokenIn(await newestMail(server, mailbox, email));
  const list = async (query: Record<string, unknown> = {}) =>
    (await api(server.app, owner.token).call('invitations.list', { query })).body.items;

  it('bring a tech in: by mail, to an account, a session and a place in the crew', async () => {
    const asked = tech();
    const sent = await invite(asked);
    expect(sent.status).toBe(201);
    expect(sent.body).toMatchObject({ state: 'open', role: 'tech', email: asked.email });
    const letter = await newestMail(server, mailbox, asked.email);
    expect(letter.text).toContain('Olive Owner of Harbour Appliance asks you to join as a tech');
    const token = tokenIn(letter);
    expect((await browser().call('invitations.look', { params: { token } })).body).toEqual({
      shopName: 'Harbour Appliance',
      role: 'tech',
      clientName: null,
      email: asked.email,
      name: 'Tim Tech',
      known: false,
    });
    const tab = browser();
    const accepted = await tab.call('invitations.accept', {
      params: { token },
      body: { name: 'Timothy Tech', password: goodPassword },
    });
    expect(accepted.status).toBe(200);
    expect(accepted.body.membership).toMatchObject({ role: 'tech', shopId: shop.id });
    expect((await tab.call('session.refresh')).body.person.name).toBe('Timothy Tech');
    const crew = await api(server.app, owner.token).call('crew.list', { query: { role: 'tech' } });
    expect(crew.body.items).toEqual([
      expect.objectContaining({ name: 'Timothy Tech', initials: 'TT', costPerHour: 0 }),
    ]);
    expect((await list({ state: 'accepted' })).length).toBe(1);
    expect((await list({ state: 'open' })).length).toBe(0);
    const again = await browser().call('invitations.accept', {
      params: { token },
      body: { password: goodPassword },
    });
    expect(again.status).toBe(404);
  });

  it('keep no secret in the database', async () => {
    const asked = tech();
    await invite(asked);
    const token = await tokenFor(asked.email);
    const tables = ['invitations', 'platform_mails'];
    for (const table of tables) {
      const kept = JSON.stringify(await platformRows(`select * from ${table}`));
      expect(kept).toContain(asked.email);
      expect(kept).not.toContain(token);
    }
  });

  it('lead people of a client laundry to their own client and store', async () => {
    const { clientId, storeId } = await buildLaundry(shop);
    const email = somebody();
    const sent = await invite({
      role: 'attendant',
      clientId,
      storeId,
      email,
      name: 'Ann Attendant',
    });
    expect(sent.body).toMatchObject({ clientId, storeId });
    const accepted = await browser().call('invitations.accept', {
      params: { token: await tokenFor(email) },
      body: { password: goodPassword },
    });
    expect(accepted.body.membership).toMatchObject({ role: 'attendant', clientId, storeId });
    expect(accepted.body.permissions).not.toContain('statements.read');
    const people = await api(server.app, owner.token).call('clientPeople.list', {
      query: { clientId },
    });
    expect(people.body.items).toEqual([
      expect.objectContaining({ name: 'Ann Attendant', role: 'attendant', storeId }),
    ]);
    const [person] = people.body.items;
    const ended = await api(server.app, owner.token).call('clientPeople.end', {
      params: { membershipId: person.id as string },
      version: person.version as number,
    });
    expect(ended.body.endedAt).not.toBeNull();
  });

  it('ask a known person to sign in, and then add the membership to their account', async () => {
    const known = await buildPerson(await buildShop({ name: 'Other Shop' }), 'office');
    await givePassword(known);
    await invite(tech({ email: known.email }));
    const token = await tokenFor(known.email);
    const params = { token };
    expect((await browser().call('invitations.look', { params })).body.known).toBe(true);
    const body = { password: 'a password of an intruder' };
    expect((await browser().call('invitations.accept', { params, body })).status).toBe(401);
    const stranger = await buildPerson(await buildShop(), 'office');
    const theirs = { params, body: {}, token: stranger.token };
    expect((await browser().call('invitations.accept', theirs)).status).toBe(401);

    const tab = browser();
    const signedIn = await tab.call('session.signIn', {
      body: { email: known.email, password: goodPassword },
    });
    const accepted = await tab.call('invitations.accept', {
      params,
      body: {},
      token: signedIn.body.accessToken as string,
    });
    expect(accepted.status).toBe(200);
    expect(accepted.body.memberships).toHaveLength(2);
    expect(accepted.body.membership.shopName).toBe('Harbour Appliance');
    expect((await tab.call('session.refresh')).body.membership.shopId).toBe(shop.id);
  });

  it('are accepted once, though two tabs do it at the same moment', async () => {
    const asked = tech();
    await invite(asked);
    const params = { token: await tokenFor(asked.email) };
    const accept = () =>
      browser().call('invitations.accept', { params, body: { password: goodPassword } });
    const statuses = (await Promise.all([accept(), accept()])).map((a) => a.status).sort();
    expect(statuses[0]).toBe(200);
    expect(statuses[1]).toBeGreaterThanOrEqual(400);
    const joined = await platformRows('select 1 from memberships where email = $email', {
      email: asked.email,
    });
    expect(joined).toHaveLength(1);
  });

  it('can be taken back and mailed again', async () => {
    const asked = tech();
    const { body: sent } = await invite(asked);
    const token = await tokenFor(asked.email);
    const params = { invitationId: sent.id as string };
    const desk = api(server.app, owner.token);
    expect((await invite(asked)).status).toBe(409);
    await platformRows(`update invitations set expires_at = now() where id = $id`, {
      id: sent.id,
    });
    expect((await browser().call('invitations.look', { params: { token } })).status).toBe(404);
    expect((await list({ state: 'run_out' })).length).toBe(1);
    const again = await desk.call('invitations.resend', { params });
    expect(again.body.state).toBe('open');
    expect(await tokenFor(asked.email)).toBe(token);
    expect(mailbox.letters.list({ to: asked.email })).toHaveLength(2);
    expect((await desk.call('invitations.withdraw', { params })).body.state).toBe('withdrawn');
    expect((await browser().call('invitations.look', { params: { token } })).status).toBe(404);
    expect((await desk.call('invitations.resend', { params })).status).toBe(409);
    expect((await list({ state: 'withdrawn' })).map((i: { id: string }) => i.id)).toEqual([
      sent.id,
    ]);
  });

  it('mail once when the request is repeated with its key', async () => {
    const asked = tech();
    const desk = api(server.app, owner.token);
    const key = 'the-same-key-both-times';
    const first = await desk.call('invitations.send', { body: asked, key });
    const second = await desk.call('invitations.send', { body: asked, key });
    expect(second.body).toEqual(first.body);
    await newestMail(server, mailbox, asked.email);
    expect(mailbox.letters.list({ to: asked.email })).toHaveLength(1);
  });

  it('into the crew are for its owners; the office invites people of clients', async () => {
    const office = await buildPerson(shop, 'office');
    const { clientId } = await buildLaundry(shop);
    for (const role of ['shop_owner', 'office', 'tech']) {
      expect((await invite(tech({ role }), office)).status).toBe(403);
    }
    const client = { role: 'client_owner', clientId, email: somebody(), name: 'Cleo Client' };
    expect((await invite(client, office)).status).toBe(201);
    const hand = await buildPerson(shop, 'tech');
    expect((await invite(client, hand)).status).toBe(403);
  });

  it('name a client and store of this shop', async () => {
    const foreign = await buildLaundry(await buildShop());
    const own = await buildLaundry(shop);
    const person = { email: somebody(), name: 'Cleo Client' };
    const ask = async (body: Record<string, unknown>) =>
      (await invite({ ...person, ...body })).body.errors?.map(
        (e: { pointer: string }) => e.pointer,
      );
    expect(await ask({ role: 'client_owner', clientId: foreign.clientId })).toEqual(['/clientId']);
    expect(
      await ask({ role: 'attendant', clientId: own.clientId, storeId: foreign.storeId }),
    ).toEqual(['/storeId']);
    expect(await ask({ role: 'client_owner' })).toEqual(['/clientId']);
    expect(await ask({ role: 'tech', clientId: own.clientId })).toEqual(['/clientId']);
  });

  it('stop at the plan’s crew limit, when sent and when accepted, and lose nothing', async () => {
    await limitPlan(shop, { crew_limit: 2 });
    const [one, two] = [tech(), tech()];
    expect((await invite(one)).status).toBe(201);
    expect((await invite(two)).status).toBe(201);
    const accept = async (email: string) =>
      browser().call('invitations.accept', {
        params: { token: await tokenFor(email) },
        body: { password: goodPassword },
      });
    expect((await accept(one.email)).status).toBe(200);
    const refused = await accept(two.email);
    expect([refused.status, refused.body.type]).toEqual([403, '/problems/plan-limit']);
    expect(refused.body.detail).toContain('2 of 2');
    expect(await platformRow('select 1 from users where email = $e', { e: two.email })).toBe(
      undefined,
    );
    expect((await invite(tech())).body.type).toBe('/problems/plan-limit');
    await limitPlan(shop, { crew_limit: 3 });
    expect((await accept(two.email)).status).toBe(200);
  });

  it('wait while the shop is paused', async () => {
    const asked = tech();
    await invite(asked);
    const token = await tokenFor(asked.email);
    await pauseShop(shop);
    expect((await invite(tech())).body.type).toBe('/problems/shop-paused');
    const accepted = await browser().call('invitations.accept', {
      params: { token },
      body: { password: goodPassword },
    });
    expect(accepted.body.type).toBe('/problems/shop-paused');
  });
});
