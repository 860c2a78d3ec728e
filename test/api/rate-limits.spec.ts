import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop, type TestPerson } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

describe('limits by network address', () => {
  let server: TestServer;
  let person: TestPerson;

  beforeAll(async () => {
    server = await startTestServer({
      SIGN_IN_RATE_LIMIT: '6',
      RATE_LIMIT: '60',
      TRUST_PROXY: 'loopback',
    });
    person = await buildPerson(await buildShop(), 'office');
    await givePassword(person);
  });
  afterAll(() => server.close());

  const ask = (from: string, id: 'session.signIn' | 'account.requestReset', body: object) =>
    new Browser(server.app).call(id, { body, headers: { 'X-Forwarded-For': from } });

  it('hold up guessing many addresses, with a problem that says to wait', async () => {
    const statuses: number[] = [];
    for (let i = 0; i < 8; i++) {
      const body = { email: `guess-${i}@people.example`, password: 'not it at all' };
      statuses.push((await ask('198.51.100.1', 'session.signIn', body)).status);
    }
    expect(statuses).toEqual([401, 401, 401, 401, 401, 401, 429, 429]);
    const body = { email: person.email, password: goodPassword };
    const held = await ask('198.51.100.1', 'session.signIn', body);
    expect(held.body.type).toBe('/problems/too-many-requests');
    expect(held.get('Retry-After')).toBe('60');
    expect((await ask('198.51.100.2', 'session.signIn', body)).status).toBe(200);
  });

  it('do not hold up people who sign in rightly, however many', async () => {
    const body = { email: person.email, password: goodPassword };
    for (let i = 0; i < 10; i++) {
      expect((await ask('198.51.100.3', 'session.signIn', body)).status).toBe(200);
    }
  });

  it('count what is taken without a secret', async () => {
    const statuses: number[] = [];
    for (let i = 0; i < 7; i++) {
      const body = { email: `someone-${i}@people.example` };
      statuses.push((await ask('198.51.100.4', 'account.requestReset', body)).status);
    }
    expect(statuses).toEqual([202, 202, 202, 202, 202, 202, 429]);
  });

  it('bound everything else too', async () => {
    const statuses = new Set<number>();
    for (let i = 0; i < 61; i++) {
      const answer = await new Browser(server.app).call('session.refresh', {
        headers: { 'X-Forwarded-For': '198.51.100.5' },
      });
      statuses.add(answer.status);
    }
    expect([...statuses]).toEqual([401, 429]);
  });
});
