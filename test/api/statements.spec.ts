import { spawnSync } from 'node:child_process';
import { addDays, monthBounds } from '@lib/domain';
import { systemContext } from '../../server/src/core/context';
import { rows } from '../../server/src/core/database/tenancy';
import { closeMonth } from '../../server/src/features/statements/close-month';
import { finishRun } from '../../server/src/features/statements/finish-run';
import { sweepStatements } from '../../server/src/features/statements/sweep-statements';
import { api } from '../support/api';
import { type TestServer } from '../support/app';
import {
  buildPerson,
  buildShop,
  insert,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import {
  bookTroubles,
  buildPayingStore,
  buildSignedOff,
  closedMonths,
  type MoneyStore,
  workClose,
  zone,
} from '../support/money';
import { pauseShop } from '../support/plans';
import { setUpMailServer } from '../support/set-ups';

const { last, before, lastDay } = closedMonths();
const endOfBefore = monthBounds(before, zone);

describe('statements', () => {
  let server: TestServer;
  let shop: TestShop;
  let office: TestPerson;
  let store: MoneyStore;
  setUpMailServer((made) => ({ server } = made));
  beforeEach(async () => {
    shop = await buildShop();
    office = await buildPerson(shop, 'office');
    store = await buildPayingStore(shop);
  });
  const asOffice = () => api(server.app, office.token);
  const at = (day: string) => systemContext(shop.id, new Date(`${day}T16:00:00Z`));

  /** Closes the month before last, as it happened then. */
  async function closeBefore(): Promise<string> {
    const context = at(addDays(endOfBefore.lastDay, 2));
    const runId = await closeMonth(context, before);
    await finishRun(context, runId);
    return runId;
  }

  async function closeLast() {
    const { status, body } = await asOffice().call('statements.close', { body: { month: last } });
    expect(status).toBe(201);
    await workClose(server);
    return (await asOffice().call('statements.run', { params: { runId: body.id as string } })).body;
  }

  async function statementOf(month: string) {
    const { body } = await asOffice().call('statements.list', {
      query: { month, storeId: store.storeId },
    });
    expect(body.items).toHaveLength(1);
    const shown = await asOffice().call('statements.show', {
      params: { statementId: body.items[0].id as string },
    });
    return shown.body;
  }

  async function contract(values: Record<string, unknown>, monthlyFee: number) {
    const id = await insert(shop, 'contracts', {
      client_id: store.clientId,
      number: 7,
      name: 'Quarterly',
      rule: 'FREQ=MONTHLY;BYDAY=1TU',
      ...values,
    });
    await insert(shop, 'contract_stores', {
      client_id: store.clientId,
      contract_id: id,
      store_id: store.storeId,
      monthly_fee: monthlyFee,
    });
  }

  it('is begun once by two who press the button at the same moment, or one who presses twice', async () => {
    const close = (key?: string) =>
      asOffice().call('statements.close', { body: { month: last }, ...(key ? { key } : {}) });
    const [one, other] = await Promise.all([close(), close()]);
    expect([one.status, other.status].sort()).toEqual([201, 409]);
    shop = await buildShop();
    office = await buildPerson(shop, 'office');
    const key = 'the-same-key-for-both-presses';
    const [first, again] = await Promise.all([close(key), close(key)]);
    expect([first.status, again.status]).toEqual([201, 201]);
    expect(again.body.id).toBe(first.body.id);
    const { body } = await asOffice().call('statements.runs');
    expect(body.items).toHaveLength(1);
  });

  it('opens with what the last one closed with, less what was paid meanwhile', async () => {
    await buildSignedOff(shop, store, { on: `${before}-10`, net: 12_000 });
    await closeBefore();
    const paid = await asOffice().call('payments.record', {
      body: { storeId: store.storeId, method: 'cheque', amount: 15_000, receivedOn: `${last}-04` },
    });
    expect(paid.body).toMatchObject({ balance: -3_000, credit: 3_000 });
    await buildSignedOff(shop, store, { on: `${last}-11`, net: 38_140 });
    const preview = await asOffice().call('statements.closePreview', { query: { month: last } });
    expect(preview.body.stores[0]).toMatchObject({
      opening: 12_000,
      paid: 15_000,
      charged: 38_140,
      closing: 35_140,
      lastMonth: { visits: 1, charged: 12_000, closing: 12_000 },
      unusual: true,
    });
    await closeLast();
    expect(await statementOf(last)).toMatchObject({
      opening: 12_000,
      paid: 15_000,
      charged: 38_140,
      closing: 35_140,
      // What was paid ahead is used for it by itself.
      open: 35_140,
      toPay: 35_140,
    });
    expect(await bookTroubles(shop)).toEqual([]);
    const { body } = await asOffice().call('balances.list', { query: { storeId: store.storeId } });
    expect(body.items[0]).toMatchObject({ balance: 35_140, unbilled: 0, lastPaid: 15_000 });
  });

  it('adds a contract’s fee once, by the days it ran', async () => {
    await contract({ starts_on: `${last}-16` }, 30_000);
    const days = Number(lastDay.slice(8));
    const fee = Math.round((30_000 * (days - 15)) / days);
    const preview = await asOffice().call('statements.closePreview', { query: { month: last } });
    expect(preview.body.totals.charged).toBe(fee);
    await closeLast();
    const statement = await statementOf(last);
    expect(statement.lines).toEqual([
      expect.objectContaining({
        kind: 'fee',
        reference: 'M-0007',
        words: expect.stringMatching(/^Maintenance M-0007 Quarterly, .* to /),
        charged: fee,
      }),
    ]);
    expect(await bookTroubles(shop)).toEqual([]);
    const trial = await asOffice().call('ledger.trialBalance');
    expect(trial.body.total).toBe(0);
    const of = (account: string) =>
      trial.body.accounts.find((a: { account: string }) => a.account === account).balance;
    expect([of('receivable'), of('unbilled'), of('revenue_contract')]).toEqual([fee, 0, -fee]);
  });

  it('takes in the fees of a month that was never closed', async () => {
    await contract({ starts_on: `${before}-01` }, 10_000);
    const context = at(`${before}-03`);
    const earlier = monthBounds(addDays(`${before}-01`, -1).slice(0, 7), zone);
    await finishRun(context, await closeMonth(context, earlier.firstDay.slice(0, 7)));
    await closeLast();
    expect((await statementOf(last)).charged).toBe(20_000);
  });

  it('charges for lateness by the shop’s terms, and taxes by the price book', async () => {
    await inShop(shop, () =>
      rows(
        `update shop_settings set late_charge_basis_points = 1200, terms_days = 10 where shop_id = $shopId`,
        { shopId: shop.id },
      ),
    );
    await insert(shop, 'editions', {
      number: 1,
      valid_from: '2001-01-01',
      book: JSON.stringify({
        taxes: {
          rates: [{ place: '', kind: 'late_charge', basisPoints: 1000, validFrom: '2000-01-01' }],
          rounding: 'line',
        },
      }),
    });
    await buildSignedOff(shop, store, { on: `${before}-10`, net: 100_000 });
    // The edition of the ticket is older than the book with the tax on late charges.
    await closeBefore();
    const overdueFrom = addDays(endOfBefore.lastDay, 12);
    const days = (Date.parse(lastDay) - Date.parse(overdueFrom)) / 86_400_000;
    const charge = Math.round((100_000 * 0.12 * days) / 365);
    await closeLast();
    const statement = await statementOf(last);
    expect(statement.lines).toEqual([
      expect.objectContaining({
        kind: 'late_charge',
        charged: charge,
        tax: Math.round(charge / 10),
      }),
    ]);
    expect(statement.closing).toBe(100_000 + charge + Math.round(charge / 10));
  });

  it('lets one store’s trouble keep nobody else from their statement', async () => {
    const other = await buildPayingStore(shop);
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 1_000 });
    await buildSignedOff(shop, other, { on: `${last}-05`, net: 2_000 });
    const terms = (days: number) =>
      inShop(shop, () =>
        rows('update clients set terms_days = $days where shop_id = $shopId and id = $id', {
          shopId: shop.id,
          id: store.clientId,
          days,
        }),
      );
    // Longer than any terms are: the statement cannot be dated.
    await terms(500);
    const run = await closeLast();
    expect(run).toMatchObject({
      state: 'failed',
      problem: 'One statement could not be made.',
      counts: { failed: 1, rendered: 1 },
      mails: { sent: 1 },
      failedStores: [{ storeId: store.storeId, error: expect.stringContaining('Terms') }],
    });
    expect(await bookTroubles(shop)).toEqual([]);
    await terms(30);
    await asOffice().call('statements.goOn', { params: { runId: run.id as string } });
    await workClose(server);
    const done = await asOffice().call('statements.run', { params: { runId: run.id as string } });
    expect(done.body).toMatchObject({ state: 'done', counts: { rendered: 2 }, mails: { sent: 2 } });
    expect(await bookTroubles(shop)).toEqual([]);
  });

  it('is closed by the schedule, however late a worker looks', async () => {
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 1_000 });
    const due = new Date(monthBounds(last, zone).until);
    await sweepStatements(systemContext(shop.id, new Date(due.getTime() + 5 * 3_600_000)));
    const runs = async () => (await asOffice().call('statements.runs')).body.items;
    expect(await runs()).toEqual([]);
    await sweepStatements(systemContext(shop.id, new Date(due.getTime() + 30 * 3_600_000)));
    await sweepStatements(systemContext(shop.id, new Date(due.getTime() + 31 * 3_600_000)));
    expect(await runs()).toEqual([expect.objectContaining({ month: last, startedBy: null })]);
    await workClose(server);
    expect((await runs())[0].state).toBe('done');
  });

  it('is not closed by the schedule of a paused shop, nor of one without work', async () => {
    const late = () => systemContext(shop.id, new Date());
    await sweepStatements(late());
    expect((await asOffice().call('statements.runs')).body.items).toEqual([]);
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 1_000 });
    await pauseShop(shop);
    await sweepStatements(late());
    expect((await asOffice().call('statements.runs')).body.items).toEqual([]);
    const button = await asOffice().call('statements.close', { body: { month: last } });
    expect(button.status).toBe(403);
  });

  it('exports the books as a journal, and lists the entries behind it', async () => {
    await buildSignedOff(shop, store, { on: `${last}-05`, net: 38_140, tax: 3_147 });
    await closeLast();
    const journal = await asOffice().call('ledger.journal');
    expect(journal.status).toBe(200);
    expect(journal.text).toMatch(/\(S-0001\) statement/);
    expect(journal.text).toContain('412.87 USD');
    // Another program agrees, where it is installed.
    const books = spawnSync('hledger', ['-f', '-', 'balance', '-N', 'receivable'], {
      input: journal.text,
      encoding: 'utf8',
      env: { ...process.env, LANG: 'C.UTF-8' },
    });
    if (!books.error)
      expect([books.status, books.stdout]).toEqual([0, expect.stringContaining('412.87 USD')]);
    const { body } = await asOffice().call('ledger.entries', { query: { account: 'receivable' } });
    expect(body.items).toEqual([
      expect.objectContaining({ documentKind: 'statement', amount: 41_287 }),
    ]);
    const aged = await asOffice().call('receivables.list');
    expect(aged.body.items).toEqual([
      expect.objectContaining({
        storeId: store.storeId,
        current: 41_287,
        total: 41_287,
        credit: 0,
      }),
    ]);
    expect(aged.body.totals).toMatchObject({ current: 41_287, total: 41_287 });
  });
});
