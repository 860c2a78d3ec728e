import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop, type TestPerson } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

describe('refresh tokens', () => {
  let server: TestServer;
  let person: TestPerson;
  let tab: Browser;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    person = await buildPerson(await buildShop(), 'tech');
    await givePassword(person);
    tab = new Browser(server.app);
    await tab.call('session.signIn', { body: { email: person.email, password: goodPassword } });
  });

  const token = () => tab.cookies.get('tw_refresh') as string;
  function copied(stolen: string): Browser {
    const thief = new Browser(server.app);
    thief.cookies.set('tw_refresh', stolen);
    return thief;
  }
  const ended = () =>
    platformRow<{ ended_because: string | null }>(
      'select ended_because from sessions where user_id = $id',
      { id: person.userId },
    );

  it('are traded for the next each time', async () => {
    const first = token();
    const answer = await tab.call('session.refresh');
    expect(answer.status).toBe(200);
    expect(token()).not.toBe(first);
    const second = token();
    expect((await tab.call('session.refresh')).status).toBe(200);
    expect(token()).not.toBe(second);
    expect((await tab.call('session.refresh')).status).toBe(200);
  });

  it('end the whole chain when one comes back that was used', async () => {
    const stolen = token();
    await tab.call('session.refresh');
    const thief = copied(stolen);
    expect((await thief.call('session.refresh')).status).toBe(401);
    expect(thief.cookies.has('tw_refresh')).toBe(false);
    // The owner's own, newest token is worth nothing either: one of the two is a thief.
    expect((await tab.call('session.refresh')).status).toBe(401);
    expect((await ended())?.ended_because).toBe('a refresh token was used twice');
  });

  it('end the chain also when the thief was first', async () => {
    const thief = copied(token());
    expect((await thief.call('session.refresh')).status).toBe(200);
    expect((await tab.call('session.refresh')).status).toBe(401);
    expect((await thief.call('session.refresh')).status).toBe(401);
  });

  it('leave other devices alone', async () => {
    const phone = new Browser(server.app);
    await phone.call('session.signIn', { body: { email: person.email, password: goodPassword } });
    const stolen = token();
    await tab.call('session.refresh');
    await copied(stolen).call('session.refresh');
    expect((await phone.call('session.refresh')).status).toBe(200);
  });

  it('let two tabs ask at the same moment, and start one chain only', async () => {
    const before = token();
    const same = copied(before);
    const [one, other] = await Promise.all([
      tab.call('session.refresh'),
      same.call('session.refresh'),
    ]);
    expect([one.status, other.status]).toEqual([200, 200]);
    const renewed = [tab, same].filter((each) => each.cookies.get('tw_refresh') !== before);
    expect(renewed).toHaveLength(1);
    const { n } = (await platformRow<{ n: number }>(
      `select count(*)::int as n from refresh_tokens t join sessions s on s.id = t.session_id
       where s.user_id = $id and t.used_at is null`,
      { id: person.userId },
    )) as { n: number };
    expect(n).toBe(1);
    expect((await ended())?.ended_because).toBeNull();
    expect((await renewed[0]?.call('session.refresh'))?.status).toBe(200);
  });

  it('may be asked for again, with the same key, when the answer got lost', async () => {
    const before = token();
    const headers = { 'Idempotency-Key': 'a-key-of-this-browser-1' };
    await tab.call('session.refresh', { headers });
    tab.cookies.set('tw_refresh', before);
    expect((await tab.call('session.refresh', { headers })).status).toBe(200);
    expect(token()).not.toBe(before);
    expect((await tab.call('session.refresh')).status).toBe(200);
    const guess = { 'Idempotency-Key': 'a-key-of-this-browser-2' };
    expect((await copied(before).call('session.refresh', { headers: guess })).status).toBe(401);
  });

  it('are not taken from another site, nor when idle for long, nor when made up', async () => {
    const headers = { 'Sec-Fetch-Site': 'cross-site' };
    expect((await copied(token()).call('session.refresh', { headers })).status).toBe(401);
    expect((await copied('x'.repeat(43)).call('session.refresh')).status).toBe(401);
    expect((await copied('"><script>').call('session.refresh')).status).toBe(401);
    expect((await new Browser(server.app).call('session.refresh')).status).toBe(401);
    await platformRows(
      `update sessions set expires_at = now() - interval '1 second' where user_id = $id`,
      { id: person.userId },
    );
    expect((await tab.call('session.refresh')).status).toBe(401);
  });

  it('give what the membership allows by then', async () => {
    await platformRows(`update memberships set role = 'office' where id = $id`, {
      id: person.membershipId,
    });
    const promoted = await tab.call('session.refresh');
    expect(promoted.body.membership.role).toBe('office');
    expect(promoted.body.permissions).toContain('statements.close');
    await platformRows('update memberships set ended_at = now() where id = $id', {
      id: person.membershipId,
    });
    const left = await tab.call('session.refresh');
    expect(left.body.membership).toBeNull();
    expect(left.body.permissions).toEqual([]);
  });
});
