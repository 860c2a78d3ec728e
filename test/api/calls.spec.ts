import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, insert } from '../support/factories';
import { buildFloor, buildScene, type Scene } from '../support/visits';

describe('calls', () => {
  let server: TestServer;
  let scene: Scene;
  beforeAll(async () => {
    server = await startTestServer();
    scene = await buildScene();
  });
  afterAll(() => server.close());

  const office = () => api(server.app, scene.office.token);
  async function report(token = scene.office.token, body: object = {}) {
    return api(server.app, token).call('calls.report', {
      body: { storeId: scene.storeId, symptom: 'leaks', ...body },
    });
  }

  it('are reported by the office for whoever rang', async () => {
    const [machine] = scene.machines;
    const reported = await report(scene.office.token, {
      machineId: machine!.id,
      words: 'Water under the door',
      reportedBy: 'Ines from the counter',
    });
    expect(reported.status).toBe(201);
    expect(reported.body).toMatchObject({
      state: 'open',
      machine: { bay: 'A-01' },
      reportedBy: 'Ines from the counter',
      reportedVia: 'office',
      machineState: 'up',
      photos: [],
    });
    expect(reported.body.progress[0]).toMatchObject({ step: 'reported' });
  });

  it('need words when they are of no usual kind', async () => {
    const refused = await report(scene.office.token, { symptom: 'other' });
    expect(refused.status).toBe(422);
    expect(refused.body.errors).toMatchObject([{ pointer: '/words' }]);
  });

  it('are never of a machine of another store, or of one that was taken out', async () => {
    const elsewhere = await buildFloor(scene.shop, scene.clientId);
    const refused = await report(undefined, { machineId: elsewhere.machines[0]!.id });
    expect(refused.status).toBe(422);
    expect(refused.body.errors[0].detail).toBe('is not a machine of this store');
  });

  it('carry a client’s own name, whatever the request says', async () => {
    const owner = await buildPerson(scene.shop, 'client_owner', {
      clientId: scene.clientId,
      name: 'Olu',
    });
    const reported = await report(owner.token, { reportedBy: 'Somebody else' });
    expect(reported.body).toMatchObject({ reportedBy: 'Olu', reportedVia: 'client' });
  });

  it('are an attendant’s for the one store, and hold no money', async () => {
    const other = await buildFloor(scene.shop, scene.clientId);
    const attendant = await buildPerson(scene.shop, 'attendant', {
      clientId: scene.clientId,
      storeId: scene.storeId,
    });
    const asked = api(server.app, attendant.token);
    const elsewhere = await asked.call('calls.report', {
      body: { storeId: other.storeId, symptom: 'leaks' },
    });
    expect(elsewhere.status).toBe(404);
    const foreign = (
      await office().call('calls.report', { body: { storeId: other.storeId, symptom: 'noisy' } })
    ).body.id as string;
    expect((await asked.call('calls.show', { params: { callId: foreign } })).status).toBe(404);
    const mine = await report(attendant.token);
    expect(mine.status).toBe(201);
    const list = await asked.call('calls.list', { query: { limit: 100 } });
    const stores = new Set(list.body.items.map((c: { store: { id: string } }) => c.store.id));
    expect([...stores]).toEqual([scene.storeId]);
    expect(JSON.stringify(mine.body)).not.toMatch(/amount|price|charged|cost/i);
  });

  it('of another client are not there', async () => {
    const stranger = await insert(scene.shop, 'clients', { name: 'Stranger', number: 'X-1' });
    const owner = await buildPerson(scene.shop, 'client_owner', { clientId: stranger });
    const { body } = await report();
    const asked = api(server.app, owner.token);
    expect((await asked.call('calls.show', { params: { callId: body.id } })).status).toBe(404);
    expect((await report(owner.token)).status).toBe(404);
    expect((await asked.call('calls.list')).body.items).toEqual([]);
  });

  it('are found by state, store and words', async () => {
    const { body } = await report(scene.office.token, { words: 'Trapped velvet curtain' });
    const by = async (query: object) =>
      (await office().call('calls.list', { query: { limit: 100, ...query } })).body.items.map(
        (call: { id: string }) => call.id,
      );
    expect(await by({ q: 'velvet' })).toEqual([body.id]);
    expect(await by({ state: 'open', storeId: scene.storeId })).toContain(body.id);
    expect(await by({ state: 'live' })).toContain(body.id);
    expect(await by({ state: 'closed' })).toEqual([]);
    const first = await office().call('calls.list', { query: { limit: 1 } });
    expect(first.body.items[0].id).toBe(body.id);
    const second = await office().call('calls.list', {
      query: { limit: 1, cursor: first.body.next },
    });
    expect(second.body.items[0].id).not.toBe(body.id);
  });

  it('are put right by the office, with the version that was read', async () => {
    const { body } = await report();
    const params = { callId: body.id as string };
    const changed = await office().call('calls.change', {
      params,
      version: 1,
      body: { symptom: 'wont_drain', machineId: scene.machines[1]!.id },
    });
    expect(changed.body).toMatchObject({ symptom: 'wont_drain', machine: { bay: 'A-02' } });
    const stale = await office().call('calls.change', { params, version: 1, body: { words: 'x' } });
    expect(stale.status).toBe(412);
    const tech = await api(server.app, scene.tech.token).call('calls.change', {
      params,
      version: 2,
      body: { words: 'x' },
    });
    expect(tech.status).toBe(403);
  });

  it('are taken back, by the client only while nobody comes for them', async () => {
    const owner = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    const asked = api(server.app, owner.token);
    const mine = (await report(owner.token)).body;
    const withdrawn = await asked.call('calls.withdraw', {
      params: { callId: mine.id },
      version: mine.version,
      body: { words: 'It runs again' },
    });
    expect(withdrawn.body.state).toBe('withdrawn');
    expect(withdrawn.body.progress.at(-1).step).toBe('withdrawn');

    const planned = (await report(owner.token)).body;
    await office().call('visits.plan', {
      body: { storeId: scene.storeId, plannedOn: '2031-05-06', callIds: [planned.id] },
    });
    const withdraw = (token: string) =>
      api(server.app, token).call('calls.withdraw', {
        params: { callId: planned.id },
        version: 2,
        body: {},
      });
    expect((await withdraw(owner.token)).status).toBe(409);
    expect((await withdraw(scene.office.token)).body.state).toBe('withdrawn');
  });

  it('are not taken for a store the shop works for no more', async () => {
    const { storeId } = await buildFloor(scene.shop, scene.clientId);
    const ended = await insert(scene.shop, 'stores', {
      client_id: scene.clientId,
      name: 'Ended',
      number: 'E-1',
      ended_at: new Date(),
    });
    expect((await report(undefined, { storeId: ended })).status).toBe(409);
    expect((await report(undefined, { storeId })).status).toBe(201);
  });
});
