import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { sweepSignIn } from '../../server/src/features/sign-up/sweep-sign-in';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

describe('the sweep of sign-in', () => {
  let server: TestServer;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  const count = async (table: string) =>
    (await platformRow<{ n: number }>(`select count(*)::int as n from ${table}`))?.n;

  it('forgets what is old and keeps what is in use', async () => {
    const person = await buildPerson(await buildShop(), 'office');
    await givePassword(person);
    const tab = new Browser(server.app);
    const signIn = (password: string, by = tab) =>
      by.call('session.signIn', { body: { email: person.email, password } });
    await signIn(goodPassword);
    await signIn(goodPassword, new Browser(server.app));
    await signIn('not it at all', new Browser(server.app));
    await tab.call('shops.signUp', {
      body: {
        shopName: 'Never Opened',
        name: 'Nobody',
        email: 'nobody@people.example',
        password: 'seven dry sheets',
        zone: 'Europe/Lisbon',
        currency: 'EUR',
      },
    });
    await sweepSignIn();
    expect(await count('sign_in_failures')).toBe(1);
    expect(await count('sign_ups')).toBe(1);
    expect((await tab.call('session.refresh')).status).toBe(200);

    await platformRows(`update sign_in_failures set last_at = now() - interval '2 days'`);
    await platformRows(`update sign_ups set expires_at = now() - interval '8 days'`);
    await platformRows(
      `update sessions set ended_at = now() - interval '31 days', ended_because = 'signed out'
       where id = (select id from sessions order by started_at desc limit 1)`,
    );
    await sweepSignIn();
    expect(await count('sign_in_failures')).toBe(0);
    expect(await count('sign_ups')).toBe(0);
    // Else those that ended first would be found again and again, and later ones never.
    expect(await count('sessions')).toBe(1);
    // The link that was traded and the fresh one, of the device in use.
    expect(await count('refresh_tokens')).toBe(2);
    expect((await tab.call('session.refresh')).status).toBe(200);
  });
});
