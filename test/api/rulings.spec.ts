import { type Act } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { insert } from '../support/factories';
import {
  buildFloor,
  buildPart,
  buildPastVisit,
  buildScene,
  Phone,
  plainBook,
  type Repair,
  type Scene,
} from '../support/visits';

interface Line {
  lineKey: string;
  basis: string;
  kind: string;
  bearer: string;
  list: number;
  cost: number;
  waiting: boolean;
  proposed: { bearer: string; reasons: { code: string; words: string; decides: boolean }[] };
  decision: { step: string; bearer: string; why: string; by: string } | null;
  outcomes: { bearer: string; charged: number; ourCost: number; claimed: number }[];
}

describe('rulings', () => {
  let server: TestServer;
  let scene: Scene;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    scene = await buildScene();
  });

  const as = (who: 'owner' | 'office' | 'tech') => api(server.app, scene[who].token);
  const machine = (n: number) => scene.machines[n - 1]!;

  /** A completed visit with one repair of A-01, and what else the acts say of it. */
  async function worked(
    job: Partial<Repair> = {},
    more: (phone: Phone, jobId: string) => Act[] = () => [],
  ) {
    const planned = await as('office').call('visits.plan', {
      body: {
        storeId: scene.storeId,
        plannedOn: new Date().toISOString().slice(0, 10),
        techMembershipId: scene.tech.membershipId,
        reason: 'Repair',
      },
    });
    const visitId = planned.body.id as string;
    const jobId = uuid();
    const phone = new Phone();
    const acts = [
      phone.act('arrived', {}),
      ...phone.repair(machine(1), { jobId, ...job }),
      ...more(phone, jobId),
      phone.act('signed_off', {}),
    ];
    const { body } = await as('tech').call('acts.record', { params: { visitId }, body: { acts } });
    expect(body.results.filter((r: { outcome: string }) => r.outcome !== 'stored')).toEqual([]);
    return { visitId, jobId, phone };
  }
  async function linesOf(visitId: string): Promise<Line[]> {
    const shown = await as('owner').call('rulings.show', { params: { visitId } });
    expect(shown.status).toBe(200);
    return (shown.body.jobs as { lines: Line[] }[]).flatMap((job) => job.lines);
  }
  const bearers = (lines: Line[]) =>
    Object.fromEntries(lines.map((line) => [line.kind, line.bearer]));
  const deciding = (line: Line | undefined) =>
    line?.proposed.reasons.filter((reason) => reason.decides).map((reason) => reason.code);
  const pick = (lines: Line[]) => lines.map(({ lineKey, basis }) => ({ lineKey, basis }));

  it('leave ordinary wear with the store, in force at once', async () => {
    const part = await buildPart(scene.shop, { category: 'pump', unit_cost: 40_00 });
    const { visitId } = await worked({ category: 'pump', partIds: [part] });
    const lines = await linesOf(visitId);
    expect(bearers(lines)).toEqual({ trip: 'store', labour: 'store', part: 'store' });
    expect(lines.some((line) => line.waiting)).toBe(false);
    expect(deciding(lines[0])).toEqual(['nothing_applies']);
  });

  it('give the shop what it warrants: labour and parts, each for its days', async () => {
    const part = await buildPart(scene.shop, { category: 'door', unit_cost: 35_00 });
    await buildPastVisit(scene, 45, (phone) =>
      phone.repair(machine(1), { jobId: uuid(), category: 'door', partIds: [part] }),
    );
    const { visitId } = await worked({ category: 'door', partIds: [part] });
    const lines = await linesOf(visitId);
    // 45 days: past the 30 of labour, within the 180 of door parts.
    expect(bearers(lines)).toEqual({ trip: 'store', labour: 'store', part: 'shop' });
    expect(deciding(lines.find((line) => line.kind === 'part'))).toEqual(['part_in_warranty']);
    const { visitId: second } = await worked({ category: 'pump' });
    expect(bearers(await linesOf(second))).toEqual({ trip: 'store', labour: 'store' });
  });

  it('make a return for the same fault the shop’s, and ask the owner', async () => {
    const fault = (phone: Phone, jobId: string) => [
      phone.act('job_opened', { jobId, machineId: machine(2).id, symptom: 'noisy' }),
      phone.act('cause', { jobId, cause: 'wear' }),
      phone.act('minutes', { jobId, minutes: 30 }),
      phone.act('job_done', { jobId, result: 'put_right', machineState: 'up' }),
    ];
    await buildPastVisit(scene, 7, (phone) => fault(phone, uuid()));
    const { visitId } = await worked({}, (phone) => fault(phone, uuid()));
    const lines = (await linesOf(visitId)).filter((line) => line.proposed.bearer === 'shop');
    expect(lines.map((line) => line.kind)).toEqual(['trip', 'labour']);
    expect(deciding(lines[1])).toEqual(['callback']);
    expect(lines.every((line) => line.waiting)).toBe(true);
  });

  it('give the supplier a defective part within the maker’s warranty, the part only', async () => {
    const { storeId, bank } = await bankOf(scene);
    const id = await insert(scene.shop, 'machines', {
      client_id: scene.clientId,
      store_id: storeId,
      bank_id: bank,
      bay: 'B-09',
      bay_number: 9,
      kind: 'front_loader',
      sticker_code: uuid(),
      supplier_warranty_until: '2099-12-31',
      state_since: new Date('2020-01-01'),
    });
    const young = { id, bay: 'B-09', kind: 'front_loader', energy: 'electric' } as const;
    const part = await buildPart(scene.shop, { category: 'motor', unit_cost: 100_00 });
    const { visitId } = await worked({}, (phone) =>
      phone.repair(young, {
        jobId: uuid(),
        category: 'motor',
        cause: 'defective_part',
        partIds: [part],
      }),
    );
    const lines = (await linesOf(visitId)).slice(2);
    expect(bearers(lines)).toEqual({ trip: 'store', labour: 'store', part: 'supplier' });
    expect(lines[2]?.outcomes.find((o) => o.bearer === 'supplier')).toEqual({
      bearer: 'supplier',
      charged: 0,
      ourCost: 0,
      claimed: 100_00,
    });
  });

  it('give a contract what it covers, on the kinds of machine it covers', async () => {
    const contract_id = await insert(scene.shop, 'contracts', {
      client_id: scene.clientId,
      number: 1,
      name: 'Care for washers',
      rule: 'FREQ=MONTHLY',
      starts_on: '2020-01-01',
      coverage: JSON.stringify({ labour: true, parts: false, trip: true, kinds: ['front_loader'] }),
    });
    await insert(scene.shop, 'contract_stores', {
      client_id: scene.clientId,
      contract_id,
      store_id: scene.storeId,
      monthly_fee: 100_00,
    });
    const part = await buildPart(scene.shop, { category: 'pump', unit_cost: 40_00 });
    const { visitId } = await worked({ category: 'pump', partIds: [part] }, (phone) =>
      phone.repair(machine(4), { jobId: uuid(), category: 'burner' }),
    );
    const lines = await linesOf(visitId);
    expect(bearers(lines.slice(0, 3))).toEqual({
      trip: 'contract',
      labour: 'contract',
      part: 'store',
    });
    expect(bearers(lines.slice(3))).toEqual({ trip: 'store', labour: 'store' });
  });

  it('follow the job that brought a failure about, even on another machine', async () => {
    const then = uuid();
    await buildPastVisit(scene, 5, (phone) =>
      phone.repair(machine(2), { jobId: then, category: 'drain', did: 'shared drain reset' }),
    );
    const { visitId } = await worked({ category: 'drain' }, (phone, jobId) => [
      phone.act('warranty_marked', { jobId, mark: 'none', causedByJobId: then }),
    ]);
    const lines = await linesOf(visitId);
    expect(bearers(lines)).toEqual({ trip: 'shop', labour: 'shop' });
    expect(deciding(lines[1])).toEqual(['follows_causing_job']);
    expect(lines.every((line) => line.waiting)).toBe(true);
  });

  it('are the owner’s to overrule, with a reason: goodwill', async () => {
    const { visitId } = await worked();
    const lines = await linesOf(visitId);
    const labour = lines.filter((line) => line.kind === 'labour');
    const body = { lines: pick(labour), bearer: 'goodwill', why: 'A client of ten years' };
    const ask = { params: { visitId }, body };
    expect((await as('office').call('rulings.overrule', ask)).status).toBe(403);
    const wordless = { ...ask, body: { ...body, why: '' } };
    expect((await as('owner').call('rulings.overrule', wordless)).status).toBe(422);
    const overruled = await as('owner').call('rulings.overrule', ask);
    expect(overruled.status).toBe(200);
    const [, decided] = overruled.body.jobs[0].lines as Line[];
    expect(decided).toMatchObject({
      bearer: 'goodwill',
      proposed: { bearer: 'store' },
      decision: { step: 'overruled', why: 'A client of ten years', by: 'Odile' },
    });
    expect(overruled.body.totals).toMatchObject({ goodwill: 60_00, ourCost: 18_00 });
    // The owner may change their mind until the ticket stands.
    const back = await as('owner').call('rulings.confirm', {
      params: { visitId },
      body: { lines: pick(labour) },
    });
    expect((back.body.jobs[0].lines as Line[])[1]).toMatchObject({
      bearer: 'store',
      decision: { step: 'confirmed' },
    });
  });

  it('are asked about again when the work was changed after a decision', async () => {
    const { visitId, jobId, phone } = await worked({}, (later, id) => [
      later.act('warranty_marked', { jobId: id, mark: 'own_mistake', words: 'we left it loose' }),
    ]);
    const before = await linesOf(visitId);
    const confirm = (lines: Line[]) =>
      as('owner').call('rulings.confirm', { params: { visitId }, body: { lines: pick(lines) } });
    expect((await confirm(before)).body.waiting).toBe(0);
    await as('office').call('acts.record', {
      params: { visitId },
      body: { acts: [phone.later(60).act('minutes', { jobId, minutes: 90 })] },
    });
    const after = await linesOf(visitId);
    expect(after.map((line) => [line.kind, line.waiting])).toEqual([
      ['trip', false],
      ['labour', true],
    ]);
    expect(after[1]?.proposed.reasons.at(-1)?.words).toMatch(/^The work was changed after/);
    const stale = await confirm(before);
    expect(stale.status).toBe(409);
    expect(stale.body.detail).toBe('The work was changed since: look at Labour on A-01 again.');
    expect((await as('owner').call('rulings.waiting')).body.items).toMatchObject([
      { visitId, lines: 1, list: 180_00, cost: 54_00 },
    ]);
    expect((await confirm(after)).body.waiting).toBe(0);
  });

  it('forget a line that is taken off the visit', async () => {
    const part = await buildPart(scene.shop, { category: 'door', unit_cost: 35_00 });
    const partUseId = uuid();
    const { visitId, jobId, phone } = await worked({}, (later, id) => [
      later.act('part_used', { jobId: id, partUseId, partId: part, source: 'van' }),
      later.act('warranty_marked', { jobId: id, mark: 'own_mistake', words: 'dropped it' }),
    ]);
    expect((await as('owner').call('rulings.waiting')).body.items).toMatchObject([{ lines: 3 }]);
    await as('tech').call('acts.record', {
      params: { visitId },
      body: { acts: [phone.act('part_removed', { jobId, partUseId })] },
    });
    expect((await as('owner').call('rulings.waiting')).body.items).toMatchObject([{ lines: 2 }]);
    expect(await linesOf(visitId)).toHaveLength(2);
  });

  it('ask the owner above the shop’s limit, whoever else bears it', async () => {
    const book = plainBook();
    scene = await buildScene({ ...book, warranty: { ...book.warranty, confirmAbove: 50_00 } });
    const part = await buildPart(scene.shop, { category: 'door', unit_cost: 35_00 });
    await buildPastVisit(scene, 45, (phone) =>
      phone.repair(machine(1), { jobId: uuid(), category: 'door', partIds: [part] }),
    );
    const { visitId } = await worked({ category: 'door', partIds: [part] });
    const fitted = (await linesOf(visitId)).find((line) => line.kind === 'part');
    expect(fitted).toMatchObject({ bearer: 'shop', list: 70_00, waiting: true });
  });

  it('suggest earlier jobs as the cause, the likeliest first', async () => {
    const other = await buildFloor(scene.shop, scene.clientId);
    const jobs = { elsewhere: uuid(), otherMachine: uuid(), otherPart: uuid(), likely: uuid() };
    await buildPastVisit({ ...scene, storeId: other.storeId }, 3, (phone) =>
      phone.repair(other.machines[0]!, { jobId: jobs.elsewhere, category: 'door' }),
    );
    await buildPastVisit(scene, 4, (phone) => [
      ...phone.repair(machine(1), { jobId: jobs.otherPart, category: 'pump' }),
      ...phone.repair(machine(3), { jobId: jobs.otherMachine, category: 'door' }),
    ]);
    await buildPastVisit(scene, 20, (phone) =>
      phone.repair(machine(1), { jobId: jobs.likely, category: 'door' }),
    );
    const { jobId } = await worked({ category: 'door' });
    const { body } = await as('tech').call('jobs.causeCandidates', { params: { jobId } });
    expect(body.items.map((item: { jobId: string }) => item.jobId)).toEqual([
      jobs.likely,
      jobs.otherPart,
      jobs.otherMachine,
    ]);
    expect(body.items[0].why).toEqual([
      'On the same machine',
      'Also worked on: door',
      '20 days earlier',
    ]);
  });

  it('say plainly when no price book is in force', async () => {
    const early = await as('office').call('visits.plan', {
      body: { storeId: scene.storeId, plannedOn: '1999-12-31', reason: 'Before there were prices' },
    });
    const shown = await as('owner').call('rulings.show', { params: { visitId: early.body.id } });
    expect(shown.status).toBe(409);
    expect(shown.body.detail).toBe('No price book is in force on 1999-12-31.');
  });
});

async function bankOf(scene: Scene): Promise<{ storeId: string; bank: string }> {
  const bank = await insert(scene.shop, 'banks', {
    client_id: scene.clientId,
    store_id: scene.storeId,
    letter: 'B',
  });
  return { storeId: scene.storeId, bank };
}
