import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, buildShop } from '../support/factories';
import { buildTicket } from '../support/tickets';
import { createFirstEdition } from '../../server/src/features/prices/create-first-edition';
import { systemContext } from '../../server/src/core/context';

describe('settings of a shop', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  async function signedIn(role: 'shop_owner' | 'office' | 'tech' = 'shop_owner') {
    const shop = await buildShop();
    const person = await buildPerson(shop, role);
    return { shop, person, client: api(server.app, person.token) };
  }

  it('shows and changes what was sent, and nothing else', async () => {
    const { client } = await signedIn();
    const before = (await client.call('shop.show')).body;
    const body = { address: '4 Alder Row\nMillbrook', termsDays: 30, phone: '+1 555 0100' };
    const changed = await client.call('shop.change', { version: before.version, body });
    expect(changed.status).toBe(200);
    expect(changed.body).toEqual({ ...before, ...body, version: before.version + 1 });
    expect(changed.headers.etag).toBe(`"${before.version + 1}"`);
  });

  it('refuses a change of what somebody else changed meanwhile', async () => {
    const { client } = await signedIn();
    const { version } = (await client.call('shop.show')).body;
    await client.call('shop.change', { version, body: { termsDays: 10 } });
    const late = await client.call('shop.change', { version, body: { termsDays: 20 } });
    expect([late.status, late.body.type]).toEqual([412, expect.stringContaining('stale-version')]);
    expect((await client.call('shop.show')).body.termsDays).toBe(10);
  });

  it('names each field that is not right', async () => {
    const { client } = await signedIn();
    const { version } = (await client.call('shop.show')).body;
    const wrong = { zone: 'Mars/Olympus', statementDay: 31, replyTo: 'nobody', logo: 'x' };
    const answer = await client.call('shop.change', { version, body: wrong });
    expect(answer.status).toBe(422);
    const pointers = answer.body.errors.map((e: { pointer: string }) => e.pointer).sort();
    expect(pointers).toEqual(['/logo', '/replyTo', '/statementDay', '/zone']);
  });

  it('is for the owner to change, for the crew to read', async () => {
    const { client } = await signedIn('tech');
    expect((await client.call('shop.show')).status).toBe(200);
    const answer = await client.call('shop.change', { version: 1, body: { termsDays: 1 } });
    expect(answer.status).toBe(403);
  });

  it('changes the currency with the price book, until a ticket stands in it', async () => {
    const { shop, client } = await signedIn();
    await createFirstEdition(systemContext(shop.id, new Date()));
    const { version } = (await client.call('shop.show')).body;
    const yen = await client.call('shop.change', { version, body: { currency: 'JPY' } });
    expect(yen.body).toMatchObject({ currency: 'JPY', currencyFixed: false });
    const book = (await client.call('prices.inForce')).body.book;
    expect(book.labour.normalPerHour).toBe(14_250);

    const none = await client.call('shop.change', {
      version: yen.body.version,
      body: { currency: 'XQX' },
    });
    expect(none.status).toBe(422);

    await buildTicket(shop);
    const fixed = await client.call('shop.show');
    expect(fixed.body.currencyFixed).toBe(true);
    const late = await client.call('shop.change', {
      version: fixed.body.version,
      body: { currency: 'EUR' },
    });
    expect([late.status, late.body.errors[0].pointer]).toEqual([422, '/currency']);
    expect((await client.call('shop.show')).body.currency).toBe('JPY');
  });

  it('notes once that the first settings are made', async () => {
    const shop = await buildShop();
    const { token } = await buildPerson(shop, 'shop_owner');
    const client = api(server.app, token);
    const first = (await client.call('settings.finishSetUp')).body.setUpAt;
    expect(first).toEqual(expect.any(String));
    expect((await client.call('settings.finishSetUp')).body.setUpAt).toBe(first);
  });
});
