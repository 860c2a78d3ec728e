import { setTimeout as wait } from 'node:timers/promises';
import { Secret, TOTP } from 'otpauth';
import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildLaundry, buildPerson, buildShop, type TestPerson } from '../support/factories';
import { buildAdmin, givePassword, goodPassword } from '../support/people';

describe('signing in', () => {
  let server: TestServer;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  const browser = () => new Browser(server.app);
  const credentials = (person: { email: string }) => ({
    email: person.email,
    password: goodPassword,
  });
  async function owner(): Promise<TestPerson> {
    const person = await buildPerson(await buildShop({ name: 'Harbour Appliance' }), 'shop_owner');
    await givePassword(person);
    return person;
  }

  it('answers with who, as what, where and what that allows', async () => {
    const person = await owner();
    const answer = await browser().call('session.signIn', { body: credentials(person) });
    expect(answer.status).toBe(200);
    expect(answer.body.person).toMatchObject({ email: person.email, emailVerified: true });
    expect(answer.body.membership).toMatchObject({
      id: person.membershipId,
      role: 'shop_owner',
      shopName: 'Harbour Appliance',
    });
    expect(answer.body.permissions).toContain('rulings.decide');
    expect(answer.body.shop).toMatchObject({ currency: 'USD', mayWrite: true });
    const crew = await api(server.app, answer.body.accessToken as string).call('crew.list');
    expect(crew.status).toBe(200);
    expect(crew.body.items[0]).toMatchObject({ id: person.membershipId, you: true });
  });

  it('keeps the refresh token where no script and no other site gets at it', async () => {
    const person = await owner();
    const tab = browser();
    const answer = await tab.call('session.signIn', { body: credentials(person) });
    expect(tab.attributes.get('tw_refresh')).toMatchObject({
      httpOnly: true,
      sameSite: 'strict',
      path: '/api/session',
    });
    expect(JSON.stringify(answer.body)).not.toContain(tab.cookies.get('tw_refresh'));
    const [kept] = await platformRows<{ token_hash: string }>(
      `select token_hash from refresh_tokens t join sessions s on s.id = t.session_id
       where s.user_id = $id`,
      { id: person.userId },
    );
    expect(kept?.token_hash).not.toBe(tab.cookies.get('tw_refresh'));
  });

  it('refuses a wrong password, an unknown address and one not confirmed in the same words', async () => {
    const person = await owner();
    const unconfirmed = await owner();
    await platformRows('update users set email_verified_at = null where id = $id', {
      id: unconfirmed.userId,
    });
    const ask = async (email: string, password: string) => {
      const { status, body } = await browser().call('session.signIn', {
        body: { email, password },
      });
      delete body.requestId;
      return { status, body };
    };
    const wrong = await ask(person.email, 'not it at all');
    expect(wrong.status).toBe(401);
    expect(wrong.body.type).toBe('/problems/sign-in-refused');
    expect(await ask('nobody@people.example', goodPassword)).toEqual(wrong);
    expect(await ask(unconfirmed.email, goodPassword)).toEqual(wrong);
  });

  it('lets one person go on as another of their memberships, and remembers it', async () => {
    const person = await owner();
    const other = await buildShop({ name: 'Anchor Repairs' });
    const { clientId } = await buildLaundry(other);
    const asClient = await buildPerson(other, 'client_owner', { clientId });
    await platformRows('update memberships set user_id = $user where id = $id', {
      user: person.userId,
      id: asClient.membershipId,
    });
    const tab = browser();
    const first = await tab.call('session.signIn', { body: credentials(person) });
    expect(first.body.memberships).toHaveLength(2);
    const wanted = first.body.memberships.find(
      (m: { id: string }) => m.id === asClient.membershipId,
    );
    expect(wanted).toMatchObject({ role: 'client_owner', clientId });
    expect(wanted.clientName).toMatch(/^Client /);

    const switched = await tab.call('session.switch', {
      token: first.body.accessToken as string,
      body: { membershipId: asClient.membershipId },
    });
    expect(switched.status).toBe(200);
    expect(switched.body.membership.role).toBe('client_owner');
    expect(switched.body.permissions).not.toContain('crew.manage');
    const refreshed = await tab.call('session.refresh');
    expect(refreshed.body.membership.id).toBe(asClient.membershipId);
    const again = await browser().call('session.signIn', { body: credentials(person) });
    expect(again.body.membership.id).toBe(asClient.membershipId);
  });

  it('lets nobody go on as somebody else', async () => {
    const person = await owner();
    const stranger = await owner();
    const tab = browser();
    const signedIn = await tab.call('session.signIn', { body: credentials(person) });
    const answer = await tab.call('session.switch', {
      token: signedIn.body.accessToken as string,
      body: { membershipId: stranger.membershipId },
    });
    expect(answer.status).toBe(404);
  });

  it('has the platform area as a membership of its admins', async () => {
    const admin = await buildAdmin();
    const answer = await browser().call('session.signIn', { body: credentials(admin) });
    expect(answer.body.membership).toMatchObject({ role: 'platform_admin', shopId: null });
    expect(answer.body.permissions).toEqual(['platform.read', 'platform.change']);
    expect(answer.body.shop).toBeNull();
    const token = answer.body.accessToken as string;
    expect((await api(server.app, token).call('crew.list')).status).toBe(403);
  });

  it('lists where one is signed in, and signs out there, here and everywhere', async () => {
    const person = await owner();
    const [laptop, phone, tablet] = [browser(), browser(), browser()];
    const signedIn = await laptop.call('session.signIn', { body: credentials(person) });
    for (const other of [phone, tablet]) {
      await other.call('session.signIn', {
        body: credentials(person),
        headers: { 'User-Agent': 'Field phone' },
      });
    }
    const token = signedIn.body.accessToken as string;
    const listed = (await laptop.call('session.list', { token })).body.items;
    expect(listed).toHaveLength(3);
    expect(listed.filter((d: { current: boolean }) => d.current)).toHaveLength(1);
    const onPhone = listed.find((d: { device: string }) => d.device === 'Field phone');

    const stranger = await owner();
    const strange = await browser().call('session.signIn', { body: credentials(stranger) });
    const params = { sessionId: onPhone.id as string };
    const theirs = strange.body.accessToken as string;
    expect((await laptop.call('session.end', { token: theirs, params })).status).toBe(404);
    expect((await laptop.call('session.end', { token, params })).status).toBe(204);
    const left = (await laptop.call('session.list', { token })).body.items;
    expect(left).toHaveLength(2);

    expect((await laptop.call('session.signOut')).status).toBe(204);
    expect((await laptop.call('session.refresh')).status).toBe(401);
    const back = await laptop.call('session.signIn', { body: credentials(person) });
    const everywhere = await laptop.call('session.signOutEverywhere', {
      token: back.body.accessToken as string,
    });
    expect(everywhere.status).toBe(204);
    for (const tab of [laptop, phone, tablet]) {
      expect((await tab.call('session.refresh')).status).toBe(401);
    }
  });

  it('keeps one session a browser: signing in again ends the one before', async () => {
    const person = await owner();
    const tab = browser();
    await tab.call('session.signIn', { body: credentials(person) });
    const again = await tab.call('session.signIn', { body: credentials(person) });
    const token = again.body.accessToken as string;
    expect((await tab.call('session.list', { token })).body.items).toHaveLength(1);
  });

  it('asks for a one-time code when they are in force, and takes each code once', async () => {
    const person = await owner();
    const tab = browser();
    const { accessToken: token } = (await tab.call('session.signIn', { body: credentials(person) }))
      .body;
    const started = await tab.call('account.startTotp', { token });
    expect(started.body.uri).toContain('otpauth://totp/Tumblewright');
    expect(started.body.qrSvg).toContain('<svg');
    const generator = new TOTP({
      algorithm: 'SHA1',
      digits: 6,
      period: 30,
      secret: Secret.fromBase32(started.body.secret as string),
    });
    // A code made at the very end of its half minute would be judged in the next one.
    if ((Date.now() / 1000) % 30 > 24) await wait(6_000);
    const codeAt = (seconds: number) =>
      generator.generate({ timestamp: Date.now() + seconds * 1000 });
    const wrong = String((Number(codeAt(0)) + 1) % 1_000_000).padStart(6, '0');
    // Not yet in force.
    const before = await tab.call('session.signIn', { body: credentials(person) });
    expect(before.status).toBe(200);
    const confirm = (code: string) => tab.call('account.confirmTotp', { token, body: { code } });
    expect((await confirm(codeAt(300))).status).toBe(401);
    expect((await confirm(codeAt(-30))).status).toBe(200);
    const kept = await platformRow<{ totp_secret: string }>(
      'select totp_secret from users where id = $id',
      { id: person.userId },
    );
    expect(kept?.totp_secret).not.toContain(started.body.secret);

    const signIn = (code?: string) =>
      browser().call('session.signIn', {
        body: { ...credentials(person), ...(code ? { code } : {}) },
      });
    expect((await signIn()).body.type).toBe('/problems/code-required');
    expect((await signIn(wrong)).body.type).toBe('/problems/sign-in-refused');
    const code = codeAt(0);
    expect((await signIn(code)).status).toBe(200);
    expect((await signIn(code)).body.type).toBe('/problems/sign-in-refused');
    const shown = await tab.call('account.show', { token });
    expect(shown.body).toMatchObject({ oneTimeCodes: true, oneTimeCodesOffered: true });
    const removed = await tab.call('account.removeTotp', { token, body: { code: codeAt(30) } });
    expect(removed.status).toBe(204);
    expect((await signIn()).status).toBe(200);
  });

  it('keeps one-time codes to those whose password opens most', async () => {
    const tech = await buildPerson(await buildShop(), 'tech');
    const asked = await api(server.app, tech.token).call('account.startTotp');
    expect(asked.status).toBe(403);
  });
});
