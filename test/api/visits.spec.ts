import { v7 as uuid } from 'uuid';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, insert } from '../support/factories';
import { buildFloor, buildPastVisit, buildScene, Phone, type Scene } from '../support/visits';

describe('visits', () => {
  let server: TestServer;
  let scene: Scene;
  beforeAll(async () => {
    server = await startTestServer();
    scene = await buildScene();
  });
  afterAll(() => server.close());

  const as = (who: 'owner' | 'office' | 'tech') => api(server.app, scene[who].token);
  const plan = (body: object) =>
    as('office').call('visits.plan', {
      body: { storeId: scene.storeId, plannedOn: '2031-05-06', ...body },
    });
  async function call(storeId = scene.storeId): Promise<string> {
    const reported = await as('office').call('calls.report', {
      body: { storeId, machineId: scene.machines[0]!.id, symptom: 'leaks' },
    });
    return reported.body.id as string;
  }
  const stateOf = async (callId: string) =>
    (await as('office').call('calls.show', { params: { callId } })).body.state as string;

  it('are planned for calls, in a window on the clock of the store', async () => {
    const callId = await call();
    const planned = await plan({
      callIds: [callId],
      techMembershipId: scene.tech.membershipId,
      window: { from: '09:00', until: '11:30' },
    });
    expect(planned.status).toBe(201);
    expect(planned.body).toMatchObject({
      state: 'planned',
      tech: { name: 'Imre', initials: 'IM' },
      // New York keeps daylight time in May.
      window: { from: '2031-05-06T13:00:00.000Z', until: '2031-05-06T15:30:00.000Z' },
      bays: ['A-01'],
      callList: [{ id: callId, state: 'planned' }],
    });
  });

  it('need a reason when there is no call', async () => {
    expect((await plan({})).status).toBe(422);
    expect((await plan({ reason: 'Change the vend price' })).status).toBe(201);
  });

  it('take no call twice, and none of another store', async () => {
    const callId = await call();
    await plan({ callIds: [callId] });
    expect((await plan({ callIds: [callId] })).status).toBe(409);
    const other = await buildFloor(scene.shop, scene.clientId);
    const refused = await plan({ storeId: other.storeId, callIds: [await call()] });
    expect(refused.body.errors).toMatchObject([{ pointer: '/callIds' }]);
  });

  it('are for people of the crew', async () => {
    const client = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    const refused = await plan({ reason: 'x', techMembershipId: client.membershipId });
    expect(refused.body.errors).toMatchObject([{ pointer: '/techMembershipId' }]);
  });

  it('are confirmed, and are to be confirmed anew when they move', async () => {
    const { body } = await plan({ reason: 'x', window: { from: '09:00', until: '10:00' } });
    const params = { visitId: body.id as string };
    const confirmed = await as('office').call('visits.confirm', { params, version: 1 });
    expect(confirmed.body.state).toBe('confirmed');
    expect((await as('office').call('visits.confirm', { params, version: 2 })).status).toBe(409);
    const assigned = await as('office').call('visits.change', {
      params,
      version: 2,
      body: { techMembershipId: scene.tech.membershipId },
    });
    expect(assigned.body).toMatchObject({ state: 'confirmed', tech: { name: 'Imre' } });
    const moved = await as('office').call('visits.change', {
      params,
      version: 3,
      body: { plannedOn: '2031-12-02' },
    });
    expect(moved.body).toMatchObject({
      state: 'planned',
      // The same hours, on winter time now.
      window: { from: '2031-12-02T14:00:00.000Z' },
    });
    const stale = await as('office').call('visits.change', {
      params,
      version: 3,
      body: { reason: 'y' },
    });
    expect(stale.status).toBe(412);
  });

  it('give calls back that are left out, and all of them when cancelled', async () => {
    const [one, two] = [await call(), await call()];
    const { body } = await plan({ callIds: [one, two] });
    const params = { visitId: body.id as string };
    await as('office').call('visits.change', { params, version: 1, body: { callIds: [two] } });
    expect([await stateOf(one), await stateOf(two)]).toEqual(['open', 'planned']);
    const cancelled = await as('office').call('visits.cancel', {
      params,
      version: 2,
      body: { words: 'The store is closed that day' },
    });
    expect(cancelled.body.state).toBe('cancelled');
    expect(await stateOf(two)).toBe('open');
    expect(
      (await as('office').call('visits.change', { params, version: 3, body: { reason: 'z' } }))
        .status,
    ).toBe(409);
  });

  it('stand once a machine was worked on', async () => {
    const { body } = await plan({ reason: 'x' });
    const params = { visitId: body.id as string };
    const phone = new Phone();
    await as('tech').call('acts.record', {
      params,
      body: { acts: phone.openJob(scene.machines[0]!, uuid()) },
    });
    const shown = await as('office').call('visits.show', { params });
    expect(shown.body).toMatchObject({ state: 'in_process', jobs: 1, tech: { name: 'Imre' } });
    const ask = { params, version: shown.body.version as number };
    expect((await as('office').call('visits.cancel', { ...ask, body: {} })).status).toBe(409);
    const moved = await as('office').call('visits.change', {
      ...ask,
      body: { plannedOn: '2031-05-08' },
    });
    expect(moved.status).toBe(409);
  });

  it('make a day sheet: by tech, and those without one', async () => {
    const on = '2031-07-01';
    await plan({ plannedOn: on, reason: 'a', techMembershipId: scene.tech.membershipId });
    await plan({ plannedOn: on, reason: 'b' });
    const idle = await buildPerson(scene.shop, 'tech', { name: 'Zoe Abara' });
    const sheet = await as('office').call('visits.daySheet', { query: { on } });
    expect(sheet.body.unplaced).toMatchObject([{ reason: 'b' }]);
    expect(sheet.body.techs).toMatchObject([
      { name: 'Imre', visits: [{ reason: 'a' }] },
      { membershipId: idle.membershipId, initials: 'ZA', visits: [] },
    ]);
    expect((await as('tech').call('visits.daySheet', { query: { on } })).status).toBe(403);
  });

  it('are a tech’s own or nobody’s, and a day’s are read in a fixed number of queries', async () => {
    const on = '2031-07-02';
    const other = await buildPerson(scene.shop, 'tech');
    await plan({ plannedOn: on, reason: 'mine', techMembershipId: scene.tech.membershipId });
    await plan({ plannedOn: on, reason: 'nobody’s' });
    const theirs = await plan({
      plannedOn: on,
      reason: 'theirs',
      techMembershipId: other.membershipId,
    });
    await insert(scene.shop, 'conditions', {
      client_id: scene.clientId,
      store_id: scene.storeId,
      machine_id: scene.machines[1]!.id,
      kind: 'access',
      words: 'Bolted too close',
      extra_minutes: 15,
      tool: 'Long bar',
    });
    const day = await as('tech').call('visits.day', { query: { on } });
    expect(
      day.body.sheets.map((s: { visit: { reason: string } }) => s.visit.reason).sort(),
    ).toEqual(['mine', 'nobody’s']);
    expect(day.body.sheets[0]).toMatchObject({
      store: { id: scene.storeId },
      conditions: [{ machine: { bay: 'A-02' }, extraMinutes: 15, tool: 'Long bar' }],
    });
    expect(day.body.sheets[0].machines).toHaveLength(4);
    const params = { visitId: theirs.body.id as string };
    expect((await as('tech').call('visits.show', { params })).status).toBe(404);
    expect((await as('tech').call('visits.sheet', { params })).status).toBe(404);
    expect((await as('tech').call('acts.list', { params })).status).toBe(404);
  });

  it('are listed by day, tech, state and machine', async () => {
    const on = '2031-08-01';
    const { body } = await plan({
      plannedOn: on,
      techMembershipId: scene.tech.membershipId,
      reason: 'listed',
    });
    const by = async (query: object) =>
      (await as('office').call('visits.list', { query: { limit: 100, ...query } })).body.items.map(
        (visit: { id: string }) => visit.id,
      );
    expect(await by({ from: on, until: on })).toEqual([body.id]);
    const ofTech = { from: on, until: on, techMembershipId: scene.tech.membershipId };
    expect(await by(ofTech)).toEqual([body.id]);
    expect(await by({ state: 'live', q: 'listed' })).toEqual([body.id]);
    expect(await by({ state: 'unticketed' })).toEqual([]);
    const past = await buildPastVisit(
      scene,
      3,
      (phone) => phone.repair(scene.machines[3]!, { jobId: uuid() }),
      { signOff: false },
    );
    expect(await by({ state: 'unticketed' })).toEqual([past.visitId]);
    expect(await by({ machineId: scene.machines[3]!.id })).toEqual([past.visitId]);
  });

  it('tell a client in plain words what was done, with photos and without the shop’s own', async () => {
    const jobId = uuid();
    const { visitId } = await buildPastVisit(scene, 2, (phone) => [
      ...phone.repair(scene.machines[2]!, { jobId, did: 'Seal replaced' }),
      phone.act('handed_over', { openItemId: uuid(), words: 'Look at the belt' }),
    ]);
    await insert(scene.shop, 'attachments', {
      client_id: scene.clientId,
      owner_kind: 'job',
      owner_id: jobId,
      name: 'seal.jpg',
      content_type: 'image/jpeg',
      bytes: 10,
      sha256: 'a'.repeat(64),
    });
    const owner = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    const attendant = await buildPerson(scene.shop, 'attendant', {
      clientId: scene.clientId,
      storeId: scene.storeId,
    });
    const params = { visitId };
    const shown = await api(server.app, owner.token).call('visits.show', { params });
    expect(shown.body).toMatchObject({
      words: 'Put right: A-03.',
      jobList: [{ action: 'Seal replaced', shop: null, photos: [{ name: 'seal.jpg' }] }],
      handedOver: [{ words: 'Look at the belt' }],
      times: [],
      rulings: null,
      ticket: { number: expect.any(Number) },
    });
    expect(JSON.stringify(shown.body)).not.toMatch(/cost|minutes|mark/i);
    const seen = await api(server.app, attendant.token).call('visits.show', { params });
    expect(seen.body).toMatchObject({ ticket: null, jobList: [{ testAmount: null }] });

    const other = await buildFloor(scene.shop, scene.clientId);
    const elsewhere = await plan({ storeId: other.storeId, reason: 'x' });
    const foreign = { params: { visitId: elsewhere.body.id as string } };
    expect((await api(server.app, owner.token).call('visits.show', foreign)).status).toBe(200);
    expect((await api(server.app, attendant.token).call('visits.show', foreign)).status).toBe(404);
    const stranger = await insert(scene.shop, 'clients', { name: 'Stranger', number: 'X-1' });
    const strange = await buildPerson(scene.shop, 'client_owner', { clientId: stranger });
    expect((await api(server.app, strange.token).call('visits.show', { params })).status).toBe(404);
  });

  it('add up to a machine’s history', async () => {
    const machine = scene.machines[1]!;
    for (const [daysAgo, did] of [
      [20, 'Belt replaced'],
      [10, 'Belt tightened'],
    ] as const) {
      await buildPastVisit(scene, daysAgo, (phone) =>
        phone.repair(machine, { jobId: uuid(), did }),
      );
    }
    const ask = { params: { machineId: machine.id } };
    const history = await as('tech').call('machines.history', ask);
    expect(history.body.items.map((job: { action: string }) => job.action)).toEqual([
      'Belt tightened',
      'Belt replaced',
    ]);
    const searched = await as('tech').call('machines.history', {
      ...ask,
      query: { q: 'replaced' },
    });
    expect(searched.body.items.map((job: { action: string }) => job.action)).toEqual([
      'Belt replaced',
    ]);
    const attendant = await buildPerson(scene.shop, 'attendant', {
      clientId: scene.clientId,
      storeId: scene.storeId,
    });
    const seen = await api(server.app, attendant.token).call('machines.history', ask);
    expect(seen.body.items[0].ticket).toBeNull();
    const other = await buildFloor(scene.shop, scene.clientId);
    const elsewhere = { params: { machineId: other.machines[0]!.id } };
    expect(
      (await api(server.app, attendant.token).call('machines.history', elsewhere)).status,
    ).toBe(404);
  });
});
