import { addDays, tradeDayOf } from '@lib/domain';
import { systemContext } from '../../server/src/core/context';
import { platformRows, rows } from '../../server/src/core/database/tenancy';
import { sweepRounds } from '../../server/src/features/contracts/sweep-rounds';
import { sweepShop } from '../../server/src/features/sweep/sweep';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';
import {
  buildLaundry,
  buildPerson,
  buildShop,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import { zone } from '../support/money';
import { pauseShop } from '../support/plans';
import { workQueue } from '../support/queue';

const today = tradeDayOf(new Date(), zone);

describe('maintenance contracts', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: TestPerson;
  let owner: TestPerson;
  let laundry: Awaited<ReturnType<typeof buildLaundry>>;
  beforeAll(async () => {
    server = await startTestServer();
  });
  afterAll(() => server.close());
  beforeEach(async () => {
    shop = await buildShop();
    office = await buildPerson(shop, 'office');
    owner = await buildPerson(shop, 'shop_owner');
    laundry = await buildLaundry(shop, 1);
  });
  const asOffice = () => api(server.app, office.token);
  const terms = (values: Record<string, unknown> = {}) => ({
    clientId: laundry.clientId,
    name: 'Monthly round',
    rule: 'FREQ=MONTHLY;BYDAY=1FR',
    startsOn: today,
    coverage: { labour: true, parts: false, trip: true, kinds: [] },
    stores: [{ storeId: laundry.storeId, monthlyFee: 18_000 }],
    ...values,
  });
  const agree = async (values?: Record<string, unknown>) => {
    const answer = await asOffice().call('contracts.create', { body: terms(values) });
    expect(answer.status).toBe(201);
    return answer.body;
  };
  const rounds = async () =>
    (await asOffice().call('rounds.list', { query: { limit: 100 } })).body.items as {
      dueOn: string;
      plannedOn: string;
      state: string;
      visitId: string;
      visitState: string;
    }[];

  it('says a rule in words with the next five days, while it is typed', async () => {
    const preview = (rule: string) =>
      asOffice().call('contracts.preview', { query: { rule, startsOn: '2031-01-01' } });
    const { body } = await preview('FREQ=MONTHLY;BYDAY=1FR');
    expect(body).toMatchObject({ valid: true, words: 'every month on the first Friday' });
    expect(body.nextRounds.map((r: { dueOn: string }) => r.dueOn)).toEqual([
      '2031-01-03',
      '2031-02-07',
      '2031-03-07',
      '2031-04-04',
      '2031-05-02',
    ]);
    const wrong = await preview('FREQ=MONTHLY;BYDAY=9XX');
    expect(wrong.body).toMatchObject({ valid: false, problem: expect.any(String), nextRounds: [] });
    const hourly = await preview('FREQ=HOURLY');
    expect(hourly.body.valid).toBe(false);
  });

  it('plans the rounds of the next weeks as visits, once each', async () => {
    const contract = await agree({ rule: 'FREQ=WEEKLY' });
    expect(contract).toMatchObject({ number: 1, state: 'running', monthlyFee: 18_000 });
    const planned = await rounds();
    const days = [0, 7, 14, 21, 28, 35].map((n) => addDays(today, n));
    expect(planned.map((round) => round.dueOn)).toEqual(days);
    expect(planned.every((round) => round.visitState === 'planned')).toBe(true);
    const context = systemContext(shop.id, new Date());
    expect(await sweepRounds(context)).toBe(0);
    const tomorrow = systemContext(shop.id, new Date(Date.now() + 7 * 86_400_000));
    const both = await Promise.all([sweepRounds(tomorrow), sweepRounds(tomorrow)]);
    expect(both[0] + both[1]).toBe(1);
    expect(await rounds()).toHaveLength(7);
    const visit = await asOffice().call('visits.show', {
      params: { visitId: planned[0]!.visitId },
    });
    expect(visit.body).toMatchObject({ reason: 'Maintenance round', plannedOn: today });
  });

  it('shifts a round from a day the shop is closed', async () => {
    const changed = await api(server.app, owner.token).call('closures.change', {
      version: 1,
      body: { weekdays: [], days: [{ day: addDays(today, 7), words: 'Stocktaking' }] },
    });
    expect(changed.body).toMatchObject({ days: [{ words: 'Stocktaking' }] });
    const stale = await api(server.app, owner.token).call('closures.change', {
      version: 9,
      body: { weekdays: [], days: [] },
    });
    expect(stale.status).toBe(412);
    await agree({ rule: 'FREQ=WEEKLY', shift: 'previous' });
    const [, second] = await rounds();
    expect(second).toMatchObject({ dueOn: addDays(today, 7), plannedOn: addDays(today, 6) });
  });

  it('is changed on the version that was seen, and ended with its rounds called off', async () => {
    const contract = await agree({ rule: 'FREQ=WEEKLY' });
    const { clientId: _, ...rest } = terms({ rule: 'FREQ=WEEKLY', name: 'Weekly round' });
    const change = (version: number) =>
      asOffice().call('contracts.change', {
        params: { contractId: contract.id },
        version,
        body: rest,
      });
    expect((await change(99)).status).toBe(412);
    const changed = await change(contract.version as number);
    expect(changed.body).toMatchObject({
      name: 'Weekly round',
      ruleWords: expect.stringMatching(/^every week/),
    });
    const end = addDays(today, 8);
    const ended = await asOffice().call('contracts.end', {
      params: { contractId: contract.id },
      version: changed.body.version as number,
      body: { endsOn: end },
    });
    expect(ended.body).toMatchObject({ endsOn: end, state: 'running' });
    expect((await rounds()).map((round) => [round.state, round.visitState])).toEqual([
      ['planned', 'planned'],
      ['planned', 'planned'],
      ['skipped', 'cancelled'],
      ['skipped', 'cancelled'],
      ['skipped', 'cancelled'],
      ['skipped', 'cancelled'],
    ]);
  });

  it('follows what became of the visit', async () => {
    await agree({ rule: 'FREQ=WEEKLY' });
    const [first] = await rounds();
    await inShop(shop, () =>
      rows(`update visits set state = 'completed' where shop_id = $shopId and id = $id`, {
        shopId: shop.id,
        id: first?.visitId,
      }),
    );
    expect((await rounds())[0]?.state).toBe('done');
    await sweepRounds(systemContext(shop.id, new Date()));
    const [stored] = await inShop(shop, () =>
      rows<{ state: string }>(
        `select state from rounds where shop_id = $shopId and visit_id = $id`,
        { shopId: shop.id, id: first?.visitId },
      ),
    );
    expect(stored?.state).toBe('done');
  });

  it('plans by the sweep, but nothing for a paused shop', async () => {
    const contract = await agree({ rule: 'FREQ=WEEKLY' });
    const sweepIn = async (days: number) => {
      await sweepShop(systemContext(shop.id, new Date(Date.now() + days * 86_400_000)), server.log);
      return workQueue(server, 'rounds-plan');
    };
    await inShop(shop, async () => {
      await rows('update visits set round_id = null where shop_id = $shopId', { shopId: shop.id });
      await rows('delete from rounds where shop_id = $shopId and contract_id = $id', {
        shopId: shop.id,
        id: contract.id,
      });
    });
    await pauseShop(shop);
    expect(await sweepIn(0)).toBe(1);
    expect(await rounds()).toEqual([]);
    await platformRows(`update subscriptions set state = 'active' where shop_id = $shopId`, {
      shopId: shop.id,
    });
    expect(await sweepIn(1)).toBe(1);
    expect(await rounds()).toHaveLength(6);
  });

  it('refuses a rule that is none, stores of another client, and a start after the end', async () => {
    const stranger = await buildLaundry(shop, 1);
    const wrong: [Record<string, unknown>, string][] = [
      [{ rule: 'FREQ=NEVER' }, '/rule'],
      [{ rule: 'FREQ=MINUTELY' }, '/rule'],
      [{ stores: [{ storeId: stranger.storeId, monthlyFee: 1 }] }, '/stores/0/storeId'],
      [{ endsOn: addDays(today, -1) }, '/endsOn'],
      [{ clientId: stranger.storeId }, '/clientId'],
    ];
    for (const [values, pointer] of wrong) {
      const answer = await asOffice().call('contracts.create', { body: terms(values) });
      expect([answer.status, answer.body.errors?.[0]?.pointer]).toEqual([422, pointer]);
    }
  });

  it('shows a client its own contracts, and lets the office alone write', async () => {
    const contract = await agree();
    const client = await buildPerson(shop, 'client_owner', { clientId: laundry.clientId });
    const asClient = api(server.app, client.token);
    expect((await asClient.call('contracts.list')).body.items).toEqual([
      expect.objectContaining({ id: contract.id, ruleWords: 'every month on the first Friday' }),
    ]);
    expect((await asClient.call('contracts.create', { body: terms() })).status).toBe(403);
    const other = await buildPerson(shop, 'client_owner', {
      clientId: (await buildLaundry(shop, 1)).clientId,
    });
    const hidden = await api(server.app, other.token).call('contracts.show', {
      params: { contractId: contract.id as string },
    });
    expect(hidden.status).toBe(404);
  });
});
