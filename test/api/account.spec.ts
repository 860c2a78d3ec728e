import { platformRow, platformRows } from '../../server/src/core/database/tenancy';
import { type Mailbox } from '../../infra/fakes/mailbox/mailbox';
import { type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop, type TestPerson } from '../support/factories';
import { newestMail, tokenIn } from '../support/mail';
import { givePassword, goodPassword } from '../support/people';
import { setUpMailServer } from '../support/set-ups';

const newPassword = 'seven dry sheets';

describe('a person’s own account', () => {
  let server: TestServer;
  let mailbox: Mailbox;
  let person: TestPerson;

  setUpMailServer((made) => ({ server, mailbox } = made));
  beforeEach(async () => {
    person = await buildPerson(await buildShop(), 'office', { name: 'Ola Office' });
    await givePassword(person);
  });

  const browser = () => new Browser(server.app);
  async function signedIn(password = goodPassword) {
    const tab = browser();
    const { status, body } = await tab.call('session.signIn', {
      body: { email: person.email, password },
    });
    return { tab, status, token: body.accessToken as string };
  }

  it('is renamed everywhere, unless somebody was faster', async () => {
    const { tab, token } = await signedIn();
    const shown = await tab.call('account.show', { token });
    const rename = (name: string, version: number) =>
      tab.call('account.change', {
        token,
        body: { name },
        headers: { 'If-Match': `"${version}"` },
      });
    expect((await rename('Olga Office', shown.body.version)).body.name).toBe('Olga Office');
    expect((await rename('Olaf Office', shown.body.version)).status).toBe(412);
    const membership = await platformRow('select name from memberships where id = $id', {
      id: person.membershipId,
    });
    expect(membership).toEqual({ name: 'Olga Office' });
  });

  it('gets a new password by a mailed link, once, which ends every session', async () => {
    const { tab } = await signedIn();
    const asked = await browser().call('account.requestReset', { body: { email: person.email } });
    expect(asked.status).toBe(202);
    const token = tokenIn(await newestMail(server, mailbox, person.email));
    const reset = (password: string) =>
      browser().call('account.reset', { body: { token, password } });
    expect((await reset('password1')).status).toBe(422);
    expect((await reset(newPassword)).status).toBe(204);
    expect((await reset('a third good one')).status).toBe(404);
    expect((await tab.call('session.refresh')).status).toBe(401);
    expect((await signedIn()).status).toBe(401);
    expect((await signedIn(newPassword)).status).toBe(200);
    const told = await newestMail(server, mailbox, person.email);
    expect(told.subject).toBe('Your password was changed');
  });

  it('lets an older link end with a newer one', async () => {
    const tokens: string[] = [];
    for (let i = 0; i < 2; i++) {
      await browser().call('account.requestReset', { body: { email: person.email } });
      tokens.push(tokenIn(await newestMail(server, mailbox, person.email)));
    }
    const use = (token: string | undefined) =>
      browser().call('account.reset', { body: { token, password: newPassword } });
    expect((await use(tokens[1])).status).toBe(204);
    expect((await use(tokens[0])).status).toBe(404);
  });

  it('does not tell whether there is one', async () => {
    const ask = async (email: string) => {
      const start = performance.now();
      const { status, body } = await browser().call('account.requestReset', { body: { email } });
      return { said: [status, body], took: performance.now() - start };
    };
    const known = await ask(person.email);
    const unknown = await ask('nobody@people.example');
    expect(unknown.said).toEqual(known.said);
    // Neither is answered before the time in which writing the mail is done.
    expect(Math.min(known.took, unknown.took)).toBeGreaterThan(140);
    await newestMail(server, mailbox, person.email);
    expect(mailbox.letters.list({ to: 'nobody@people.example' })).toEqual([]);
  });

  it('refuses a link that ran out', async () => {
    await browser().call('account.requestReset', { body: { email: person.email } });
    const token = tokenIn(await newestMail(server, mailbox, person.email));
    await platformRows('update mailed_tokens set expires_at = now() where user_id = $id', {
      id: person.userId,
    });
    const late = await browser().call('account.reset', { body: { token, password: newPassword } });
    expect(late.status).toBe(404);
  });

  it('changes its password for who knows the present one, and signs out the others', async () => {
    const { tab, token } = await signedIn();
    const other = await signedIn();
    const change = (current: string) =>
      tab.call('account.changePassword', { token, body: { current, password: newPassword } });
    expect((await change('not it at all')).status).toBe(401);
    expect((await change(goodPassword)).status).toBe(204);
    expect((await tab.call('session.refresh')).status).toBe(200);
    expect((await other.tab.call('session.refresh')).status).toBe(401);
    expect((await signedIn(newPassword)).status).toBe(200);
  });

  it('cannot be guessed at from an open screen', async () => {
    const { tab, token } = await signedIn();
    const change = (current: string) =>
      tab.call('account.changePassword', { token, body: { current, password: newPassword } });
    for (let i = 0; i < 8; i++) await change(`guess number ${i}`);
    expect((await change(goodPassword)).status).toBe(401);
    // The person at another place does not notice.
    expect((await signedIn()).status).toBe(200);
  });
});
