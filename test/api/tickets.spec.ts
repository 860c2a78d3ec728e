import { v7 as uuid } from 'uuid';
import { systemContext } from '../../server/src/core/context';
import { platformRows } from '../../server/src/core/database/tenancy';
import { sweepShop } from '../../server/src/features/sweep/sweep';
import { absorbTicket } from '../../server/src/features/tickets/absorb-ticket';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import { buildPerson, insert } from '../support/factories';
import { workQueue } from '../support/queue';
import { buildPart, buildPastVisit, buildScene, type Scene, stored } from '../support/visits';

interface Line {
  kind: string;
  list: number;
  charged: number;
  tax: number;
  bearer: string;
  lineKey: string;
  basis: string;
}

describe('tickets', () => {
  let server: TestServer;
  let scene: Scene;
  beforeAll(async () => {
    server = await startTestServer();
    scene = await buildScene();
  });
  afterAll(() => server.close());

  const as = (who: 'owner' | 'office' | 'tech') => api(server.app, scene[who].token);
  const signOff = (visitId: string, ask: { key?: string; body?: object } = {}) =>
    as('office').call('tickets.signOff', { params: { visitId }, body: {}, ...ask });

  /** A completed visit with two repairs and a part, ready to be signed off. */
  async function completed(): Promise<string> {
    const part = await buildPart(scene.shop, { category: 'pump', unit_cost: 33_33 });
    const { visitId } = await buildPastVisit(
      scene,
      1,
      (phone) => [
        ...phone.repair(scene.machines[0]!, {
          jobId: uuid(),
          category: `part ${uuid().slice(-6)}`,
          minutes: 17,
          partIds: [part],
        }),
        ...phone.repair(scene.machines[1]!, {
          jobId: uuid(),
          category: `part ${uuid().slice(-6)}`,
          minutes: 40,
        }),
      ],
      { signOff: false },
    );
    return visitId;
  }
  const linesOf = (ticket: { jobs: { lines: Line[] }[] }) =>
    ticket.jobs.flatMap((job) => job.lines);
  const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);

  it('say beforehand what they will say, and foot to the cent', async () => {
    const visitId = await completed();
    const preview = await as('office').call('tickets.preview', { params: { visitId } });
    expect(preview.body.blockers).toEqual([]);
    const wrong = await signOff(visitId, { body: { total: preview.body.total + 1 } });
    expect(wrong.status).toBe(409);
    const ticket = await signOff(visitId, { body: { total: preview.body.total } });
    expect(ticket.status).toBe(201);
    for (const field of ['list', 'net', 'tax', 'total', 'borneByShop'] as const) {
      expect(ticket.body[field]).toBe(preview.body[field]);
    }
    const lines = linesOf(ticket.body);
    expect(lines).toEqual(linesOf(preview.body));
    expect(ticket.body.list).toBe(sum(lines.map((line) => line.list)));
    expect(ticket.body.net).toBe(sum(lines.map((line) => line.charged)));
    expect(ticket.body.tax).toBe(sum(lines.map((line) => line.tax)));
    expect(ticket.body.total).toBe(ticket.body.net + ticket.body.tax);
    const trips = lines.filter((line) => line.kind === 'trip');
    expect(sum(trips.map((line) => line.list))).toBe(90_00);
    const after = await as('office').call('tickets.preview', { params: { visitId } });
    expect(after.status).toBe(409);
  });

  it('post what the store owes, once, in entries that sum to zero', async () => {
    const ticket = (await signOff(await completed())).body;
    const entries = await stored<{ all: [string, number][] }>(
      scene,
      `select jsonb_agg(jsonb_build_array(account, amount) order by account) as all from entries
       where shop_id = $shopId and document_kind = 'ticket' and document_id = $id`,
      { id: ticket.id },
    );
    const posted = Object.fromEntries(entries.all);
    expect(posted.unbilled).toBe(ticket.total);
    expect(posted.tax_payable).toBe(-ticket.tax);
    expect(posted.revenue_trip).toBe(-90_00);
    expect(sum(Object.values(posted))).toBe(0);
    const waiting = await stored<{ n: number }>(
      scene,
      `select count(*)::int as n from pgboss.job
       where name = 'warranty-absorb' and data ->> 'ticketId' = $id`,
      { id: ticket.id },
    );
    expect(waiting.n).toBe(1);
  });

  it('are signed off once, however often it is asked for', async () => {
    const visitId = await completed();
    const key = uuid();
    const twice = await Promise.all([signOff(visitId, { key }), signOff(visitId, { key })]);
    expect(twice.map((answer) => answer.status)).toEqual([201, 201]);
    expect(twice[0].body.id).toBe(twice[1].body.id);
    const other = await signOff(visitId);
    expect(other.status).toBe(409);
    expect(other.body.detail).toBe(
      `The visit is signed off already, as ticket ${twice[0].body.name}.`,
    );
    const second = await completed();
    const racing = await Promise.all([signOff(second), signOff(second), signOff(second)]);
    expect(racing.map((answer) => answer.status).sort()).toEqual([201, 409, 409]);
  });

  it('are numbered without gaps, twenty at once and refused ones between', async () => {
    const visits: string[] = [];
    for (let i = 0; i < 20; i++) visits.push(await completed());
    const before = await stored<{ last: number }>(
      scene,
      'select coalesce(max(number), 0)::int as last from tickets where shop_id = $shopId',
    );
    const answers = await Promise.all(
      visits.flatMap((visitId) => [signOff(visitId, { body: { total: 1 } }), signOff(visitId)]),
    );
    const statuses = answers.map((answer) => answer.status);
    expect(statuses.filter((status) => status === 201)).toHaveLength(20);
    expect(statuses.filter((status) => status === 409)).toHaveLength(20);
    const numbers = answers
      .filter((answer) => answer.status === 201)
      .map((answer) => answer.body.number as number)
      .sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 20 }, (_, i) => before.last + 1 + i));
  }, 60_000);

  it('are never changed, by anybody', async () => {
    const ticket = (await signOff(await completed())).body;
    for (const sql of [
      'update tickets set total = 0, net = 0, tax = 0 where shop_id = $shopId and id = $id',
      'delete from ticket_lines where shop_id = $shopId and ticket_id = $id',
    ]) {
      await expect(stored(scene, sql, { id: ticket.id })).rejects.toThrow(/permission denied/);
    }
    const again = await as('office').call('tickets.show', { params: { ticketId: ticket.id } });
    expect(again.body).toEqual(ticket);
  });

  it('keep the rulings they were signed off with, whatever is recorded later', async () => {
    const visitId = await completed();
    const rulings = (await as('owner').call('rulings.show', { params: { visitId } })).body;
    const [trip] = rulings.jobs[0].lines as Line[];
    await as('owner').call('rulings.overrule', {
      params: { visitId },
      body: {
        lines: [{ lineKey: trip!.lineKey, basis: trip!.basis }],
        bearer: 'goodwill',
        why: 'We came late',
      },
    });
    const ticket = (await signOff(visitId)).body;
    expect(ticket.absorbed.goodwill).toBe(trip!.list);
    expect(ticket.jobs[0].lines[0]).toMatchObject({
      charged: 0,
      shop: { decision: { by: 'Odile', why: 'We came late' } },
    });
    await as('office').call('clients.change', {
      params: { clientId: scene.clientId },
      version: (await as('office').call('clients.show', { params: { clientId: scene.clientId } }))
        .body.version,
      body: { overrides: { discountBasisPoints: 1_000 } },
    });
    const after = (await as('owner').call('rulings.show', { params: { visitId } })).body;
    expect(after.visit.ticketId).toBe(ticket.id);
    expect((after.jobs[0].lines as Line[]).map((line) => [line.bearer, line.list])).toEqual(
      ticket.jobs[0].lines.map((line: Line) => [line.bearer, line.list]),
    );
    expect(after.waiting).toBe(0);
    const late = await as('owner').call('rulings.confirm', {
      params: { visitId },
      body: { lines: [{ lineKey: trip!.lineKey, basis: trip!.basis }] },
    });
    expect(late.status).toBe(409);
    // Its job was lost: the sweep finds by the tables that the shop's own cost is not posted.
    await platformRows(`delete from pgboss.job where name = 'warranty-absorb'`);
    const hourLater = systemContext(scene.shop.id, new Date(Date.now() + 3_600_000));
    await sweepShop(hourLater, server.log);
    await sweepShop(hourLater, server.log);
    const lost = await stored<{ n: number }>(
      scene,
      'select count(*)::int as n from tickets where shop_id = $shopId and own_cost <> 0',
    );
    expect(await workQueue(server, 'warranty-absorb')).toBe(lost.n);
    await absorbTicket(scene.shop.id, ticket.id, new Date());
    await sweepShop(hourLater, server.log);
    expect(await workQueue(server, 'warranty-absorb')).toBe(0);
    const shown = await as('owner').call('tickets.show', { params: { ticketId: ticket.id } });
    expect(shown.body).toMatchObject({ absorbedPosted: true, ownCost: 15_00 });
    const list = await as('office').call('tickets.list', { query: { absorbed: 'goodwill' } });
    expect(list.body.items).toMatchObject([{ id: ticket.id, borneByShop: trip!.list }]);
  });

  it('are not for visits that are under way, or on which nothing was done', async () => {
    const planned = await as('office').call('visits.plan', {
      body: { storeId: scene.storeId, plannedOn: '2031-05-06', reason: 'x' },
    });
    const early = await signOff(planned.body.id);
    expect([early.status, early.body.detail]).toEqual([409, 'The visit is not completed yet.']);
    const { visitId } = await buildPastVisit(scene, 1, () => [], { signOff: false });
    const empty = await signOff(visitId);
    expect(empty.body.detail).toBe('No machine was worked on: there is nothing to bill.');
    const shown = (await as('office').call('visits.show', { params: { visitId } })).body;
    const cancelled = await as('office').call('visits.cancel', {
      params: { visitId },
      version: shown.version,
      body: { words: 'Nobody was there' },
    });
    expect(cancelled.body.state).toBe('cancelled');
  });

  it('charge an exempt client no tax', async () => {
    const exempt = await buildScene();
    await api(server.app, exempt.office.token).call('clients.change', {
      params: { clientId: exempt.clientId },
      version: 1,
      body: { taxExempt: true, taxExemptReference: 'EX-9' },
    });
    const part = await buildPart(exempt.shop, { category: 'pump', unit_cost: 50_00 });
    const { visitId } = await buildPastVisit(
      exempt,
      1,
      (phone) => phone.repair(exempt.machines[0]!, { jobId: uuid(), partIds: [part] }),
      { signOff: false },
    );
    const ticket = await api(server.app, exempt.office.token).call('tickets.signOff', {
      params: { visitId },
      body: {},
    });
    expect(ticket.body).toMatchObject({ tax: 0, net: 250_00, total: 250_00 });
  });

  it('show a client what was charged and what the shop bore, without costs and reasons', async () => {
    const { ticketId } = await buildPastVisit(scene, 2, (phone) =>
      phone.repair(scene.machines[2]!, { jobId: uuid(), category: 'belt' }),
    );
    const owner = await buildPerson(scene.shop, 'client_owner', { clientId: scene.clientId });
    const asked = api(server.app, owner.token);
    const params = { ticketId: ticketId as string };
    const shown = await asked.call('tickets.show', { params });
    expect(shown.body).toMatchObject({ ownCost: null, absorbedPosted: null, edition: null });
    expect(linesOf(shown.body).every((line) => (line as { shop?: unknown }).shop === null)).toBe(
      true,
    );
    const stranger = await insert(scene.shop, 'clients', { name: 'Stranger', number: 'X-1' });
    const strange = api(
      server.app,
      (await buildPerson(scene.shop, 'client_owner', { clientId: stranger })).token,
    );
    expect((await strange.call('tickets.show', { params })).status).toBe(404);
    expect((await strange.call('tickets.list')).body.items).toEqual([]);
    const attendant = await buildPerson(scene.shop, 'attendant', {
      clientId: scene.clientId,
      storeId: scene.storeId,
    });
    const seen = api(server.app, attendant.token);
    expect((await seen.call('tickets.show', { params })).status).toBe(403);
    expect(
      (await asked.call('tickets.signOff', { params: { visitId: uuid() }, body: {} })).status,
    ).toBe(403);
  });
});
