import { platformRows } from '../../server/src/core/database/tenancy';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop, type TestPerson } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

describe('guessing passwords', () => {
  let server: TestServer;
  let person: TestPerson;

  beforeAll(async () => {
    // Behind a proxy, so that a test can come from several places.
    server = await startTestServer({ TRUST_PROXY: 'loopback' });
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    await platformRows('delete from sign_in_failures');
    person = await buildPerson(await buildShop(), 'shop_owner');
    await givePassword(person);
  });

  async function signIn(
    password: string,
    from: string,
    tab = new Browser(server.app),
    email = person.email,
  ) {
    const headers = { 'X-Forwarded-For': from };
    const { status, body } = await tab.call('session.signIn', {
      headers,
      body: { email, password },
    });
    return { status, type: body.type as string, detail: body.detail as string };
  }
  async function guess(times: number, from: string, email = person.email) {
    const answers = [];
    for (let i = 0; i < times; i++) {
      answers.push(await signIn(`guess number ${i}`, from, undefined, email));
    }
    return answers;
  }

  it('forgives a few mistypings', async () => {
    await guess(4, '198.51.100.7');
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(200);
    // And forgets them then.
    await guess(4, '198.51.100.7');
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(200);
  });

  it('is not heard after that, not even with the right password, until a while has passed', async () => {
    await guess(8, '198.51.100.7');
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(401);
    await platformRows(`update sign_in_failures set last_at = last_at - interval '1 hour'`);
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(200);
  });

  it('from one place never locks out the person at another', async () => {
    await guess(12, '203.0.113.66');
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(200);
  });

  it('never locks out a browser that signed in before, though it is behind the same address', async () => {
    const tab = new Browser(server.app);
    await signIn(goodPassword, '198.51.100.7', tab);
    await guess(12, '198.51.100.7');
    expect((await signIn(goodPassword, '198.51.100.7')).status).toBe(401);
    expect((await signIn(goodPassword, '198.51.100.7', tab)).status).toBe(200);
  });

  it('is counted apart for a browser’s mark, which nobody can make up or use for another', async () => {
    const stranger = await buildPerson(await buildShop(), 'office');
    await givePassword(stranger);
    const tab = new Browser(server.app);
    await signIn(goodPassword, '198.51.100.7', tab, stranger.email);
    await guess(12, '198.51.100.7');
    expect((await signIn(goodPassword, '198.51.100.7', tab)).status).toBe(401);
    tab.cookies.set('tw_device', 'made.up');
    expect((await signIn(goodPassword, '198.51.100.7', tab)).status).toBe(401);
  });

  it('tells nothing: known, unknown, heard and not heard are answered alike', async () => {
    const known = await guess(8, '198.51.100.7');
    const unknown = await guess(8, '198.51.100.7', 'nobody@people.example');
    expect(new Set([...known, ...unknown].map((a) => JSON.stringify(a))).size).toBe(1);
    expect(known[0]).toMatchObject({ status: 401, type: '/problems/sign-in-refused' });
  });

  it('gets no further with many tries at once', async () => {
    await Promise.all(
      Array.from({ length: 20 }, (_, i) => signIn(`guess number ${i}`, '198.51.100.7')),
    );
    const [counted] = await platformRows<{ failures: number }>(
      `select max(failures) as failures from sign_in_failures
       where last_at > now() - interval '5 seconds'`,
    );
    expect(counted?.failures).toBeLessThanOrEqual(6);
  });

  it('lengthens no lock while it is not heard', async () => {
    await guess(6, '198.51.100.7');
    const before = await platformRows('select * from sign_in_failures order by 1, 2');
    await guess(3, '198.51.100.7');
    expect(await platformRows('select * from sign_in_failures order by 1, 2')).toEqual(before);
  });

  it('keeps no address in the clear', async () => {
    await guess(1, '198.51.100.7');
    const kept = JSON.stringify(await platformRows('select * from sign_in_failures'));
    expect(kept).not.toContain(person.email);
    expect(kept).not.toContain('198.51.100.7');
  });
});
