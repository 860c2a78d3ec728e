import { Problem } from '../../core/api/problem';
import { type Answer, AnsweringApi } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { sampleBook } from '../price-book/sample-book';
import { ClientForm } from './client-form';

const client = {
  id: 'c1',
  number: 'C-001',
  name: 'Alder & Finch Laundries',
  stores: 3,
  machines: 64,
  machinesNotUp: 6,
  endedAt: null,
  version: 4,
  termsDays: null,
  taxExempt: false,
  taxExemptReference: '',
  overrides: {},
  note: '',
};

async function opened(address: string, answers: Record<string, Answer> = {}) {
  const api = AnsweringApi.provide({
    'clients.show': client,
    'clients.create': client,
    'clients.change': client,
    'prices.inForce': { book: sampleBook },
    ...answers,
  });
  const path = address === '/clients/new' ? 'clients/new' : 'clients/:clientId/change';
  return { api, page: await PageUnderTest.open(ClientForm, path, address) };
}

describe('ClientForm', () => {
  it('says beside each agreed price what the price book says', async () => {
    const { page } = await opened('/clients/new');
    expect(page.text).toContain('Price book: $95.00');
    expect(page.text).toContain('Price book: $40.00 to $65.00');
    expect(page.text).toContain('Price book: 60\u00a0% to 100\u00a0%');
  });

  it('sends nothing before a name is written', async () => {
    const { api, page } = await opened('/clients/new');
    await page.press('Add the client');
    expect(page.text).toContain('Fill this in.');
    expect(api.sent('clients.create')).toHaveLength(0);
  });

  it('adds a client with what was agreed, in minor units and basis points', async () => {
    const { api, page } = await opened('/clients/new');
    await page.fill('Name', 'Lark & Daughters');
    await page.fill('An hour of work', '80');
    await page.fill('Off every line', '2,5');
    await page.press('Add the client');
    const body = api.sent('clients.create')[0]?.body as Record<string, unknown>;
    expect(body['overrides']).toMatchObject({ normalPerHour: 8000, discountBasisPoints: 250 });
    expect(body).not.toHaveProperty('number');
    expect(page.address).toBe('/shop/clients/c1');
  });

  it('sends only what was changed, with the version that was read', async () => {
    const { api, page } = await opened('/clients/c1/change');
    await page.fill('Name', 'Alder & Finch');
    await page.press('Save the client');
    expect(api.sent('clients.change')[0]).toMatchObject({
      ifMatch: 4,
      body: { name: 'Alder & Finch' },
    });
    expect(Object.keys(api.sent('clients.change')[0]?.body as object)).toEqual(['name']);
  });

  it('keeps what was written when somebody else was quicker, and saves over the new version', async () => {
    let version = 4;
    const { api, page } = await opened('/clients/c1/change', {
      'clients.show': () => ({ ...client, version: version++ }),
      'clients.change': ({ ifMatch }: { ifMatch?: number }) =>
        ifMatch === 4 ? new Problem('stale-version', 412, 'old') : client,
    });
    await page.fill('Name', 'Alder & Finch');
    await page.press('Save the client');
    expect(page.text).toContain('Somebody changed this in the meantime.');
    await page.press('Save the client');
    expect(api.sent('clients.change')[1]).toMatchObject({
      ifMatch: 5,
      body: { name: 'Alder & Finch' },
    });
  });
});
