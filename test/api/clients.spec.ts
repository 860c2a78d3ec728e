import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildClient,
  buildLaundry,
  buildMachine,
  buildPerson,
  buildShop,
  buildStore,
  type TestShop,
} from '../support/factories';
import { walk } from '../support/lists';
import { buildVisitRow } from '../support/tickets';
import { type Caller, setUpOffice } from '../support/set-ups';

describe('clients', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: Caller;

  setUpOffice((made) => ({ server, shop, office } = made));

  it('numbers a client that was given no number, past numbers given by hand', async () => {
    await office.call('clients.create', { body: { name: 'Given', number: 'C-002' } });
    const first = await office.call('clients.create', { body: { name: 'Alder Suds' } });
    const second = await office.call('clients.create', { body: { name: 'Birch Suds' } });
    expect(first.status).toBe(201);
    expect([first.body.number, second.body.number]).toEqual(['C-001', 'C-003']);
  });

  it('names the field when a number is taken, and keeps what was there', async () => {
    await buildClient(shop, { number: 'K7' });
    const taken = await office.call('clients.create', { body: { name: 'Twin', number: 'K7' } });
    expect(taken.status).toBe(422);
    expect(taken.body.errors).toEqual([
      { pointer: '/number', detail: 'is the number of another client' },
    ]);
    expect((await office.call('clients.list')).body.count).toEqual({ value: 1, capped: false });
  });

  it('keeps what one client agreed on, and shows it to the shop only', async () => {
    const overrides = { normalPerHour: 88_00, discountBasisPoints: 500 };
    const made = await office.call('clients.create', {
      body: { name: 'Cedar Wash', overrides, note: 'Pays late', taxExempt: true },
    });
    expect(made.body).toMatchObject({ overrides, note: 'Pays late', taxExempt: true });
    const owner = await buildPerson(shop, 'client_owner', { clientId: made.body.id });
    const seen = await api(server.app, owner.token).call('clients.show', {
      params: { clientId: made.body.id },
    });
    expect(seen.body).toMatchObject({ name: 'Cedar Wash', overrides: null, note: null });
  });

  it('shows people of a client their own client and no other', async () => {
    const mine = await buildClient(shop);
    const other = await buildClient(shop);
    const owner = api(
      server.app,
      (await buildPerson(shop, 'client_owner', { clientId: mine })).token,
    );
    const list = (await owner.call('clients.list')).body;
    expect(list.items.map((c: { id: string }) => c.id)).toEqual([mine]);
    expect((await owner.call('clients.show', { params: { clientId: other } })).status).toBe(404);
  });

  it('counts stores and machines, and what is not up', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 2);
    const at = { client_id: clientId, store_id: storeId, bank_id: bankId };
    await buildMachine(shop, { ...at, state: 'down' });
    await buildMachine(shop, { ...at, state: 'retired' });
    await buildStore(shop, { client_id: clientId, ended_at: new Date() });
    const { body } = await office.call('clients.show', { params: { clientId } });
    expect(body).toMatchObject({ stores: 1, machines: 3, machinesNotUp: 1 });
  });

  it('lists in either order, page by page, without a gap or a double', async () => {
    for (let i = 0; i < 23; i++) await buildClient(shop, { name: `Suds ${i % 5}` });
    for (const sort of ['name', 'number'] as const) {
      const all = await walk(office, 'clients.list', { sort, limit: 5 });
      expect(new Set(all.map((c) => c.id)).size).toBe(23);
      const keys = all.map((c) => String(c[sort]));
      expect(keys).toEqual([...keys].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0)));
    }
  });

  it('finds by part of a name, takes wildcards as they are written, refuses a made-up cursor', async () => {
    await buildClient(shop, { name: 'Foxglove Laundries' });
    await buildClient(shop, { name: '100% Clean' });
    const q = async (text: string) =>
      (await office.call('clients.list', { query: { q: text } })).body.items.map(
        (c: { name: string }) => c.name,
      );
    expect(await q('glove L')).toEqual(['Foxglove Laundries']);
    expect(await q('0%')).toEqual(['100% Clean']);
    expect(await q('_')).toEqual([]);
    const made = await office.call('clients.list', { query: { cursor: 'bm9wZQ' } });
    expect([made.status, made.body.errors[0].pointer]).toEqual([422, '/cursor']);
  });

  it('ends a client with its stores, but not while a visit is planned', async () => {
    const { clientId, storeId } = await buildLaundry(shop, 1);
    const { version } = (await office.call('clients.show', { params: { clientId } })).body;
    const ask = { params: { clientId }, version };
    const visit = { client_id: clientId, store_id: storeId };
    const other = await buildLaundry(shop, 1);
    await buildVisitRow(shop, {
      client_id: other.clientId,
      store_id: other.storeId,
      state: 'planned',
    });
    const ended = await office.call('clients.end', ask);
    expect([ended.status, ended.body.stores]).toEqual([200, 0]);
    expect(ended.body.endedAt).toEqual(expect.any(String));
    const resumed = await office.call('clients.resume', { ...ask, version: ended.body.version });
    expect(resumed.body.endedAt).toBeNull();

    await buildVisitRow(shop, { ...visit, state: 'confirmed' });
    const refused = await office.call('clients.end', { ...ask, version: resumed.body.version });
    expect(refused.status).toBe(409);
    const now = (await office.call('clients.show', { params: { clientId } })).body;
    expect([now.endedAt, now.version]).toEqual([null, resumed.body.version]);
  });

  it('gives the first answer again for the same key', async () => {
    const ask = { body: { name: 'Once' }, key: 'a-key-made-on-a-device' };
    const first = await office.call('clients.create', ask);
    const again = await office.call('clients.create', ask);
    expect(again.body).toEqual(first.body);
    expect(again.headers['idempotency-replayed']).toBe('true');
    expect((await office.call('clients.list')).body.count.value).toBe(1);
  });

  it('is nothing a tech may change', async () => {
    const tech = api(server.app, (await buildPerson(shop, 'tech')).token);
    expect((await tech.call('clients.create', { body: { name: 'No' } })).status).toBe(403);
  });
});

describe('contacts', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());

  it('are of a client or of one of its stores, and need an address to be sent statements', async () => {
    const shop = await buildShop();
    const office = api(server.app, (await buildPerson(shop, 'office')).token);
    const { clientId, storeId } = await buildLaundry(shop, 0);
    const elsewhere = await buildLaundry(shop, 0);
    const add = (body: Record<string, unknown>) =>
      office.call('contacts.create', { body: { clientId, name: 'Ines Marlow', ...body } });

    const mute = await add({ getsStatements: true });
    expect([mute.status, mute.body.errors[0].pointer]).toEqual([422, '/email']);
    const foreign = await add({ storeId: elsewhere.storeId });
    expect([foreign.status, foreign.body.errors[0].pointer]).toEqual([422, '/storeId']);

    const ofClient = await add({ email: 'Ines@Laundry.example', getsStatements: true });
    expect(ofClient.body).toMatchObject({ email: 'ines@laundry.example', store: null });
    const ofStore = await add({ storeId, name: 'Abel Marlow', phone: '+1 555 0111' });
    const list = async (query: Record<string, unknown>) =>
      (await office.call('contacts.list', { query })).body.items.map(
        (c: { name: string }) => c.name,
      );
    expect(await list({ storeId })).toEqual(['Abel Marlow', 'Ines Marlow']);
    expect(await list({ clientId: elsewhere.clientId })).toEqual([]);

    const params = { contactId: ofClient.body.id };
    const dropped = await office.call('contacts.change', {
      params,
      version: ofClient.body.version,
      body: { email: null },
    });
    expect(dropped.status).toBe(422);
    const ended = await office.call('contacts.end', {
      params: { contactId: ofStore.body.id },
      version: ofStore.body.version,
    });
    expect(ended.status).toBe(200);
    expect(await list({ storeId })).toEqual(['Ines Marlow']);
    expect(await list({ storeId, show: 'ended' })).toEqual(['Abel Marlow']);
  });
});
