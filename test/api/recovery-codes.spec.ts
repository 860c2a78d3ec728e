import { setTimeout as wait } from 'node:timers/promises';
import { Secret, TOTP } from 'otpauth';
import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop, type TestPerson } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

interface Owner extends TestPerson {
  token: string;
  codes: string[];
  generator: TOTP;
}

describe('recovery codes', () => {
  let server: TestServer;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  const browser = () => new Browser(server.app);

  /** An owner who has just put one-time codes in force. */
  async function owner(): Promise<Owner> {
    const person = await buildPerson(await buildShop(), 'shop_owner');
    await givePassword(person);
    const signedIn = await signIn(person);
    const token = signedIn.body.accessToken as string;
    const started = await browser().call('account.startTotp', { token });
    const secret = Secret.fromBase32(started.body.secret as string);
    const generator = new TOTP({ algorithm: 'SHA1', digits: 6, period: 30, secret });
    // A code made at the very end of its half minute would be judged in the next one.
    if ((Date.now() / 1000) % 30 > 24) await wait(6_000);
    const code = generator.generate({ timestamp: Date.now() - 30_000 });
    const confirmed = await browser().call('account.confirmTotp', { token, body: { code } });
    return { ...person, token, generator, codes: confirmed.body.recoveryCodes as string[] };
  }

  function signIn(person: { email: string }, code?: string) {
    const body = { email: person.email, password: goodPassword, ...(code ? { code } : {}) };
    return browser().call('session.signIn', { body });
  }

  async function leftOf(person: Owner): Promise<number> {
    const shown = await browser().call('account.show', { token: person.token });
    return shown.body.recoveryCodesLeft as number;
  }

  const renew = (person: Owner, password = goodPassword) =>
    browser().call('account.renewRecoveryCodes', {
      token: person.token,
      body: { password },
    });

  async function mailsTo(person: Owner, template: string): Promise<{ left?: number }[]> {
    const mails = await platformRows<{ params: { left?: number } }>(
      `select params from platform_mails where recipient = $to and template = $template
       order by created_at`,
      { to: person.email, template },
    );
    return mails.map((mail) => mail.params);
  }

  async function auditOf(person: Owner): Promise<string[]> {
    const acts = await platformRows<{ what: string }>(
      'select what from platform_audit where by_user_id = $id order by at, id',
      { id: person.userId },
    );
    return acts.map((act) => act.what);
  }

  it('come ten at a time when one-time codes are put in force, and are not kept', async () => {
    const person = await owner();
    expect(person.codes).toHaveLength(10);
    expect(new Set(person.codes).size).toBe(10);
    for (const code of person.codes) {
      expect(code).toMatch(/^[2-9a-hjkmnp-z]{5}-[2-9a-hjkmnp-z]{5}$/);
    }
    const kept = await platformRow<{ all: string }>(
      'select json_agg(c)::text as all from recovery_codes c where user_id = $id',
      { id: person.userId },
    );
    for (const code of person.codes) {
      expect(kept?.all).not.toContain(code);
      expect(kept?.all).not.toContain(code.replace('-', ''));
    }
    expect(await leftOf(person)).toBe(10);
  });

  it('open the account once each, typed with or without the hyphen and in any case', async () => {
    const person = await owner();
    const [first = '', second = ''] = person.codes;
    expect((await signIn(person, first)).status).toBe(200);
    const again = await signIn(person, first);
    const wrong = await signIn(person, 'aaaaa-aaaaa');
    for (const { body } of [again, wrong]) delete body.requestId;
    expect(again.status).toBe(401);
    expect(again.body.type).toBe('/problems/sign-in-refused');
    expect(again.body).toEqual(wrong.body);
    expect((await signIn(person, ` ${second.replace('-', '').toUpperCase()} `)).status).toBe(200);
    expect(await leftOf(person)).toBe(8);
    expect(await mailsTo(person, 'recovery_code_used')).toMatchObject([{ left: 9 }, { left: 8 }]);
    expect(await auditOf(person)).toEqual([
      'recovery codes made',
      'recovery code used',
      'recovery code used',
    ]);
  });

  it('are refused like a wrong one-time code', async () => {
    const person = await owner();
    const past = person.generator.generate({ timestamp: Date.now() - 600_000 });
    const wrongCode = await signIn(person, past);
    const wrongRecovery = await signIn(person, 'aaaaa-aaaaa');
    for (const { body } of [wrongCode, wrongRecovery]) delete body.requestId;
    expect(wrongRecovery.status).toBe(wrongCode.status);
    expect(wrongRecovery.body).toEqual(wrongCode.body);
  });

  it('let only one of two in that come with the same code at once', async () => {
    const person = await owner();
    const code = person.codes[0];
    const answers = await Promise.all([1, 2, 3].map(() => signIn(person, code)));
    expect(answers.map((a) => a.status).sort()).toEqual([200, 401, 401]);
    expect(await leftOf(person)).toBe(9);
  });

  it('are no use to another person, nor without the password', async () => {
    const person = await owner();
    const other = await owner();
    const [code] = person.codes;
    expect((await signIn(other, code)).status).toBe(401);
    const body = { email: person.email, password: 'not it at all', code };
    expect((await browser().call('session.signIn', { body })).status).toBe(401);
    expect(await leftOf(person)).toBe(10);
  });

  it('are guessed under the lock that holds for passwords', async () => {
    const person = await owner();
    for (let n = 0; n < 6; n++) {
      expect((await signIn(person, 'aaaaa-aaaaa')).status).toBe(401);
    }
    // A right one comes too early now, and is not used up by it.
    expect((await signIn(person, person.codes[0])).status).toBe(401);
    expect(await leftOf(person)).toBe(10);
  });

  it('are made anew for whoever knows the password, which ends those before', async () => {
    const person = await owner();
    const refusal = await renew(person, 'not it at all');
    expect(refusal.body.type).toBe('/problems/sign-in-refused');
    expect(await leftOf(person)).toBe(10);
    await signIn(person, person.codes[0]);
    const renewed = await renew(person);
    expect(renewed.status).toBe(200);
    const fresh = renewed.body.recoveryCodes as string[];
    expect(fresh).toHaveLength(10);
    expect(await leftOf(person)).toBe(10);
    expect((await signIn(person, person.codes[1])).status).toBe(401);
    expect((await signIn(person, fresh[0])).status).toBe(200);
    expect(await mailsTo(person, 'recovery_codes_renewed')).toHaveLength(1);
    expect(await auditOf(person)).toContain('recovery codes renewed');
  });

  it('are not made for who does not use one-time codes', async () => {
    const person = await buildPerson(await buildShop(), 'shop_owner');
    await givePassword(person);
    const { accessToken: token } = (await signIn(person)).body;
    const asked = await browser().call('account.renewRecoveryCodes', {
      token: token as string,
      body: { password: goodPassword },
    });
    expect(asked.status).toBe(409);
  });

  it('stop one-time codes for who lost the phone, and go with them', async () => {
    const person = await owner();
    const body = { code: person.codes[3] };
    const removed = await browser().call('account.removeTotp', { token: person.token, body });
    expect(removed.status).toBe(204);
    expect((await signIn(person)).status).toBe(200);
    expect(await leftOf(person)).toBe(0);
    expect(
      await platformRow('select 1 from recovery_codes where user_id = $id', { id: person.userId }),
    ).toBeUndefined();
    expect(await mailsTo(person, 'one_time_codes_stopped')).toHaveLength(1);
    expect(await auditOf(person)).toContain('one-time codes stopped');
  });

  it('open the account also when the secret of the one-time codes cannot be read any longer', async () => {
    const person = await owner();
    await platformRows('update users set totp_secret = $sealed where id = $id', {
      id: person.userId,
      sealed: Buffer.alloc(60).toString('base64url'),
    });
    expect((await signIn(person, '123456')).status).toBe(401);
    expect((await signIn(person, person.codes[0])).status).toBe(200);
  });
});
