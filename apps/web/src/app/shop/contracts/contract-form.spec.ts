import { TestBed } from '@angular/core/testing';
import { MatNativeSelectHarness } from '@angular/material/input/testing';
import { Problem } from '../../core/api/problem';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { ContractForm } from './contract-form';

const agreed = {
  id: 'k1',
  number: 3,
  name: 'Full maintenance, Quay 9',
  clientId: 'c1',
  clientName: 'Quayside Wash Company',
  ruleWords: 'every month on the first Monday',
  rule: 'FREQ=YEARLY;BYMONTH=1,7;BYDAY=2WE',
  startsOn: '2031-01-01',
  endsOn: null,
  startTime: '08:30',
  shift: 'previous',
  coverage: { labour: true, parts: true, trip: false, kinds: ['dryer'] },
  techMembershipId: null,
  storeList: [{ storeId: 's1', storeName: 'Quay 9', monthlyFee: 9_550 }],
  version: 4,
};
const stores = (clientId: unknown) =>
  clientId === 'c1' ? [{ id: 's1', name: 'Quay 9' }] : [{ id: 's7', name: 'Tanner Street' }];

describe('ContractForm', () => {
  async function opened(address: string, answers: object = {}) {
    const api = AnsweringApi.provide({
      'clients.list': onePage([
        { id: 'c1', name: 'Quayside Wash Company' },
        { id: 'c2', name: 'Alder & Finch' },
      ]),
      'crew.list': onePage([{ id: 'm1', name: 'Imre Valdo' }]),
      'stores.list': ({ query }: { query?: Record<string, unknown> }) =>
        onePage(stores(query?.['clientId'])),
      'contracts.preview': { valid: true, problem: null, words: 'every month', nextRounds: [] },
      'contracts.show': agreed,
      'contracts.create': agreed,
      'contracts.change': agreed,
      ...answers,
    });
    const path = address.includes('change') ? 'contracts/:contractId/change' : 'contracts/new';
    const page = await PageUnderTest.open(ContractForm, path, address);
    TestBed.inject(Session).take(anAnswer());
    await page.rest();
    return { api, page };
  }

  async function choose(page: PageUnderTest, at: number, text: string) {
    const selects = await page.loader.getAllHarnesses(MatNativeSelectHarness);
    await selects[at]?.selectOptions({ text });
    await page.rest();
  }

  it('agrees a contract with the rule in words and a fee for a store of the client', async () => {
    const { api, page } = await opened('/contracts/new');
    await choose(page, 0, 'Quayside Wash Company');
    await page.fill('Name', 'Full maintenance, Quay 9');
    await page.fill('Starts on', '2031-06-01');
    await page.fill('Every', '3');
    const add = (await page.loader.getAllHarnesses(MatNativeSelectHarness)).length - 1;
    await choose(page, add, 'Quay 9');
    await page.fill('Quay 9', '95.50');
    await page.press('Agree the contract');
    expect(api.sent('contracts.create').map(({ body }) => body)).toEqual([
      {
        clientId: 'c1',
        name: 'Full maintenance, Quay 9',
        rule: 'FREQ=MONTHLY;INTERVAL=3;BYDAY=1MO',
        startsOn: '2031-06-01',
        endsOn: null,
        startTime: '09:00',
        shift: 'next',
        coverage: { labour: true, parts: false, trip: true, kinds: [] },
        techMembershipId: null,
        stores: [{ storeId: 's1', monthlyFee: 9_550 }],
      },
    ]);
    expect(page.address).toBe('/shop/contracts/k1');
  });

  it('drops the stores of one client when another is chosen', async () => {
    const { page } = await opened('/contracts/new');
    await choose(page, 0, 'Quayside Wash Company');
    const add = (await page.loader.getAllHarnesses(MatNativeSelectHarness)).length - 1;
    await choose(page, add, 'Quay 9');
    await choose(page, 0, 'Alder & Finch');
    await page.press('Agree the contract');
    expect(page.text).toContain('Add at least one store.');
    expect(page.text).not.toContain('Remove Quay 9');
  });

  it('keeps a rule it has no words for, and changes only what was changed', async () => {
    const { api, page } = await opened('/contracts/k1/change');
    await page.fill('Name', 'Full maintenance at Quay 9');
    await page.press('Save the contract');
    const [sent] = api.sent('contracts.change');
    expect(sent).toMatchObject({ ifMatch: 4, params: { contractId: 'k1' } });
    expect(sent?.body).toEqual({
      name: 'Full maintenance at Quay 9',
      rule: 'FREQ=YEARLY;BYMONTH=1,7;BYDAY=2WE',
      startsOn: '2031-01-01',
      endsOn: null,
      startTime: '08:30',
      shift: 'previous',
      coverage: { labour: true, parts: true, trip: false, kinds: ['dryer'] },
      techMembershipId: null,
      stores: [{ storeId: 's1', monthlyFee: 9_550 }],
    });
    expect(TestBed.inject(Messages).message()?.text).toContain('planned before stay');
  });

  it('keeps what was written when somebody else changed it meanwhile', async () => {
    const stale = new Problem('stale-version', 412, 'It was changed meanwhile');
    const { page } = await opened('/contracts/k1/change', { 'contracts.change': stale });
    await page.fill('Name', 'Full maintenance at Quay 9');
    await page.press('Save the contract');
    expect(page.text).toContain('Somebody changed this in the meantime');
    await page.press('Save the contract');
    expect(page.address).toContain('/change');
  });
});
