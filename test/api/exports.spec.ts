import { parse } from 'csv-parse/sync';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildClient,
  buildLaundry,
  buildMachine,
  buildPerson,
  buildStore,
  insert,
  type TestShop,
} from '../support/factories';
import { pauseShop } from '../support/plans';
import { workQueue } from '../support/queue';
import { type Caller, setUpOffice } from '../support/set-ups';

describe('exports', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: Caller;

  setUpOffice((made) => ({ server, shop, office } = made));

  const download = (kind: string, query: Record<string, string> = {}) =>
    office.call('exports.download', { params: { kind }, query });
  async function table(kind: string, query: Record<string, string> = {}) {
    const { status, text } = await download(kind, query);
    expect(status).toBe(200);
    return parse(text, { bom: true, columns: true }) as Record<string, string>[];
  }

  it('give out each list as a file for a spreadsheet', async () => {
    const { clientId, storeId } = await buildLaundry(shop, 2);
    await insert(shop, 'contacts', { client_id: clientId, store_id: storeId, name: 'Ines' });
    await insert(shop, 'parts', { number: 'P', name: 'Hinge', category: 'door', unit_cost: 1840 });
    for (const [kind, rows] of Object.entries({
      clients: 1,
      stores: 1,
      contacts: 1,
      machines: 2,
      parts: 1,
    })) {
      const answer = await download(kind);
      expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8');
      expect(answer.headers['content-disposition']).toMatch(
        new RegExp(`^attachment; filename="${kind}-\\d{4}-\\d\\d-\\d\\d.csv"$`),
      );
      expect(answer.text.startsWith('\ufeff')).toBe(true);
      expect([kind, (await table(kind)).length]).toEqual([kind, rows]);
    }
    expect((await table('parts'))[0]).toMatchObject({ 'Unit cost': '18.40', Scarce: 'no' });
  });

  it.each(['=1+1', '+1 555 0100', '-2+3', '@SUM(A1)', '\t=1', '=HYPERLINK("http://x","y")'])(
    'leave no cell a spreadsheet would compute: %j',
    async (name) => {
      await buildClient(shop, { name });
      const [row] = await table('clients');
      expect(row?.['Client name']).toBe(`'${name}`);
    },
  );

  it('keep quotation marks, separators and line breaks in their cells', async () => {
    const note = 'says "no", twice;\nthen pays';
    await buildClient(shop, { note });
    expect((await table('clients'))[0]?.Note).toBe(note);
  });

  it('come back unchanged: what was given out is taken in as it stands', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 3);
    await buildMachine(shop, {
      client_id: clientId,
      store_id: storeId,
      bank_id: bankId,
      serial: '=SN-1',
      vend_price: 350,
      amps: 12.5,
      note: '- smells\n"odd"',
    });
    await insert(shop, 'contacts', {
      client_id: clientId,
      store_id: storeId,
      name: 'Ines Marlow',
      email: 'ines@laundry.example',
      phone: '+1 555 0100',
      gets_statements: true,
    });
    const next = await insert(shop, 'parts', {
      number: 'N-2',
      name: '@hinge',
      category: 'door',
      unit_cost: 99,
    });
    await insert(shop, 'parts', {
      number: 'N-1',
      name: 'Hinge',
      category: 'door',
      unit_cost: 1840,
      fixed_price: 4000,
      superseded_by: next,
    });
    for (const [kind, rows] of Object.entries({ stores: 1, machines: 4, parts: 2 })) {
      const content = Buffer.from((await download(kind)).text);
      const sent = await office.call('imports.start', {
        file: { name: 'back.csv', content },
        body: { kind },
      });
      expect([kind, sent.status]).toEqual([kind, 202]);
      await workQueue(server, 'import-work');
      const found = await office.call('imports.show', { params: { importId: sent.body.id } });
      expect([kind, found.body.counts]).toEqual([
        kind,
        { new: 0, changed: 0, unchanged: rows, bad: 0 },
      ]);
    }
  });

  it('give out all of a long list, each row once, and ended rows when they are asked for', async () => {
    const clientId = await buildClient(shop);
    for (let i = 0; i < 1203; i++) {
      await buildStore(shop, { client_id: clientId, number: `N${String(i % 7)}-${i}` });
    }
    await buildStore(shop, { client_id: clientId, ended_at: new Date() });
    const numbers = (await table('stores')).map((row) => row['Store number']);
    expect([numbers.length, new Set(numbers).size]).toEqual([1203, 1203]);
    expect(await table('stores', { show: 'ended' })).toHaveLength(1);
    expect(await table('stores', { show: 'all' })).toHaveLength(1204);
  });

  it('go on while the shop is paused, for the office and nobody else', async () => {
    const { clientId } = await buildLaundry(shop, 1);
    const owner = await buildPerson(shop, 'client_owner', { clientId });
    await pauseShop(shop);
    expect(await table('machines')).toHaveLength(1);
    const asked = { params: { kind: 'machines' } };
    expect((await api(server.app, owner.token).call('exports.download', asked)).status).toBe(403);
    expect((await office.call('clients.create', { body: { name: 'No' } })).status).toBe(403);
    const unknown = await office.call('exports.download', { params: { kind: 'ledger' } });
    expect(unknown.status).toBe(422);
  });
});
