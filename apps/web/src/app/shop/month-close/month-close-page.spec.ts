import { TestBed } from '@angular/core/testing';
import { Problem } from '../../core/api/problem';
import { Session } from '../../core/session/session';
import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { MonthClosePage } from './month-close-page';

const none = { count: 0, items: [] };
const money = { opening: 12_000, charged: 36_000, tax: 2_140, borneByShop: 17_100, paid: 12_000 };
const store = {
  storeId: 's1',
  storeName: 'Foxglove Lane',
  clientId: 'c1',
  clientName: 'Alder & Finch Laundries',
  visits: 5,
  ...money,
  closing: 38_140,
  lastMonth: { visits: 3, charged: 20_000, tax: 0, closing: 20_000 },
  unusual: false,
  recipients: 2,
  statementId: null,
};
const preview = {
  month: '2031-05',
  currency: 'GBP',
  dueAt: null,
  mayClose: true,
  run: null,
  stores: [store],
  totals: { stores: 1, visits: 5, ...money, closing: 38_140 },
  unfinished: {
    visits: none,
    rulings: none,
    withoutRecipient: { count: 1, items: [{ storeId: 's2', storeName: 'Quay 9', clientId: 'c1' }] },
  },
};
const run = {
  id: 'r1',
  month: '2031-05',
  state: 'building',
  startedBy: 'Imre Valdo',
  startedAt: '2031-06-01T06:00:00Z',
  finishedAt: null,
  stores: 8,
  total: 0,
  version: 1,
  problem: null,
  currency: 'GBP',
  counts: { waiting: 6, built: 0, rendered: 2, failed: 0 },
  mails: { waiting: 2, sent: 0, uncertain: 0, failed: 0, total: 2 },
  progress: 0.2,
  secondsLeft: 20,
  firstChecked: { statements: 2, checks: 10, agree: 10 },
  failedStores: [],
  withoutRecipient: [],
};

describe('MonthClosePage', () => {
  beforeEach(() => {
    document.querySelectorAll('tw-confirm-dialog').forEach((dialog) => dialog.remove());
    HTMLDialogElement.prototype.showModal = function (this: HTMLDialogElement) {
      this.open = true;
    };
    HTMLDialogElement.prototype.close = function (this: HTMLDialogElement, value?: string) {
      this.returnValue = value ?? '';
      this.dispatchEvent(new Event('close'));
    };
  });

  async function opened(shown: object = preview, answers: object = {}) {
    const api = AnsweringApi.provide({
      'statements.closePreview': shown,
      'statements.runs': onePage([]),
      'statements.run': run,
      'statements.close': run,
      ...answers,
    });
    const page = await PageUnderTest.open(MonthClosePage, 'month-close', '/month-close');
    TestBed.inject(Session).take(anAnswer({ permissions: ['statements.close'] }));
    await page.rest();
    return { api, page };
  }

  async function answerDialog(page: PageUnderTest, label: string): Promise<string> {
    const dialog = () => document.querySelector('tw-confirm-dialog dialog');
    for (let tries = 0; tries < 50 && !dialog(); tries++) await page.rest();
    const asked = dialog()?.textContent ?? '';
    const buttons = [...(dialog()?.querySelectorAll('button') ?? [])];
    buttons.find((button) => button.textContent?.includes(label))?.click();
    await page.rest();
    return asked;
  }

  it('shows what is unfinished and what each statement would say', async () => {
    const { page } = await opened();
    expect(page.text).toContain('Close May 2031');
    expect(page.text).toContain('1 store without anybody who gets the statement');
    expect(page.text).toContain('381.40');
    expect(page.text).toContain('+ 2 visits');
  });

  it('asks with the figures before it closes, then shows how far it is', async () => {
    const { api, page } = await opened();
    await page.press('Close May 2031');
    const asked = await answerDialog(page, 'Close May 2031');
    expect(asked).toContain('1 statement over £381.40 of new charges');
    expect(asked).toContain('2 mails in all');
    expect(api.sent('statements.close').map(({ body }) => body)).toEqual([{ month: '2031-05' }]);
    expect(page.text).toContain('2 of 8 made');
  });

  it('closes nothing when told so', async () => {
    const { api, page } = await opened();
    await page.press('Close May 2031');
    await answerDialog(page, 'Not yet');
    expect(api.sent('statements.close')).toEqual([]);
    expect(page.text).not.toContain('2 of 8 made');
  });

  it('follows a close that somebody began, holds it and goes on with it', async () => {
    const { api, page } = await opened(
      { ...preview, run: { id: 'r1', state: 'building' } },
      { 'statements.hold': { ...run, state: 'held' }, 'statements.goOn': run },
    );
    expect(page.text).toContain('Closing May 2031');
    expect(page.text).toContain('about 20 s');
    expect(page.text).toContain('10 of 10 checks agree');
    await page.press('Hold');
    expect(page.text).toContain('Held');
    await page.press('Go on');
    expect(page.text).toContain('Making statements');
    expect(api.sent('statements.goOn')).toEqual([{ params: { runId: 'r1' } }]);
  });

  it('stays as it is when holding is refused', async () => {
    const refusal = new Problem('conflict', 409, 'Only a close that is running can be held.');
    const { page } = await opened(
      { ...preview, run: { id: 'r1', state: 'building' } },
      { 'statements.hold': refusal },
    );
    await page.press('Hold');
    expect(page.text).toContain('2 of 8 made');
  });

  it('names the stores whose statement failed, and tries them again', async () => {
    const failed = { storeId: 's1', storeName: 'Foxglove Lane', clientId: 'c1', error: 'no rate' };
    const { page } = await opened(
      { ...preview, run: { id: 'r1', state: 'failed' } },
      {
        'statements.run': { ...run, state: 'failed', failedStores: [failed] },
        'statements.goOn': run,
      },
    );
    expect(page.text).toContain('Foxglove Lane: no rate');
    await page.press('Try these stores again');
    expect(page.text).toContain('Making statements');
  });

  it('lets each uncertain mail be decided on the sheet', async () => {
    const mail = {
      id: 'd1',
      kind: 'statement',
      state: 'uncertain',
      recipient: 'marguerite@works.example',
      recipientName: 'Marguerite Alder',
      subject: 'Statement for May 2031, Foxglove Lane',
      clientId: 'c1',
      statementId: 't1',
      attempt: 1,
      lastError: null,
      nextAttemptAt: '2031-06-01T06:00:00Z',
      sentAt: null,
      createdAt: '2031-06-01T06:00:00Z',
      version: 2,
    };
    const { api, page } = await opened(
      { ...preview, run: { id: 'r1', state: 'done' } },
      {
        'statements.run': {
          ...run,
          state: 'done',
          counts: { waiting: 0, built: 0, rendered: 8, failed: 0 },
          mails: { waiting: 0, sent: 7, uncertain: 1, failed: 0, total: 8 },
        },
        'deliveries.list': ({ query }: { query?: Record<string, unknown> }) =>
          onePage(query?.['state'] === 'uncertain' ? [mail] : []),
        'deliveries.decide': { ...mail, state: 'sent' },
      },
    );
    TestBed.inject(Session).take(anAnswer({ permissions: ['deliveries.decide'] }));
    await page.rest();
    expect(page.text).toContain('7 of 8 mailed, 1 uncertain');
    expect(page.text).toContain('answer lost');
    await page.press('It arrived at marguerite@works.example');
    expect(api.sent('deliveries.decide')).toEqual([
      { params: { deliveryId: 'd1' }, body: { decision: 'arrived' }, ifMatch: 2 },
    ]);
  });

  it('cannot close a month that is not over', async () => {
    const { page } = await opened({ ...preview, month: '2999-01', mayClose: false });
    expect(page.text).toContain('is not over');
    await expect(page.press('Close January 2999')).rejects.toThrow();
  });
});
