import { v7 as uuid } from 'uuid';
import { absorbTicket } from '../../server/src/features/tickets/absorb-ticket';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson } from '../support/factories';
import {
  buildPart,
  buildPastVisit,
  buildScene,
  Phone,
  type Scene,
  stored,
} from '../support/visits';

interface Line {
  lineKey: string;
  basis: string;
  kind: string;
  bearer: string;
  list: number;
  charged: number;
  tax: number;
  waiting: boolean;
  proposed: { bearer: string; reasons: { words: string; decides: boolean }[] };
}
interface Job {
  jobId: string;
  result: string;
  lines: Line[];
}

// Story 2 of the product: a blocked inlet valve, a machine with nothing wrong, and a door lock that
// burnt out because the shop had fitted the hinge crooked.
describe('repair under shop warranty', () => {
  let server: TestServer;
  let scene: Scene;
  let hingeJobId: string;
  const jobs = { valve: uuid(), nothing: uuid(), lock: uuid() };
  beforeAll(async () => {
    server = await startTestServer();
    scene = await buildScene();
    hingeJobId = uuid();
    await buildPastVisit(scene, 12, (phone) =>
      phone.repair(scene.machines[2]!, {
        jobId: hingeJobId,
        category: 'door',
        did: 'hinge fitted',
      }),
    );
  });
  afterAll(() => server.close());

  const as = (who: 'owner' | 'office' | 'tech') => api(server.app, scene[who].token);
  let visitId: string;
  let callId: string;
  let ticketId: string;

  it('begins with a call of the client, which the office plans a visit for', async () => {
    const clientOwner = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    const reported = await api(server.app, clientOwner.token).call('calls.report', {
      body: { storeId: scene.storeId, machineId: scene.machines[0]!.id, symptom: 'wont_fill' },
    });
    expect(reported.status).toBe(201);
    callId = reported.body.id as string;
    const planned = await as('office').call('visits.plan', {
      body: {
        storeId: scene.storeId,
        plannedOn: new Date().toISOString().slice(0, 10),
        window: { from: '09:00', until: '11:00' },
        techMembershipId: scene.tech.membershipId,
        callIds: [callId],
      },
    });
    expect(planned.status).toBe(201);
    expect(planned.body).toMatchObject({ state: 'planned', calls: 1, bays: ['A-01'] });
    visitId = planned.body.id as string;
  });

  it('gives the tech all there is to know, the shop’s earlier work included', async () => {
    const sheet = await as('tech').call('visits.sheet', { params: { visitId } });
    expect(sheet.status).toBe(200);
    expect(sheet.body.machines).toHaveLength(4);
    expect(sheet.body.calls).toMatchObject([{ id: callId, symptom: 'wont_fill' }]);
    expect(sheet.body.earlierJobs).toMatchObject([
      { jobId: hingeJobId, bay: 'A-03', reference: '0001/1', action: 'hinge fitted' },
    ]);
  });

  it('is recorded act by act', async () => {
    const [first, , third] = scene.machines as [never, never, never];
    const valve = await buildPart(scene.shop, { category: 'inlet', unit_cost: 20_00 });
    const lock = await buildPart(scene.shop, { category: 'door', unit_cost: 35_00 });
    const phone = new Phone();
    const acts = [
      phone.act('arrived', {}),
      ...phone.repair(first, {
        jobId: jobs.valve,
        callId,
        category: 'inlet',
        cause: 'supply',
        found: 'Inlet valve blocked by grit from the main.',
        did: 'Valve replaced, screen cleaned.',
        minutes: 30,
        partIds: [valve],
      }),
      phone.act('job_opened', { jobId: jobs.nothing, machineId: scene.machines[1]!.id }),
      phone.act('nothing_found', {
        jobId: jobs.nothing,
        minutes: 10,
        cycles: 1,
        coins: 12,
        amount: 3_00,
      }),
      ...phone.repair(third, {
        jobId: jobs.lock,
        category: 'door',
        cause: 'shop_error',
        found: 'Door lock burnt out: the hinge stands crooked.',
        did: 'Lock replaced, hinge set straight.',
        minutes: 20,
        partIds: [lock],
      }),
      phone.act('warranty_marked', {
        jobId: jobs.lock,
        mark: 'own_mistake',
        words: 'we fitted the hinge crooked',
        causedByJobId: hingeJobId,
      }),
      phone.act('left', {}),
      phone.act('signed_off', { receivedBy: 'Ines' }),
    ];
    const recorded = await as('tech').call('acts.record', { params: { visitId }, body: { acts } });
    expect(recorded.status).toBe(200);
    expect(
      recorded.body.results.filter((r: { outcome: string }) => r.outcome !== 'stored'),
    ).toEqual([]);
    expect(recorded.body.visit.state).toBe('completed');
    const again = await as('tech').call('acts.record', { params: { visitId }, body: { acts } });
    expect(new Set(again.body.results.map((r: { outcome: string }) => r.outcome))).toEqual(
      new Set(['repeated']),
    );
    expect(again.body.visit.version).toBe(recorded.body.visit.version);
  });

  it('lets the rules agree with the tech, and waits for the owner', async () => {
    const rulings = await as('owner').call('rulings.show', { params: { visitId } });
    expect(rulings.status).toBe(200);
    const bearers = (rulings.body.jobs as Job[]).map((job) => [
      ...new Set(job.lines.map((line) => line.proposed.bearer)),
    ]);
    expect(bearers).toEqual([['store'], ['store'], ['shop']]);
    const lock = (rulings.body.jobs as Job[])[2]!;
    expect(lock.lines.every((line) => line.waiting)).toBe(true);
    expect(lock.lines[0]?.proposed.reasons.map((reason) => reason.words)).toEqual(
      expect.arrayContaining([
        'Imre marked it as our own mistake: we fitted the hinge crooked.',
        'It was brought about by an earlier job: hinge fitted, job 0001/1, signed off 12 days earlier on the same machine.',
      ]),
    );
    const refused = await as('office').call('tickets.signOff', { params: { visitId }, body: {} });
    expect(refused.status).toBe(409);
    expect(refused.body.detail).toBe('The owner must still decide who bears 3 lines.');
    const waiting = await as('owner').call('rulings.waiting');
    expect(waiting.body.items).toMatchObject([{ visitId, jobs: 1, lines: 3 }]);
    const confirmed = await as('owner').call('rulings.confirm', {
      params: { visitId },
      body: { lines: lock.lines.map(({ lineKey, basis }) => ({ lineKey, basis })) },
    });
    expect(confirmed.status).toBe(200);
    expect(confirmed.body.waiting).toBe(0);
    expect((await as('owner').call('rulings.waiting')).body.items).toEqual([]);
  });

  it('ends in a ticket: done at no charge, with what it would have cost', async () => {
    const ticket = await as('office').call('tickets.signOff', { params: { visitId }, body: {} });
    expect(ticket.status).toBe(201);
    ticketId = ticket.body.id as string;
    const [valve, nothing, lock] = ticket.body.jobs as [Job, Job, Job];
    // 60 minutes worked are shared by time: 30, 10 and 20; the trip of 90.00 three ways.
    expect(valve.lines.map((l) => [l.kind, l.bearer, l.list, l.charged, l.tax])).toEqual([
      ['trip', 'store', 30_00, 30_00, 0],
      ['labour', 'store', 60_00, 60_00, 0],
      ['part', 'store', 40_00, 40_00, 4_00],
    ]);
    expect(nothing.lines.map((l) => [l.kind, l.bearer, l.list, l.charged])).toEqual([
      ['trip', 'store', 30_00, 30_00],
      ['labour', 'store', 20_00, 20_00],
    ]);
    expect(lock.lines.map((l) => [l.kind, l.bearer, l.list, l.charged, l.tax])).toEqual([
      ['trip', 'shop', 30_00, 0, 0],
      ['labour', 'shop', 40_00, 0, 0],
      ['part', 'shop', 70_00, 0, 0],
    ]);
    expect(ticket.body).toMatchObject({
      name: 'T-0002',
      list: 320_00,
      net: 180_00,
      tax: 4_00,
      total: 184_00,
      borneByShop: 140_00,
      // A third of the trip's 30.00, 20 minutes at 36.00 an hour, the lock itself.
      ownCost: 10_00 + 12_00 + 35_00,
      absorbedPosted: false,
      receivedBy: 'Ines',
    });
    const call = await as('office').call('calls.show', { params: { callId } });
    expect(call.body.state).toBe('closed');
  });

  it('books what the shop absorbed once, however often the job runs', async () => {
    await absorbTicket(scene.shop.id, ticketId, new Date());
    await absorbTicket(scene.shop.id, ticketId, new Date());
    const entries = await stored<{ cost: number; offset: number; n: number }>(
      scene,
      `select (sum(amount) filter (where account = 'absorbed_cost'))::bigint as cost,
         (sum(amount) filter (where account = 'absorbed_offset'))::bigint as offset, count(*)::int as n
       from entries where shop_id = $shopId and document_kind = 'absorbed' and document_id = $ticketId`,
      { ticketId },
    );
    expect(entries).toEqual({ cost: 57_00, offset: -57_00, n: 2 });
    const ticket = await as('owner').call('tickets.show', { params: { ticketId } });
    expect(ticket.body.absorbedPosted).toBe(true);
  });
});
