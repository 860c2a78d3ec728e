import { TestBed } from '@angular/core/testing';
import { Problem } from '../../core/api/problem';
import { Session } from '../../core/session/session';
import { AnsweringApi } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { SignOffPage } from './sign-off-page';

const line = (lineKey: string, bearer: string, list: number, charged: number) => ({
  position: 1,
  jobId: 'j1',
  lineKey,
  kind: 'labour',
  description: lineKey,
  unit: 'each',
  quantityMilli: 1000,
  unitPrice: list,
  discount: 0,
  bearer,
  list,
  charged,
  taxBasisPoints: 0,
  tax: 0,
  priceReasons: [],
  shop: null,
});
const preview = {
  visitId: 'v1',
  visitNumber: 412,
  currency: 'GBP',
  jobs: [
    {
      jobId: 'j1',
      position: 1,
      machine: { id: 'm1', bay: 'A-04', kind: 'top_loader', make: '', model: '' },
      finding: 'Lock burnt',
      cause: 'shop_error',
      action: 'Lock fitted',
      result: 'put_right',
      lines: [line('Labour', 'shop', 17_100, 0), line('Valve', 'store', 9_600, 9_600)],
    },
  ],
  list: 26_700,
  net: 9_600,
  tax: 480,
  total: 10_080,
  absorbed: { shop: 17_100, supplier: 0, contract: 0, goodwill: 0 },
  borneByShop: 17_100,
  blockers: [] as string[],
};
const ticket = { id: 't1', name: 'T-0142', total: 10_080, store: { id: 's1', name: 'Quay 9' } };

async function opened(answers: object = {}) {
  const api = AnsweringApi.provide({
    'tickets.preview': preview,
    'tickets.signOff': ticket,
    ...answers,
  });
  const page = await PageUnderTest.open(SignOffPage, 'visits/:visitId/ticket', '/visits/v1/ticket');
  TestBed.inject(Session).take(anAnswer({ permissions: ['tickets.sign_off'] }));
  await page.rest();
  return { api, page };
}

describe('signing off a ticket', () => {
  it('strikes what is absorbed through, and says who bears it', async () => {
    const { page } = await opened();
    const struck = [...document.querySelectorAll('.tw-money--struck')].map((e) => e.textContent);
    expect(struck).toEqual(['171.00', '£171.00']);
    expect(page.text).toContain('Borne by the shop, at no charge');
  });

  it('sends the total that was looked at', async () => {
    const { api, page } = await opened();
    await page.press('Sign off at £100.80');
    expect(api.sent('tickets.signOff')[0]).toMatchObject({ body: { total: 10_080 } });
    expect(page.address).toBe('/shop/tickets/t1');
  });

  it('says what keeps it from being signed off, and does not send it', async () => {
    const blockers = ['2 lines wait for the owner to decide who bears them.'];
    const { api, page } = await opened({ 'tickets.preview': { ...preview, blockers } });
    expect(page.text).toContain(blockers[0]);
    await page.press('Sign off at £100.80');
    expect(api.sent('tickets.signOff')).toEqual([]);
  });

  it('shows the figures anew when they are others by now', async () => {
    const others = new Problem('conflict', 409, 'Conflict', 'The total is £90.00 by now.');
    const { api, page } = await opened({ 'tickets.signOff': others });
    await page.press('Sign off at £100.80');
    expect(page.text).toContain('The total is £90.00 by now.');
    expect(api.sent('tickets.preview')).toHaveLength(2);
  });
});
