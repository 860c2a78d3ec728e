import { startTestServer, type TestServer } from '../support/app';
import { Browser } from '../support/browser';
import { buildPerson, buildShop } from '../support/factories';
import { givePassword, goodPassword } from '../support/people';

// As deployed: https in front, and passwords that are dear to check.
describe('signing in to a deployed installation', () => {
  let server: TestServer;

  beforeAll(async () => {
    server = await startTestServer({
      NODE_ENV: 'production',
      PUBLIC_URL: 'https://tumblewright.example',
    });
  });
  afterAll(() => server.close());

  async function owner() {
    const person = await buildPerson(await buildShop(), 'shop_owner');
    await givePassword(person);
    return person;
  }

  it('gives its cookies over https only', async () => {
    const tab = new Browser(server.app);
    const { email } = await owner();
    await tab.call('session.signIn', { body: { email, password: goodPassword } });
    for (const name of ['tw_refresh', 'tw_device']) {
      expect(tab.attributes.get(name)).toMatchObject({ secure: true, httpOnly: true });
    }
  });

  it('takes as long for an unknown address as for a known one', async () => {
    const person = await owner();
    const tab = new Browser(server.app);
    const time = async (email: string) => {
      const start = performance.now();
      await tab.call('session.signIn', { body: { email, password: 'not it at all' } });
      return performance.now() - start;
    };
    const known: number[] = [];
    const unknown: number[] = [];
    for (let i = 0; i < 4; i++) {
      known.push(await time(person.email));
      unknown.push(await time(`nobody-${i}@people.example`));
    }
    // A missing hash would show as a factor of ten and more.
    const ratio = Math.min(...unknown) / Math.min(...known);
    expect(ratio).toBeGreaterThan(0.5);
    expect(ratio).toBeLessThan(2);
  });
});
