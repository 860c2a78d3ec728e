import { type Act } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, insert } from '../support/factories';
import { buildFloor, buildPart, buildScene, Phone, type Scene, stored } from '../support/visits';

interface Result {
  id: string;
  outcome: 'stored' | 'repeated' | 'refused';
  reason: string | null;
}

describe('acts of a visit', () => {
  let server: TestServer;
  let scene: Scene;
  let visitId: string;
  beforeAll(async () => {
    server = await startTestServer();
    scene = await buildScene();
  });
  afterAll(() => server.close());

  const as = (who: 'owner' | 'office' | 'tech') => api(server.app, scene[who].token);
  async function plan(body: object = {}): Promise<string> {
    const planned = await as('office').call('visits.plan', {
      body: {
        storeId: scene.storeId,
        plannedOn: '2031-05-06',
        techMembershipId: scene.tech.membershipId,
        reason: 'Repair',
        ...body,
      },
    });
    return planned.body.id as string;
  }
  async function send(acts: Act[], token = scene.tech.token, to = visitId) {
    return api(server.app, token).call('acts.record', { params: { visitId: to }, body: { acts } });
  }
  const outcomes = (answer: { body: { results: Result[] } }) =>
    answer.body.results.map((result) => result.outcome);
  const refusals = (answer: { body: { results: Result[] } }) =>
    answer.body.results.filter((r) => r.outcome === 'refused').map((r) => r.reason);
  const count = async (table: string) =>
    (
      await stored<{ n: number }>(
        scene,
        `select count(*)::int as n from ${table} where shop_id = $shopId`,
      )
    ).n;

  beforeEach(async () => {
    visitId = await plan();
  });

  it('change nothing when they are delivered again, alone or among new ones', async () => {
    const phone = new Phone();
    const acts = [phone.act('arrived', {}), ...phone.repair(scene.machines[0]!, { jobId: uuid() })];
    expect(new Set(outcomes(await send(acts)))).toEqual(new Set(['stored']));
    const before = await count('acts');
    const shown = (await as('tech').call('visits.show', { params: { visitId } })).body;
    const again = await send(acts);
    expect(new Set(outcomes(again))).toEqual(new Set(['repeated']));
    const shouted = acts.map((act) => ({ ...act, id: act.id.toUpperCase() }));
    expect(new Set(outcomes(await send(shouted)))).toEqual(new Set(['repeated']));
    const left = phone.act('left', {});
    expect(outcomes(await send([...acts.slice(0, 2), left, left]))).toEqual([
      'repeated',
      'repeated',
      'stored',
      'repeated',
    ]);
    expect(await count('acts')).toBe(before + 1);
    const after = (await as('tech').call('visits.show', { params: { visitId } })).body;
    expect(after.jobList).toEqual(shown.jobList);
  });

  it('are answered one by one: those that do not apply are not stored', async () => {
    const phone = new Phone();
    const jobId = uuid();
    const elsewhere = await buildFloor(scene.shop, scene.clientId);
    const acts = [
      phone.act('arrived', {}),
      phone.act('job_opened', { jobId: uuid(), machineId: elsewhere.machines[0]!.id }),
      phone.act('job_opened', { jobId, machineId: scene.machines[0]!.id }),
      phone.act('finding', { jobId, words: 'Leaks' }),
      phone.act('minutes', { jobId, minutes: 10 }),
      phone.act('part_used', { jobId: uuid(), partUseId: uuid(), description: 'x', source: 'van' }),
    ];
    const answer = await send(acts);
    expect(answer.status).toBe(200);
    expect(outcomes(answer)).toEqual([
      'stored',
      'refused',
      'stored',
      'refused',
      'stored',
      'refused',
    ]);
    expect(refusals(answer)).toEqual([
      'The machine is not of this store.',
      'Tick the cautions for A-01 first: 8 left.',
      'There is no such job.',
    ]);
    const record = await as('office').call('acts.list', { params: { visitId } });
    expect(
      record.body.items.map((act: { kind: string; by: string }) => [act.kind, act.by]),
    ).toEqual([
      ['arrived', 'Imre'],
      ['job_opened', 'Imre'],
      ['minutes', 'Imre'],
    ]);
  });

  it('come to the same in whatever order they are delivered', async () => {
    const jobId = uuid();
    const phone = new Phone();
    const acts = [
      phone.act('arrived', {}),
      ...phone.repair(scene.machines[0]!, { jobId, minutes: 45 }),
      phone.act('minutes', { jobId, minutes: 50 }),
    ];
    expect(new Set(outcomes(await send([...acts].reverse())))).toEqual(new Set(['stored']));
    // An older word of the other phone falls into its place and changes nothing that came later.
    const older = { ...phone.act('minutes', { jobId, minutes: 5 }), at: acts[6]!.at };
    expect(outcomes(await send([older], scene.office.token))).toEqual(['stored']);
    const { body } = await as('tech').call('visits.show', { params: { visitId } });
    expect(body.jobList[0]).toMatchObject({ result: 'put_right', shop: { minutes: 50 } });
  });

  it('leave the covers on until the cautions are ticked; testing needs none', async () => {
    const phone = new Phone();
    const dryer = scene.machines[3]!;
    const tested = uuid();
    const jobId = uuid();
    const answer = await send([
      phone.act('job_opened', { jobId: tested, machineId: scene.machines[0]!.id }),
      phone.act('nothing_found', { jobId: tested, minutes: 10, cycles: 1, coins: 4 }),
      ...phone.openJob(dryer, jobId),
      phone.act('action', { jobId, words: 'Burner cleaned' }),
    ]);
    expect(refusals(answer)).toEqual([]);
    const { body } = await as('tech').call('visits.show', { params: { visitId } });
    expect(body.jobList).toMatchObject([
      { result: 'nothing_found', shop: { cautionsAt: null } },
      { action: 'Burner cleaned', shop: { cautionsAt: expect.any(String) } },
    ]);
  });

  it('keep a part at the price it had when it was fitted, and take it off again', async () => {
    const phone = new Phone();
    const jobId = uuid();
    const partId = await buildPart(scene.shop, {
      category: 'pump',
      unit_cost: 40_00,
      name: 'Pump',
    });
    const [kept, removed] = [uuid(), uuid()];
    const free = uuid();
    const used = (partUseId: string) =>
      phone.act('part_used', { jobId, partUseId, partId, source: 'shelf' });
    await send([
      ...phone.openJob(scene.machines[0]!, jobId),
      used(kept),
      used(removed),
      phone.act('part_used', {
        jobId,
        partUseId: free,
        description: 'Hose from the corner shop',
        unitCost: 7_50,
        quantityMilli: 2_000,
        source: 'ordered',
      }),
    ]);
    const office = as('office');
    const part = (await office.call('parts.show', { params: { partId } })).body;
    await office.call('parts.change', {
      params: { partId },
      version: part.version,
      body: { unitCost: 99_00 },
    });
    await send([phone.act('part_removed', { jobId, partUseId: removed })]);
    const cost = await stored<{ costs: number[] }>(
      scene,
      `select jsonb_agg(unit_cost order by unit_cost) as costs from part_uses
       where shop_id = $shopId and job_id = $jobId`,
      { jobId },
    );
    expect(cost.costs).toEqual([7_50, 40_00]);
    const { body } = await as('tech').call('visits.show', { params: { visitId } });
    expect(body.jobList[0].parts).toMatchObject([
      { id: kept, description: 'Pump', category: 'pump' },
      { id: free, description: 'Hose from the corner shop', quantityMilli: 2_000 },
    ]);
  });

  it('set the machine’s state, unless the office has set it since', async () => {
    const machine = scene.machines[1]!;
    const params = { machineId: machine.id };
    const phone = new Phone();
    const jobId = uuid();
    await send([
      ...phone.openJob(machine, jobId),
      phone.act('job_done', { jobId, result: 'made_safe', machineState: 'locked_out' }),
    ]);
    const locked = (await as('office').call('machines.show', { params })).body;
    expect(locked.state).toBe('locked_out');
    // The office knows better a day later; what a phone still held of before is history.
    await as('office').call('machines.setState', {
      params,
      version: locked.version,
      body: { state: 'up' },
    });
    const second = await plan();
    const old = new Phone(new Date(Date.now() - 3_600_000));
    const late = uuid();
    const answer = await send(
      [
        ...old.openJob(machine, late),
        old.act('job_done', { jobId: late, result: 'unfinished', machineState: 'down' }),
      ],
      scene.tech.token,
      second,
    );
    expect(refusals(answer)).toEqual([]);
    expect((await as('office').call('machines.show', { params })).body.state).toBe('up');
  });

  it('close the calls that were put right and give the others back', async () => {
    const report = async (n: number) =>
      (
        await as('office').call('calls.report', {
          body: { storeId: scene.storeId, machineId: scene.machines[n]!.id, symptom: 'leaks' },
        })
      ).body.id as string;
    const [mended, left, untouched, found] = [
      await report(0),
      await report(1),
      await report(2),
      await report(3),
    ];
    visitId = await plan({ callIds: [mended, left, untouched] });
    const phone = new Phone();
    const jobId = uuid();
    const answer = await send([
      ...phone.repair(scene.machines[0]!, { jobId: uuid(), callId: mended }),
      ...phone.repair(scene.machines[1]!, { jobId, callId: left, result: 'unfinished' }),
      // A call of no visit, taken along on the spot.
      phone.act('job_opened', { jobId: uuid(), machineId: scene.machines[3]!.id, callId: found }),
    ]);
    expect(refusals(answer)).toEqual([]);
    const states = async () =>
      Promise.all(
        [mended, left, untouched, found].map(
          async (callId) =>
            (await as('office').call('calls.show', { params: { callId } })).body.state as string,
        ),
      );
    expect(await states()).toEqual(['planned', 'planned', 'planned', 'planned']);
    const dropped = (await as('tech').call('visits.show', { params: { visitId } })).body.jobList[2];
    await send([
      phone.act('nothing_found', { jobId: dropped.id, minutes: 5, cycles: 1, coins: 0 }),
      phone.act('signed_off', {}),
    ]);
    expect(await states()).toEqual(['closed', 'open', 'open', 'closed']);
    // The tech's word that it was put right after all arrives late.
    await send([
      phone.act('cause', { jobId, cause: 'wear' }),
      phone.act('job_done', { jobId, result: 'put_right', machineState: 'up' }),
    ]);
    expect(await states()).toEqual(['closed', 'closed', 'open', 'closed']);
  });

  it('drop a job that was opened by mistake', async () => {
    const phone = new Phone();
    const jobId = uuid();
    const answer = await send([
      ...phone.repair(scene.machines[0]!, { jobId }),
      phone.act('job_dropped', { jobId }),
      phone.act('job_opened', { jobId: uuid(), machineId: scene.machines[0]!.id }),
    ]);
    expect(refusals(answer)).toEqual([]);
    const { body } = await as('tech').call('visits.show', { params: { visitId } });
    expect(body.jobList).toHaveLength(1);
    expect(body.jobList[0]).toMatchObject({ finding: '', parts: [] });
  });

  it('hand over what is left, which the next tech sees first and settles', async () => {
    const phone = new Phone();
    const openItemId = uuid();
    const machineId = scene.machines[2]!.id;
    await send([phone.act('handed_over', { openItemId, machineId, words: 'Fit the new belt' })]);
    const next = await plan();
    const sheet = await as('tech').call('visits.sheet', { params: { visitId: next } });
    expect(sheet.body.openItems).toMatchObject([
      { id: openItemId, machine: { bay: 'A-03' }, words: 'Fit the new belt', visitId },
    ]);
    const settled = await send(
      [phone.act('open_item_done', { openItemId })],
      scene.tech.token,
      next,
    );
    expect(outcomes(settled)).toEqual(['stored']);
    const after = await as('tech').call('visits.sheet', { params: { visitId: next } });
    expect(after.body.openItems).toEqual([]);
  });

  it('make whoever works an unplaced visit its tech, and stay with the assigned one', async () => {
    const unplaced = await plan({ techMembershipId: null });
    const phone = new Phone();
    await send([phone.act('arrived', {})], scene.tech.token, unplaced);
    const shown = await as('office').call('visits.show', { params: { visitId: unplaced } });
    expect(shown.body.tech.name).toBe('Imre');
    const other = await buildPerson(scene.shop, 'tech', { name: 'Zoe' });
    expect(refusals(await send([phone.act('arrived', {})], other.token, unplaced))).toEqual([
      'The visit is Imre’s by now. Tell the office.',
    ]);
    // Reassigned while the phone had no signal: who was there may finish.
    await as('office').call('visits.change', {
      params: { visitId: unplaced },
      version: shown.body.version,
      body: { techMembershipId: other.membershipId },
    });
    expect(outcomes(await send([phone.act('left', {})], scene.tech.token, unplaced))).toEqual([
      'stored',
    ]);
  });

  it('of a signed-off ticket are refused with a reason, and of a cancelled visit too', async () => {
    const phone = new Phone();
    const jobId = uuid();
    await send([
      phone.act('arrived', {}),
      ...phone.repair(scene.machines[3]!, { jobId }),
      phone.act('signed_off', {}),
    ]);
    const ticket = await as('office').call('tickets.signOff', { params: { visitId }, body: {} });
    expect(ticket.status).toBe(201);
    const late = phone.act('minutes', { jobId, minutes: 240 });
    expect(refusals(await send([late]))).toEqual([
      `Ticket ${ticket.body.name} is signed off: nothing can be added to the visit. Tell the office.`,
    ]);
    const cancelled = await plan();
    await as('office').call('visits.cancel', {
      params: { visitId: cancelled },
      version: 1,
      body: {},
    });
    expect(refusals(await send([phone.act('arrived', {})], scene.tech.token, cancelled))).toEqual([
      'The visit was cancelled. Tell the office.',
    ]);
  });

  it('never take an id that another visit has', async () => {
    const phone = new Phone();
    const jobId = uuid();
    const opened = phone.act('job_opened', { jobId, machineId: scene.machines[0]!.id });
    await send([opened]);
    const other = await plan();
    const again = phone.act('job_opened', { jobId, machineId: scene.machines[0]!.id });
    expect(refusals(await send([opened, again], scene.tech.token, other))).toEqual([
      'This act is of another visit.',
      'The job belongs to another visit.',
    ]);
  });

  it('from many phones at once are each stored once', async () => {
    const phone = new Phone();
    const acts = [phone.act('arrived', {}), ...phone.repair(scene.machines[0]!, { jobId: uuid() })];
    const answers = await Promise.all(Array.from({ length: 6 }, () => send(acts)));
    const all = answers.flatMap(outcomes);
    expect(all.filter((outcome) => outcome === 'stored')).toHaveLength(acts.length);
    expect(all.filter((outcome) => outcome === 'repeated')).toHaveLength(acts.length * 5);
  });

  it('are checked as strictly as any request', async () => {
    const phone = new Phone();
    const act = phone.act('arrived', {});
    const post = (body: unknown) => as('tech').call('acts.record', { params: { visitId }, body });
    const wrong = [
      { acts: [] },
      { acts: [{ ...act, kind: 'vanished' }] },
      { acts: [{ ...act, at: '2031-02-30T10:00:00Z' }] },
      { acts: [{ ...act, payload: { extra: 1 } }] },
      { acts: Array.from({ length: 201 }, () => act) },
      { acts: [{ ...act, id: 'not-an-id' }] },
    ];
    for (const body of wrong) expect((await post(body)).status).toBe(422);
    const ahead = { ...act, at: new Date(Date.now() + 3 * 86_400_000).toISOString() };
    expect(refusals(await post({ acts: [ahead] }))).toEqual([
      'The clock of the device is ahead: set it right.',
    ]);
  });

  it('are the crew’s alone', async () => {
    const client = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    expect((await send([new Phone().act('arrived', {})], client.token)).status).toBe(403);
    const params = { visitId };
    expect((await api(server.app, client.token).call('acts.list', { params })).status).toBe(403);
  });

  it('accept a photo of their own job only', async () => {
    const phone = new Phone();
    const jobId = uuid();
    const photo = (owner_id: string) =>
      insert(scene.shop, 'attachments', {
        client_id: scene.clientId,
        owner_kind: 'job',
        owner_id,
        name: 'x.jpg',
        content_type: 'image/jpeg',
        bytes: 1,
        sha256: 'b'.repeat(64),
      });
    const answer = await send([
      phone.act('job_opened', { jobId, machineId: scene.machines[0]!.id }),
      phone.act('photo', { jobId, attachmentId: await photo(jobId) }),
      phone.act('photo', { jobId, attachmentId: await photo(uuid()) }),
    ]);
    expect(outcomes(answer)).toEqual(['stored', 'stored', 'refused']);
  });
});
