import { addDays, tradeDayOf } from '@lib/domain';
import { systemContext } from '../../server/src/core/context';
import { createFirstEdition } from '../../server/src/features/prices/create-first-edition';
import { firstBook } from '../../server/src/features/prices/first-book';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, buildShop, type TestShop } from '../support/factories';
import { walk } from '../support/lists';
import { buildTicket } from '../support/tickets';

describe('the price book', () => {
  let server: TestServer;
  let shop: TestShop;
  let owner: ReturnType<typeof api>;
  const book = firstBook('USD');
  const today = () => tradeDayOf(new Date(), 'America/New_York');

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    shop = await buildShop();
    owner = api(server.app, (await buildPerson(shop, 'shop_owner')).token);
  });

  const dearer = (normalPerHour: number) => ({
    ...book,
    labour: { ...book.labour, normalPerHour },
  });

  it('is made once for a new shop', async () => {
    const context = systemContext(shop.id, new Date());
    await createFirstEdition(context);
    await createFirstEdition(context);
    const editions = await walk(owner, 'editions.list');
    expect(editions).toMatchObject([{ number: 1, inForce: true }]);
    expect((await owner.call('prices.inForce')).body.book).toEqual(book);
  });

  it('has for each day the edition that began last, of two of one day the later', async () => {
    await createFirstEdition(systemContext(shop.id, new Date()));
    const put = (validFrom: string, rate: number) =>
      owner.call('editions.create', { body: { validFrom, book: dearer(rate) } });
    const later = addDays(today(), 10);
    expect((await put(later, 100_00)).status).toBe(201);
    await put(today(), 90_00);
    await put(later, 110_00);
    const rateOn = async (on?: string) =>
      (await owner.call('prices.inForce', { query: on ? { on } : {} })).body.book.labour
        .normalPerHour;
    expect(await rateOn()).toBe(90_00);
    expect(await rateOn(addDays(later, -1))).toBe(90_00);
    expect(await rateOn(later)).toBe(110_00);
    const list = await walk(owner, 'editions.list', { limit: 2 });
    expect(list.map((e) => e.inForce).filter(Boolean)).toHaveLength(1);
    expect(list).toHaveLength(4);
    const before = await owner.call('prices.inForce', { query: { on: '1999-01-01' } });
    expect(before.status).toBe(404);
  });

  it('takes no edition for a past day once a ticket stands', async () => {
    const validFrom = addDays(today(), -5);
    expect((await owner.call('editions.create', { body: { validFrom, book } })).status).toBe(201);
    await buildTicket(shop);
    const late = await owner.call('editions.create', { body: { validFrom, book } });
    expect([late.status, late.body.errors[0].pointer]).toEqual([422, '/validFrom']);
    const now = await owner.call('editions.create', { body: { validFrom: today(), book } });
    expect(now.status).toBe(201);
  });

  it.each([
    [
      'no trip that holds everywhere',
      { trips: [{ label: 'Town', amount: 1, zone: 'Town' }] },
      '/book/trips',
    ],
    [
      'markup that begins above nothing',
      { markup: { ...book.markup, bands: [{ fromUnitCost: 100, basisPoints: 1 }] } },
      '/book/markup/bands',
    ],
    [
      'two rates for one place and day',
      {
        taxes: {
          rounding: 'line',
          rates: Array(2).fill({
            place: '',
            kind: 'part',
            basisPoints: 1,
            validFrom: '2031-01-01',
          }),
        },
      },
      '/book/taxes/rates',
    ],
    [
      'a day that does not exist',
      {
        taxes: {
          rounding: 'line',
          rates: [{ place: '', kind: 'part', basisPoints: 1, validFrom: '2031-02-30' }],
        },
      },
      '/book/taxes/rates/0/validFrom',
    ],
    [
      'steps of no minutes',
      { labour: { ...book.labour, incrementMinutes: 0 } },
      '/book/labour/incrementMinutes',
    ],
    ['fractions of a cent', { tripCost: 0.5 }, '/book/tripCost'],
    [
      'a price for a part nobody knows',
      { partPrices: [{ partId: '01890000-0000-7000-8000-000000000000', unitPrice: 1 }] },
      '/book/partPrices/0/partId',
    ],
    ['a field nobody knows', { surcharge: 1 }, '/book/surcharge'],
  ])('refuses %s at its place', async (_, wrong, pointer) => {
    const answer = await owner.call('editions.create', {
      body: { validFrom: today(), book: { ...book, ...wrong } },
    });
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map((e: { pointer: string }) => e.pointer)).toContain(pointer);
    expect((await owner.call('editions.list')).body.count.value).toBe(0);
  });

  it('is the owner to change, and nothing a client sees', async () => {
    const office = api(server.app, (await buildPerson(shop, 'office')).token);
    const body = { validFrom: today(), book };
    expect((await office.call('editions.create', { body })).status).toBe(403);
    expect((await office.call('editions.list')).status).toBe(200);
  });
});

describe('parts', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  async function office() {
    const shop = await buildShop();
    return api(server.app, (await buildPerson(shop, 'office')).token);
  }
  const part = (number: string, more: Record<string, unknown> = {}) => ({
    number,
    name: `Part ${number}`,
    category: 'Door',
    unitCost: 12_50,
    ...more,
  });

  it('are followed from a superseded number to the last', async () => {
    const client = await office();
    const add = async (number: string, more = {}) =>
      (await client.call('parts.create', { body: part(number, more) })).body;
    const newest = await add('N-3');
    const middle = await add('N-2', { supersededBy: newest.id });
    const oldest = await add('N-1', { supersededBy: middle.id });
    expect(oldest.successor).toEqual({ id: newest.id, number: 'N-3', name: 'Part N-3' });
    expect(newest.successor).toBeNull();
    const list = await walk(client, 'parts.list', { sort: 'number' });
    expect(list.map((p) => (p.successor as { number: string } | null)?.number)).toEqual([
      'N-3',
      'N-3',
      undefined,
    ]);
    const circle = await client.call('parts.change', {
      params: { partId: newest.id },
      version: newest.version,
      body: { supersededBy: oldest.id },
    });
    expect([circle.status, circle.body.errors[0].detail]).toEqual([422, 'leads back to this part']);
  });

  it('are found by number, name, category and supplier', async () => {
    const client = await office();
    await client.call('parts.create', { body: part('HG-9', { supplier: 'Merrow Supply' }) });
    await client.call('parts.create', { body: part('PU-1', { category: 'pump', scarce: true }) });
    const numbers = async (query: Record<string, unknown>) =>
      (await walk(client, 'parts.list', query)).map((p) => p.number);
    expect(await numbers({ q: 'merrow' })).toEqual(['HG-9']);
    expect(await numbers({ category: 'PUMP' })).toEqual(['PU-1']);
    expect((await client.call('parts.categories')).body.items).toEqual(['door', 'pump']);
    const twin = await client.call('parts.create', { body: part('HG-9') });
    expect([twin.status, twin.body.errors[0].pointer]).toEqual([422, '/number']);
  });

  it('end and are offered again', async () => {
    const client = await office();
    const { body } = await client.call('parts.create', { body: part('X-1') });
    const params = { partId: body.id };
    const ended = await client.call('parts.end', { params, version: body.version });
    expect((await client.call('parts.list')).body.items).toEqual([]);
    const back = await client.call('parts.resume', { params, version: ended.body.version });
    expect(back.body.endedAt).toBeNull();
  });
});
