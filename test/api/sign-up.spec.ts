import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { addAdmin } from '../../server/src/features/platform/add-admin';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop } from '../support/factories';
import { newestMail, tokenIn } from '../support/mail';
import { givePassword, goodPassword } from '../support/people';
import { setUpMailServer } from '../support/set-ups';

describe('opening a shop', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let n = 0;

  setUpMailServer((made) => ({ server, mailbox } = made));

  const form = (values: Record<string, unknown> = {}) => ({
    shopName: 'Anchor Repairs',
    name: 'Rosa Quill',
    email: `rosa-${++n}@anchor.example`,
    password: goodPassword,
    zone: 'Europe/Lisbon',
    currency: 'EUR',
    locale: 'en-IE',
    ...values,
  });
  const browser = () => new Browser(server.app);

  it('ends signed in, on a trial, with settings, prices and the owner in the crew', async () => {
    const asked = form();
    const answer = await browser().call('shops.signUp', { body: asked });
    expect(answer.status).toBe(202);
    const letter = await newestMail(server, mailbox, asked.email);
    expect(letter.subject).toContain('Anchor Repairs');
    const confirmed = await browser().call('account.verifyEmail', {
      body: { token: tokenIn(letter) },
    });
    expect(confirmed.status).toBe(204);

    const signedIn = await browser().call('session.signIn', {
      body: { email: asked.email, password: goodPassword },
    });
    expect(signedIn.body.membership).toMatchObject({
      role: 'shop_owner',
      shopName: 'Anchor Repairs',
    });
    expect(signedIn.body.shop).toMatchObject({
      currency: 'EUR',
      zone: 'Europe/Lisbon',
      locale: 'en-IE',
      subscriptionState: 'trialing',
      mayWrite: true,
    });
    const owner = api(server.app, signedIn.body.accessToken as string);
    expect((await owner.call('shop.show')).body).toMatchObject({ setUpAt: null });
    expect((await owner.call('editions.list')).body.items).toHaveLength(1);
    expect((await owner.call('crew.list')).body.items).toEqual([
      expect.objectContaining({ name: 'Rosa Quill', initials: 'RQ', you: true }),
    ]);
    const shop = signedIn.body.membership.shopId as string;
    expect(
      await platformRow('select crew, stores from shop_usage where shop_id = $shop', { shop }),
    ).toEqual({ crew: 1, stores: 0 });
  });

  it('opens nothing, and lets nobody in, before the link is followed', async () => {
    const asked = form();
    await browser().call('shops.signUp', { body: asked });
    const signedIn = await browser().call('session.signIn', {
      body: { email: asked.email, password: goodPassword },
    });
    expect(signedIn.status).toBe(401);
    const found = await platformRows('select 1 from users where email = $email', {
      email: asked.email,
    });
    expect(found).toEqual([]);
  });

  it('opens one shop however often the link is followed, also at once', async () => {
    const asked = form({ shopName: `Only One ${n}` });
    await browser().call('shops.signUp', { body: asked });
    const token = tokenIn(await newestMail(server, mailbox, asked.email));
    const follow = () => browser().call('account.verifyEmail', { body: { token } });
    const statuses = (await Promise.all([follow(), follow(), follow()])).map((a) => a.status);
    expect(statuses).toEqual([204, 204, 204]);
    expect((await follow()).status).toBe(204);
    const shops = await platformRows('select 1 from shops where name = $name', {
      name: asked.shopName,
    });
    expect(shops).toHaveLength(1);
  });

  it('answers the same for an address that is known, and adds the shop to its account', async () => {
    const known = await buildPerson(await buildShop(), 'office', { name: 'Known Person' });
    await givePassword(known);
    const asked = form({ email: known.email, password: 'another good one', name: 'Intruder' });
    const answer = await browser().call('shops.signUp', { body: asked });
    const other = await browser().call('shops.signUp', { body: form() });
    expect([answer.status, answer.body]).toEqual([other.status, other.body]);
    const letter = await newestMail(server, mailbox, known.email);
    expect(letter.text).toContain('You have an account here already');
    expect(letter.text).toContain('Known Person');
    await browser().call('account.verifyEmail', { body: { token: tokenIn(letter) } });
    const old = await browser().call('session.signIn', {
      body: { email: known.email, password: goodPassword },
    });
    expect(old.body.person.name).toBe('Known Person');
    expect(old.body.memberships).toHaveLength(2);
    const chosen = await browser().call('session.signIn', {
      body: { email: known.email, password: 'another good one' },
    });
    expect(chosen.status).toBe(401);
  });

  it('gives a known person who has no password yet none that somebody else typed', async () => {
    const email = `admin-${++n}@platform.example`;
    await addAdmin(email, 'New Admin');
    const asked = form({ email, password: 'typed by an intruder' });
    await browser().call('shops.signUp', { body: asked });
    const letter = await newestMail(server, mailbox, email);
    await browser().call('account.verifyEmail', { body: { token: tokenIn(letter) } });
    const intruder = await browser().call('session.signIn', {
      body: { email, password: asked.password },
    });
    expect(intruder.status).toBe(401);
  });

  it('refuses passwords that would be guessed, currencies and zones that are none', async () => {
    const refusedFor = async (values: Record<string, unknown>) => {
      const { status, body } = await browser().call('shops.signUp', { body: form(values) });
      return [status, ...(body.errors ?? []).map((e: { pointer: string }) => e.pointer)];
    };
    expect(await refusedFor({ password: 'password1' })).toContain('/password');
    expect(await refusedFor({ password: 'anchor repairs' })).toContain('/password');
    expect(await refusedFor({ currency: 'ZZZ' })).toEqual([422, '/currency']);
    expect(await refusedFor({ zone: 'Moon/Base' })).toEqual([422, '/zone']);
  });

  it('answers a link that was made up or ran out like none', async () => {
    const asked = form();
    await browser().call('shops.signUp', { body: asked });
    const token = tokenIn(await newestMail(server, mailbox, asked.email));
    await platformRows(`update sign_ups set expires_at = now() where email = $email`, {
      email: asked.email,
    });
    const follow = (t: string) => browser().call('account.verifyEmail', { body: { token: t } });
    expect((await follow(token)).status).toBe(404);
    expect((await follow('a'.repeat(43))).status).toBe(404);
  });

  it('pesters nobody: after some mails an address gets no more for a while', async () => {
    const email = `pestered-${++n}@anchor.example`;
    for (let i = 0; i < 8; i++) {
      expect((await browser().call('shops.signUp', { body: form({ email }) })).status).toBe(202);
    }
    await newestMail(server, mailbox, email);
    expect(mailbox.letters.list({ to: email })).toHaveLength(5);
  });
});
