import { write } from '../../server/src/core/database/tenancy';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildBank,
  buildClient,
  buildLaundry,
  buildMachine,
  buildPerson,
  buildShop,
  buildStore,
  insert,
  inShop,
  type TestShop,
} from '../support/factories';
import { limitPlan } from '../support/plans';
import { walk } from '../support/lists';
import { buildVisitRow } from '../support/tickets';
import { type Caller, setUpOffice } from '../support/set-ups';

describe('stores', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: Caller;

  setUpOffice((made) => ({ server, shop, office } = made));

  it('are added to a client of the shop only', async () => {
    const clientId = await buildClient(shop);
    const made = await office.call('stores.create', {
      body: { clientId, name: 'Foxglove Lane', tripMetres: 12_400, taxPlace: 'MN/Hennepin' },
    });
    expect(made.body).toMatchObject({ number: 'S-001', tripMetres: 12_400, machines: { up: 0 } });

    const foreign = await buildLaundry(await buildShop(), 0);
    const refused = await office.call('stores.create', {
      body: { clientId: foreign.clientId, name: 'Over there' },
    });
    expect([refused.status, refused.body.errors[0].pointer]).toEqual([422, '/clientId']);
    const params = { storeId: foreign.storeId };
    expect((await office.call('stores.show', { params })).status).toBe(404);
  });

  it('tell their counts, conditions, open items and calls', async () => {
    const { clientId, storeId, bankId, machineIds } = await buildLaundry(shop, 2);
    const at = { client_id: clientId, store_id: storeId };
    await buildMachine(shop, { ...at, bank_id: bankId, state: 'degraded' });
    const machine_id = machineIds[0];
    await insert(shop, 'conditions', { ...at, machine_id, kind: 'hazard', words: 'Live lead' });
    await insert(shop, 'conditions', {
      ...at,
      kind: 'access',
      words: 'Gone',
      cleared_at: new Date(),
    });
    const visit_id = await buildVisitRow(shop, { ...at, state: 'completed' });
    await insert(shop, 'open_items', { ...at, visit_id, machine_id, words: 'Fit the new hinge' });
    await insert(shop, 'calls', {
      ...at,
      number: 1,
      symptom: 'leaks',
      reported_by: 'Abel',
      reported_via: 'office',
    });
    const { body } = await office.call('stores.show', { params: { storeId } });
    expect(body.machines).toEqual({ up: 2, degraded: 1, down: 0, lockedOut: 0 });
    expect(body.conditions).toEqual([
      expect.objectContaining({
        words: 'Live lead',
        machine: expect.objectContaining({ id: machine_id }),
      }),
    ]);
    expect(body.openItems).toMatchObject([{ words: 'Fit the new hinge' }]);
    expect(body.openCalls).toBe(1);
  });

  it('draw their floor in the order of banks and bays, without retired machines', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 0);
    const of = { client_id: clientId, store_id: storeId };
    const second = await insert(shop, 'banks', { ...of, letter: 'B' });
    const put = (bank: string, bay: string, n: number, state = 'up') =>
      buildMachine(shop, { ...of, bank_id: bank, bay, bay_number: n, state });
    await put(second, 'B-01', 1, 'locked_out');
    await put(bankId, 'A-10', 10);
    const nine = await put(bankId, 'A-09', 9, 'down');
    await put(bankId, 'A-11', 11, 'retired');
    await insert(shop, 'conditions', { ...of, machine_id: nine, kind: 'access', words: 'Plinth' });
    const { body } = await office.call('stores.floor', { params: { storeId } });
    expect(
      body.banks.map((bank: { letter: string; machines: { bay: string; state: string }[] }) => [
        bank.letter,
        bank.machines.map((m) => `${m.bay} ${m.state}`),
      ]),
    ).toEqual([
      ['A', ['A-09 down', 'A-10 up']],
      ['B', ['B-01 locked_out']],
    ]);
    expect(body.banks[0].machines[0]).toMatchObject({ conditions: 1, openCalls: 0 });
  });

  it('are one to an attendant, whatever is asked for', async () => {
    const { clientId, storeId } = await buildLaundry(shop, 1);
    const sister = await buildStore(shop, { client_id: clientId });
    const attendant = api(
      server.app,
      (await buildPerson(shop, 'attendant', { clientId, storeId })).token,
    );
    const list = (await attendant.call('stores.list')).body;
    expect([list.items.map((s: { id: string }) => s.id), list.count.value]).toEqual([[storeId], 1]);
    for (const id of ['stores.show', 'stores.floor', 'conditions.list'] as const) {
      expect((await attendant.call(id, { params: { storeId } })).status).toBe(200);
      expect((await attendant.call(id, { params: { storeId: sister } })).status).toBe(404);
    }
    // Nor do the counts of the client tell of its other stores, or the client of its terms.
    await insert(shop, 'machines', {
      client_id: clientId,
      store_id: sister,
      bank_id: await buildBank(shop, { client_id: clientId, store_id: sister }),
      bay: 'A-01',
      bay_number: 1,
      kind: 'dryer',
      state: 'down',
      sticker_code: 'SISTER',
    });
    await inShop(shop, () =>
      write(
        `update clients set terms_days = 9, tax_exempt = true, tax_exempt_reference = 'T-9'
         where shop_id = $shopId and id = $clientId`,
        { shopId: shop.id, clientId },
      ),
    );
    const seen = await attendant.call('clients.show', { params: { clientId } });
    expect(seen.body).toMatchObject({
      stores: 1,
      machines: 1,
      machinesNotUp: 0,
      termsDays: null,
      taxExempt: false,
      taxExemptReference: '',
    });
    const [listed] = (await attendant.call('clients.list')).body.items;
    expect(listed).toMatchObject({ stores: 1, machines: 1, machinesNotUp: 0 });
  });

  it('list by client, search in address and client, and page without gap or double', async () => {
    const clientId = await buildClient(shop, { name: 'Harbour Suds' });
    for (let i = 0; i < 12; i++) {
      await buildStore(shop, { client_id: clientId, name: 'Same name', address: `${i} Quay` });
    }
    const other = await buildLaundry(shop, 0);
    expect((await walk(office, 'stores.list', { clientId, limit: 5 })).length).toBe(12);
    expect((await walk(office, 'stores.list', { clientId: other.clientId })).length).toBe(1);
    expect((await walk(office, 'stores.list', { q: '11 quay' })).length).toBe(1);
    expect((await walk(office, 'stores.list', { q: 'harbour', sort: 'number' })).length).toBe(12);
  });

  it('end and resume, within the plan', async () => {
    const clientId = await buildClient(shop);
    const first = (await office.call('stores.create', { body: { clientId, name: 'One' } })).body;
    await limitPlan(shop, { store_limit: 1 });
    const past = await office.call('stores.create', { body: { clientId, name: 'Two' } });
    expect([past.status, past.body.detail]).toEqual([403, expect.stringContaining('1 of 1 store')]);
    const params = { storeId: first.id };
    const ended = await office.call('stores.end', { params, version: first.version });
    expect(ended.body.endedAt).not.toBeNull();
    const two = await office.call('stores.create', { body: { clientId, name: 'Two' } });
    expect(two.status).toBe(201);
    const back = await office.call('stores.resume', { params, version: ended.body.version });
    expect(back.status).toBe(403);
    expect((await walk(office, 'stores.list', { show: 'all' })).length).toBe(2);
  });

  it('are not doubled past a plan by two who add at once', async () => {
    const clientId = await buildClient(shop);
    await limitPlan(shop, { store_limit: 1 });
    const both = await Promise.all(
      ['One', 'Two'].map((name) => office.call('stores.create', { body: { clientId, name } })),
    );
    expect(both.map((answer) => answer.status).sort()).toEqual([201, 403]);
  });
});
