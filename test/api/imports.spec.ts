import { v7 as uuid } from 'uuid';
import { systemContext } from '../../server/src/core/context';
import { claimImport } from '../../server/src/features/imports/claim';
import { sweepImports, workImport } from '../../server/src/features/imports/work-import';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildClient,
  buildLaundry,
  buildPerson,
  buildStore,
  inShop,
  type TestShop,
} from '../support/factories';
import { walk } from '../support/lists';
import { limitPlan, pauseShop } from '../support/plans';
import { workQueue } from '../support/queue';
import { type Caller, setUpOffice } from '../support/set-ups';
import { write } from '../../server/src/core/database/tenancy';

const storesFile = [
  'Client name,Store number,Store name,Address,Statement contact,Statement e-mail',
  'Harbour Suds,S-1,Foxglove Lane,"12 Foxglove Lane\nMillbrook",Ines Marlow,Ines@laundry.example',
  'Harbour Suds,S-2,Quay Street,3 Quay Street,,',
  'Birch Wash,S-3,"The ""Corner""",,,',
  '',
].join('\r\n');

describe('imports', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: Caller;

  setUpOffice((made) => ({ server, shop, office } = made));

  function send(kind: string, content: string | Buffer, id?: string) {
    const file = { name: `${kind}.csv`, content: Buffer.from(content) };
    return office.call('imports.start', { file, body: { kind, ...(id ? { id } : {}) } });
  }
  const show = async (importId: string) =>
    (await office.call('imports.show', { params: { importId } })).body;
  async function checked(kind: string, content: string | Buffer) {
    const sent = await send(kind, content);
    expect([sent.status, sent.body.errors]).toEqual([202, undefined]);
    await workQueue(server, 'import-work');
    return show(sent.body.id);
  }
  async function apply(of: { id: string; version: number }) {
    const answer = await office.call('imports.apply', {
      params: { importId: of.id },
      version: of.version,
    });
    await workQueue(server, 'import-work');
    return answer;
  }
  const rowsOf = (importId: string, query: Record<string, unknown> = {}) =>
    walk(office, 'imports.rows', query, { importId });

  it('show what a file would do before anything is done, and then do it', async () => {
    const found = await checked('stores', storesFile);
    expect(found).toMatchObject({
      state: 'checked',
      rowsTotal: 3,
      rowsDone: 3,
      counts: { new: 3, changed: 0, unchanged: 0, bad: 0 },
      problem: null,
    });
    expect((await walk(office, 'stores.list')).length).toBe(0);

    expect((await apply(found)).status).toBe(202);
    expect((await show(found.id)).state).toBe('applied');
    const stores = await walk(office, 'stores.list', { sort: 'number' });
    expect(stores.map((s) => s.name)).toEqual(['Foxglove Lane', 'Quay Street', 'The "Corner"']);
    expect(stores[0]?.address).toBe('12 Foxglove Lane\nMillbrook');
    const clients = await walk(office, 'clients.list');
    expect(clients.map((c) => [c.name, c.number, c.stores])).toEqual([
      ['Birch Wash', 'C-002', 1],
      ['Harbour Suds', 'C-001', 2],
    ]);
    const contacts = await walk(office, 'contacts.list');
    expect(contacts).toMatchObject([
      { name: 'Ines Marlow', email: 'ines@laundry.example', getsStatements: true },
    ]);
  });

  it('find everything unchanged when the same file comes again', async () => {
    await apply(await checked('stores', storesFile));
    const again = await checked('stores', storesFile);
    expect(again.counts).toEqual({ new: 0, changed: 0, unchanged: 3, bad: 0 });
    await apply(again);
    expect((await walk(office, 'stores.list')).length).toBe(3);
    expect((await walk(office, 'clients.list')).length).toBe(2);
    expect((await walk(office, 'contacts.list')).length).toBe(1);
  });

  it('tell of a changed row what it would change, and leave what an empty cell stands for', async () => {
    await apply(await checked('stores', storesFile));
    const file = [
      'Store number;Store name;Address;Statement contact;Statement e-mail;Statement telephone',
      'S-1;Foxglove Lane East;;Ines Marlow;ines@laundry.example;+1 555 0100',
    ].join('\n');
    const found = await checked('stores', file);
    expect(found.counts).toEqual({ new: 0, changed: 1, unchanged: 0, bad: 0 });
    expect((await rowsOf(found.id))[0]?.changes).toEqual([
      { column: 'Store name', from: 'Foxglove Lane', to: 'Foxglove Lane East' },
      { column: 'Statement telephone', from: '', to: '+1 555 0100' },
    ]);
    await apply(found);
    const [store] = await walk(office, 'stores.list', { q: 'east' });
    expect(store?.address).toBe('12 Foxglove Lane\nMillbrook');
  });

  const utf16le = (text: string) => Buffer.from(text, 'utf16le');
  const utf16be = (text: string) => utf16le(text).swap16();
  it.each([
    ['UTF-8', (text: string) => Buffer.from(text)],
    ['UTF-8 with a mark', (text: string) => Buffer.from(`\ufeff${text}`)],
    ['UTF-16 little endian with a mark', (text: string) => utf16le(`\ufeff${text}`)],
    ['UTF-16 big endian with a mark', (text: string) => utf16be(`\ufeff${text}`)],
    ['UTF-16 little endian without', utf16le],
    ['UTF-16 big endian without', utf16be],
  ])('read %s with commas, semicolons and tabs', async (_, encode) => {
    for (const delimiter of [',', ';', '\t']) {
      const file = [
        ['Part number', 'Name', 'Category', 'Unit cost'],
        [
          `P${delimiter === '\t' ? 'tab' : delimiter === ';' ? 'semi' : 'comma'}`,
          'Türscharnier 洗',
          'door',
          '18.40',
        ],
      ]
        .map((row) => row.join(delimiter))
        .join('\n');
      const found = await checked('parts', encode(file));
      expect(found.counts).toEqual({ new: 1, changed: 0, unchanged: 0, bad: 0 });
      await apply(found);
    }
    const parts = await walk(office, 'parts.list');
    expect(parts).toHaveLength(3);
    expect(parts[0]).toMatchObject({ name: 'Türscharnier 洗', unitCost: 18_40 });
  });

  it('name each bad cell by row and column, counting rows as a spreadsheet does', async () => {
    await buildStore(shop, { client_id: await buildClient(shop), number: 'S-1' });
    const file = [
      'Store number,Bay,Kind,Make,Serial number,Built on,Vend price,Note',
      'S-1,A-01,Top loader,Norvane,N1,2029-03-01,3.50,"two\nlines"',
      '',
      'S-9,A-02,Dryer,,,,,',
      'S-1,A2x,Toaster,,,2030-02-30,"1,250.00",',
      'S-1,a 1,dryer,,,,,',
      'S-1,A-03,top_loader,Norvane,N1,,,',
      'S-1,,,,,,,,extra',
    ].join('\n');
    const found = await checked('machines', file);
    expect(found.counts).toEqual({ new: 1, changed: 0, unchanged: 0, bad: 5 });
    const bad = await rowsOf(found.id, { outcome: 'bad' });
    const said = bad.map((row) => [
      row.row,
      (row.errors as { column: string }[]).map((error) => error.column),
    ]);
    expect(said).toEqual([
      [4, ['Store number']],
      [5, ['Bay', 'Kind', 'Built on', 'Vend price']],
      [6, ['Bay']],
      [7, ['Serial number']],
      [8, ['', 'Bay', 'Kind']],
    ]);
    const refused = await apply(found);
    expect([refused.status, refused.body.detail]).toEqual([409, expect.stringContaining('5 rows')]);
    expect((await walk(office, 'machines.list')).length).toBe(0);
  });

  it('set machines into banks that come with them, and correct those that stand', async () => {
    await buildStore(shop, { client_id: await buildClient(shop), number: 'S-1' });
    const header = 'Store number,Bay,Kind,Energy,Make,Serial number,Vend price,Amps,Cycles a day';
    const file = [header, 'S-1,B-07,dryer,gas,Norvane,N7,"3,50",12.5,6.5', 'S-1,B-08,dryer,,,,,,'];
    await apply(await checked('machines', file.join('\n')));
    const machines = await walk(office, 'machines.list');
    expect(machines.map((m) => m.bay)).toEqual(['B-07', 'B-08']);
    const params = { machineId: String(machines[0]?.id) };
    const first = (await office.call('machines.show', { params })).body;
    expect(first).toMatchObject({ energy: 'gas', vendPrice: 350, amps: 12.5, cyclesADay: 6.5 });

    const second = await checked(
      'machines',
      [header, 'S-1,B-07,dryer,gas,Norvane,N7,4.00,,'].join('\n'),
    );
    expect((await rowsOf(second.id))[0]?.changes).toEqual([
      { column: 'Vend price', from: '3.50', to: '4.00' },
    ]);
    await apply(second);
    const now = (await office.call('machines.show', { params })).body;
    expect(now).toMatchObject({ vendPrice: 400, amps: 12.5, stickerCode: first.stickerCode });
    const other = await checked('machines', [header, 'S-1,B-07,dryer,,Norvane,N9,,,'].join('\n'));
    expect(other.counts.bad).toBe(1);
  });

  it('follow superseded parts within a file, and refuse a circle', async () => {
    const header = 'Part number,Name,Category,Unit cost,Superseded by';
    const file = [header, 'N-1,Old hinge,door,10,N-2', 'N-2,New hinge,door,12,'].join('\n');
    await apply(await checked('parts', file));
    const [old] = await walk(office, 'parts.list', { q: 'N-1' });
    expect(old?.successor).toMatchObject({ number: 'N-2' });
    const circle = await checked('parts', [header, 'N-2,New hinge,door,12,N-1'].join('\n'));
    expect(await rowsOf(circle.id)).toMatchObject([
      { outcome: 'bad', errors: [{ column: 'Superseded by', detail: 'leads back to this part' }] },
    ]);
  });

  it('take 10,000 rows, tell how far they are, and write them at once', async () => {
    await buildStore(shop, { client_id: await buildClient(shop), number: 'S-1' });
    const rows = Array.from(
      { length: 10_000 },
      (_, i) =>
        `S-1,${String.fromCharCode(65 + Math.floor(i / 900))}-${(i % 900) + 1},dryer,SN${i}`,
    );
    const file = ['Store number,Bay,Kind,Serial number', ...rows].join('\n');
    const begun = Date.now();
    const found = await checked('machines', file);
    expect(found).toMatchObject({ rowsDone: 10_000, counts: { new: 10_000, bad: 0 } });
    const page = await office.call('imports.rows', {
      params: { importId: found.id },
      query: { limit: 100 },
    });
    expect([page.body.items.length, page.body.count.value]).toEqual([100, 10_000]);
    await apply(found);
    expect(Date.now() - begun).toBeLessThan(45_000);
    expect((await office.call('clients.list')).body.items[0].machines).toBe(10_000);
    const again = await checked('machines', file);
    expect(again.counts).toEqual({ new: 0, changed: 0, unchanged: 10_000, bad: 0 });
  });

  it.each([
    ['no column the kind needs', 'Name,Colour\nx,y', 'no column'],
    ['a column nobody knows', 'Part number,Name,Category,Unit cost,Colour\n1,2,3,4,5', 'Colour'],
    ['a column twice', 'Part number,Name,Name,Category,Unit cost\n1,2,2,3,4', 'twice'],
    [
      'an encoding that cannot be told',
      Buffer.from('Part number,Name\n\xff\xe4', 'latin1'),
      'UTF-8',
    ],
    ['nothing', '', 'no column'],
  ])('refuse a file with %s before it is kept', async (_, content, words) => {
    const sent = await send('parts', content);
    expect([sent.status, sent.body.errors?.[0]]).toEqual([
      422,
      { pointer: '/file', detail: expect.stringContaining(words) },
    ]);
    expect((await office.call('imports.list')).body.items).toEqual([]);
  });

  it.each([
    ['no rows', 'Part number,Name,Category,Unit cost\n\n', 'no rows'],
    [
      'quotation marks that do not close',
      'Part number,Name,Category,Unit cost\nP1,"x,y,1\n',
      'quotation',
    ],
  ])('fail on %s, in words', async (_, content, words) => {
    const found = await checked('parts', content);
    expect([found.state, found.problem]).toEqual(['failed', expect.stringContaining(words)]);
  });

  it('are one import when a file is sent again under its id', async () => {
    const id = uuid();
    const first = await send('stores', storesFile, id);
    const again = await send('stores', storesFile, id);
    expect([first.body.id, again.body]).toEqual([id, first.body]);
    expect((await send('stores', `${storesFile}x,y,z`, id)).status).toBe(409);
    expect((await office.call('imports.list')).body.count.value).toBe(1);
  });

  it('apply nothing of a file when something changed since the check', async () => {
    const found = await checked('stores', storesFile);
    await buildStore(shop, { client_id: await buildClient(shop), number: 'S-2' });
    await apply(found);
    const now = await show(found.id);
    expect([now.state, now.problem]).toEqual([
      'failed',
      expect.stringContaining('since they were checked'),
    ]);
    expect((await walk(office, 'stores.list')).length).toBe(1);
    expect((await walk(office, 'contacts.list')).length).toBe(0);
  });

  it('respect the plan before and while they are applied', async () => {
    const found = await checked('stores', storesFile);
    await limitPlan(shop, { store_limit: 2 });
    expect((await apply(found)).status).toBe(403);
    await limitPlan(shop, { store_limit: 3 });
    const accepted = await office.call('imports.apply', {
      params: { importId: found.id },
      version: found.version,
    });
    expect(accepted.status).toBe(202);
    await limitPlan(shop, { store_limit: 2 });
    await workQueue(server, 'import-work');
    const now = await show(found.id);
    expect([now.state, now.problem]).toEqual(['failed', expect.stringContaining('in your plan')]);
    expect((await walk(office, 'stores.list')).length).toBe(0);
  });

  it('are applied once, by whoever asked first', async () => {
    const found = await checked('stores', storesFile);
    const ask = { params: { importId: found.id }, version: found.version };
    const both = await Promise.all([1, 2].map(() => office.call('imports.apply', ask)));
    expect(both.map((answer) => answer.status).sort()).toEqual([202, 412]);
    await workQueue(server, 'import-work');
    expect((await walk(office, 'stores.list')).length).toBe(3);
  });

  it('go on after a worker died, and a worker taken for dead writes nothing more', async () => {
    const sent = await send('stores', storesFile);
    const context = systemContext(shop.id, new Date());
    const dead = await claimImport(context, sent.body.id);
    expect(dead?.state).toBe('checking');
    await workImport(shop.id, sent.body.id, new Date());
    expect((await show(sent.body.id)).state).toBe('checking');

    await inShop(shop, () =>
      write("update imports set lease_until = now() - interval '1 second' where id = $id", {
        id: sent.body.id,
      }),
    );
    await workQueue(server, 'import-work');
    await sweepImports(context);
    await workQueue(server, 'import-work');
    const now = await show(sent.body.id);
    expect([now.state, now.counts.new]).toEqual(['checked', 3]);
    const late = await inShop(shop, () =>
      write('update imports set rows_done = 1 where id = $id and attempt = $attempt returning id', {
        id: sent.body.id,
        attempt: dead?.attempt,
      }),
    );
    expect(late).toEqual([]);
  });

  it('are discarded, and then not applied', async () => {
    const found = await checked('stores', storesFile);
    const params = { importId: found.id };
    const put = await office.call('imports.discard', { params, version: found.version });
    expect(put.body.state).toBe('discarded');
    const late = await office.call('imports.apply', { params, version: put.body.version });
    expect(late.status).toBe(409);
    expect((await walk(office, 'stores.list')).length).toBe(0);
  });

  it('refuse a client or a store that is not the one a row says', async () => {
    const mine = await buildClient(shop, { number: 'C-1', name: 'Harbour Suds' });
    await buildStore(shop, { client_id: mine, number: 'S-1', name: 'Quay' });
    await buildClient(shop, { name: 'Twin' });
    await buildClient(shop, { name: 'Twin' });
    const file = [
      'Client number,Client name,Store number,Store name',
      'C-9,Birch Wash,S-1,Quay',
      'C-1,Birch Wash,S-2,Two',
      ',Twin,S-3,Three',
      ',,S-4,Four',
      'C-7,,S-5,Five',
      'C-1,harbour suds,S-6,Six',
    ].join('\n');
    const found = await checked('stores', file);
    expect((await rowsOf(found.id)).map((row) => [row.row, row.outcome])).toEqual([
      [2, 'bad'],
      [3, 'bad'],
      [4, 'bad'],
      [5, 'bad'],
      [6, 'bad'],
      [7, 'new'],
    ]);
  });

  it('have a template that is taken as it is', async () => {
    for (const kind of ['stores', 'machines', 'parts']) {
      const template = await office.call('imports.template', { params: { kind } });
      expect(template.headers['content-type']).toContain('text/csv');
      const found = await checked(kind, template.text);
      expect([kind, found.counts.bad]).toEqual([kind, 0]);
      await apply(found);
    }
    expect((await walk(office, 'machines.list')).map((m) => m.bay)).toEqual(['A-01']);
  });

  it('are nothing for a tech or a client, and wait while the shop is paused', async () => {
    const { clientId } = await buildLaundry(shop, 0);
    for (const person of [
      await buildPerson(shop, 'tech'),
      await buildPerson(shop, 'client_owner', { clientId }),
    ]) {
      expect((await api(server.app, person.token).call('imports.list')).status).toBe(403);
    }
    await pauseShop(shop);
    expect((await send('stores', storesFile)).status).toBe(403);
  });
});
