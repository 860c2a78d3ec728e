import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildBank,
  buildLaundry,
  buildMachine,
  buildPerson,
  buildShop,
  buildStore,
  insert,
  next,
  type TestShop,
} from '../support/factories';
import { walk } from '../support/lists';
import { limitPlan } from '../support/plans';
import { buildVisitRow } from '../support/tickets';

describe('machines', () => {
  let server: TestServer;
  let shop: TestShop;
  let tech: ReturnType<typeof api>;

  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    shop = await buildShop();
    tech = api(server.app, (await buildPerson(shop, 'tech')).token);
  });

  it('stand in bays that follow one another, each with a code for its sticker', async () => {
    const { bankId } = await buildLaundry(shop, 0);
    const add = (body: Record<string, unknown> = {}) =>
      tech.call('machines.create', { body: { bankId, kind: 'dryer', ...body } });
    const first = await add({ energy: 'gas', amps: 12.5, cyclesADay: 7.5, vendPrice: 350 });
    expect(first.status).toBe(201);
    expect(first.body).toMatchObject({ bay: 'A-01', amps: 12.5, cyclesADay: 7.5, state: 'up' });
    expect(first.body.takingsADay).toBe(2625);
    expect(first.body.stickerCode).toMatch(/^[2-9A-Y]{8}$/);
    expect((await add({ bayNumber: 7 })).body.bay).toBe('A-07');
    expect((await add()).body.bay).toBe('A-08');
    const taken = await add({ bayNumber: 7 });
    expect([taken.status, taken.body.errors]).toEqual([
      422,
      [{ pointer: '/bayNumber', detail: 'A-07 holds a machine already' }],
    ]);
  });

  it('get a bay each when several are added at once', async () => {
    const { bankId } = await buildLaundry(shop, 0);
    const answers = await Promise.all(
      [1, 2, 3, 4].map(() => tech.call('machines.create', { body: { bankId, kind: 'dryer' } })),
    );
    expect(answers.map((a) => a.body.bay).sort()).toEqual(['A-01', 'A-02', 'A-03', 'A-04']);
  });

  it('are refused past the plan, with what the plan allows', async () => {
    const { bankId } = await buildLaundry(shop, 2);
    await limitPlan(shop, { machine_limit: 2 });
    const past = await tech.call('machines.create', { body: { bankId, kind: 'dryer' } });
    expect([past.status, past.body.type]).toEqual([403, expect.stringContaining('plan-limit')]);
    expect(past.body.detail).toContain('2 of 2 machines');
  });

  it('change their bays with the letter of their bank', async () => {
    const { storeId, bankId } = await buildLaundry(shop, 0);
    const { body: machine } = await tech.call('machines.create', {
      body: { bankId, kind: 'dryer' },
    });
    const renamed = await tech.call('banks.change', {
      params: { bankId },
      version: 1,
      body: { letter: 'd' },
    });
    expect(renamed.body).toMatchObject({ letter: 'D', storeId, version: 2 });
    const now = await tech.call('machines.show', { params: { machineId: machine.id } });
    expect(now.body.bay).toBe('D-01');
    const twin = await tech.call('banks.create', { params: { storeId }, body: { letter: 'D' } });
    expect([twin.status, twin.body.errors[0].pointer]).toEqual([422, '/letter']);
  });

  it('are set to a state with a time, and once retired stay so', async () => {
    const { machineIds } = await buildLaundry(shop, 1);
    const params = { machineId: machineIds[0] as string };
    const before = (await tech.call('machines.show', { params })).body;
    const down = await tech.call('machines.setState', {
      params,
      version: before.version,
      body: { state: 'down', words: 'Burnt smell' },
    });
    expect(down.body.state).toBe('down');
    expect(down.body.stateSince > before.stateSince).toBe(true);
    const again = await tech.call('machines.setState', {
      params,
      version: down.body.version,
      body: { state: 'down' },
    });
    expect(again.body.stateSince).toBe(down.body.stateSince);
    const stale = await tech.call('machines.setState', {
      params,
      version: down.body.version,
      body: { state: 'up' },
    });
    expect(stale.status).toBe(412);
    const retired = await tech.call('machines.retire', {
      params,
      version: again.body.version,
      body: {},
    });
    expect(retired.body.state).toBe('retired');
    const revive = await tech.call('machines.setState', {
      params,
      version: retired.body.version,
      body: { state: 'up' },
    });
    expect(revive.status).toBe(409);
  });

  it('free their bay when retired, but not while a call is open for them', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 0);
    const at = { client_id: clientId, store_id: storeId };
    const machineId = await buildMachine(shop, {
      ...at,
      bank_id: bankId,
      bay: 'A-01',
      bay_number: 1,
    });
    const callId = await insert(shop, 'calls', {
      ...at,
      machine_id: machineId,
      number: next(),
      symptom: 'no heat',
      reported_by: 'Abel',
      reported_via: 'office',
    });
    const ask = { params: { machineId }, version: 1, body: {} };
    const refused = await tech.call('machines.retire', ask);
    expect([refused.status, refused.body.detail]).toEqual([409, expect.stringContaining('Call')]);
    expect(callId).toEqual(expect.any(String));

    const other = await buildMachine(shop, { ...at, bank_id: bankId, bay: 'A-02', bay_number: 2 });
    expect(
      (await tech.call('machines.retire', { ...ask, params: { machineId: other } })).status,
    ).toBe(200);
    const after = await tech.call('machines.create', {
      body: { bankId, kind: 'dryer', bayNumber: 2 },
    });
    expect(after.status).toBe(201);
  });

  it('move within their client, and take their conditions along', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 0);
    const machineId = await buildMachine(shop, {
      client_id: clientId,
      store_id: storeId,
      bank_id: bankId,
    });
    const of = { client_id: clientId, store_id: storeId, machine_id: machineId };
    await insert(shop, 'conditions', { ...of, kind: 'supply', words: 'Needs 30 A' });
    const sister = await buildStore(shop, { client_id: clientId });
    const target = await buildBank(shop, { client_id: clientId, store_id: sister, letter: 'C' });
    const moved = await tech.call('machines.move', {
      params: { machineId },
      version: 1,
      body: { bankId: target, bayNumber: 3 },
    });
    expect(moved.body).toMatchObject({ bay: 'C-03', store: { id: sister } });
    expect(moved.body.conditions).toMatchObject([{ storeId: sister }]);

    const stranger = await buildLaundry(shop, 0);
    const refused = await tech.call('machines.move', {
      params: { machineId },
      version: moved.body.version,
      body: { bankId: stranger.bankId, bayNumber: 1 },
    });
    expect(refused.status).toBe(409);
  });

  it('tell what was done to them, the newest first', async () => {
    const { clientId, storeId, machineIds } = await buildLaundry(shop, 1);
    const machine_id = machineIds[0] as string;
    const of = { client_id: clientId, store_id: storeId };
    for (const [n, finding] of ['Blocked valve', 'Worn belt'].entries()) {
      const visit_id = await buildVisitRow(shop, { ...of, state: 'completed' });
      await insert(shop, 'jobs', {
        ...of,
        visit_id,
        machine_id,
        position: 1,
        finding,
        created_at: new Date(Date.UTC(2031, 0, 1 + n)),
      });
    }
    const { body } = await tech.call('machines.show', { params: { machineId: machine_id } });
    expect(body.jobs.map((job: { finding: string }) => job.finding)).toEqual([
      'Worn belt',
      'Blocked valve',
    ]);
    expect(body.jobs[0]).toMatchObject({ cause: null, result: null, ticketNumber: null });
  });

  it('list by store, state and kind, and page in every order', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 11);
    const at = { client_id: clientId, store_id: storeId, bank_id: bankId };
    await buildMachine(shop, { ...at, state: 'down', serial: 'QX-77', make: 'Norvane' });
    await buildMachine(shop, { ...at, state: 'locked_out', kind: 'heater' });
    await buildMachine(shop, { ...at, state: 'retired' });
    const ids = async (query: Record<string, unknown>) =>
      (await walk(tech, 'machines.list', { limit: 4, ...query })).map((m) => m.id);
    for (const sort of ['bay', 'serial', '-stateSince']) {
      const all = await ids({ storeId, sort });
      expect([all.length, new Set(all).size]).toEqual([13, 13]);
    }
    expect(await ids({ state: 'not_up' })).toHaveLength(2);
    expect(await ids({ state: 'retired' })).toHaveLength(1);
    expect(await ids({ kind: 'heater', clientId })).toHaveLength(1);
    expect(await ids({ q: 'qx-7' })).toHaveLength(1);
    expect(await ids({ q: 'norvane', state: 'up' })).toHaveLength(0);
  });

  it('hide the note of the shop from people of the client, and other stores from an attendant', async () => {
    const { clientId, storeId, bankId } = await buildLaundry(shop, 0);
    const at = { client_id: clientId, store_id: storeId, bank_id: bankId };
    const machineId = await buildMachine(shop, { ...at, note: 'Owner argues' });
    const sister = await buildStore(shop, { client_id: clientId });
    const bank = await buildBank(shop, { client_id: clientId, store_id: sister });
    const there = await buildMachine(shop, {
      client_id: clientId,
      store_id: sister,
      bank_id: bank,
    });
    const attendant = api(
      server.app,
      (await buildPerson(shop, 'attendant', { clientId, storeId })).token,
    );
    const seen = await attendant.call('machines.show', { params: { machineId } });
    expect([seen.status, seen.body.note, seen.body.takingsADay]).toEqual([200, null, null]);
    expect((await attendant.call('machines.show', { params: { machineId: there } })).status).toBe(
      404,
    );
    expect((await walk(attendant, 'machines.list')).map((m) => m.id)).toEqual([machineId]);
  });

  it('carry conditions that are noted, changed and cleared', async () => {
    const { storeId, machineIds } = await buildLaundry(shop, 1);
    const machineId = machineIds[0];
    const made = await tech.call('conditions.create', {
      body: { storeId, machineId, kind: 'access', words: 'Behind a plinth', extraMinutes: 25 },
    });
    expect(made.body).toMatchObject({ extraMinutes: 25, tool: '', machine: { id: machineId } });
    const params = { conditionId: made.body.id };
    const changed = await tech.call('conditions.change', {
      params,
      version: made.body.version,
      body: { tool: 'Pry bar' },
    });
    expect(changed.body).toMatchObject({ tool: 'Pry bar', words: 'Behind a plinth' });
    await tech.call('conditions.clear', { params, version: changed.body.version });
    const open = await tech.call('conditions.list', { params: { storeId } });
    const all = await tech.call('conditions.list', { params: { storeId }, query: { show: 'all' } });
    expect([open.body.items.length, all.body.items.length]).toEqual([0, 1]);

    const elsewhere = await buildLaundry(shop, 1);
    const wrong = await tech.call('conditions.create', {
      body: { storeId, machineId: elsewhere.machineIds[0], kind: 'access', words: 'X' },
    });
    expect([wrong.status, wrong.body.errors[0].pointer]).toEqual([422, '/machineId']);
  });
});
