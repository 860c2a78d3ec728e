import { MatButtonHarness } from '@angular/material/button/testing';
import { PageUnderTest } from '../../testing/page';
import { ReportPage } from './report-page';

const machines = { up: 1, degraded: 0, down: 0, lockedOut: 0 };
const store = (id: string, name: string) => ({
  id,
  number: id,
  name,
  address: '',
  client: { id: 'c1', name: 'Alder' },
  machines,
  endedAt: null,
  version: 1,
});
const list = (...items: object[]) => ({ items, next: null, count: { value: 1, capped: false } });
const floor = {
  store: { id: 's1', number: 'S-001', name: 'Foxglove Lane', client: { id: 'c1', name: 'Alder' } },
  banks: [
    {
      id: 'b1',
      letter: 'A',
      words: '',
      version: 1,
      machines: [
        {
          id: 'm4',
          bay: 'A-04',
          bayNumber: 4,
          kind: 'top_loader',
          energy: 'electric',
          make: 'Kestrel',
          model: 'TL-9',
          state: 'up',
          stateSince: '2031-05-06T10:00:00Z',
          conditions: 0,
          openCalls: 0,
          version: 1,
        },
      ],
    },
  ],
};
const call = {
  id: 'k1',
  number: 184,
  store: { id: 's1', name: 'Foxglove Lane' },
  machine: { id: 'm4', bay: 'A-04', kind: 'top_loader', make: '', model: '' },
};

async function open(address = '/client/calls/new') {
  const page = await PageUnderTest.open(ReportPage, 'client/calls/new', address);
  await page.answer('/api/stores?limit=100', list(store('s1', 'Foxglove Lane')));
  await page.answer('/api/stores/s1/floor', floor);
  return page;
}

function pressSymptom(value: string): void {
  document.querySelector<HTMLInputElement>(`input[value="${value}"]`)?.click();
}

describe('ReportPage', () => {
  it('sends the machine touched on the floor and what is wrong with it', async () => {
    const page = await open();
    document.querySelector<HTMLElement>('[data-bay="A-04"]')?.click();
    await page.rest();
    pressSymptom('wont_drain');
    await page.fill('In your words', 'Water stands in it');
    await page.press('Report the fault');
    const sent = await page.answer('/api/calls', call, 201);
    expect(sent).toEqual({
      storeId: 's1',
      machineId: 'm4',
      symptom: 'wont_drain',
      words: 'Water stands in it',
    });
    expect(page.address).toBe('/client/calls/k1');
  });

  it('takes the machine from the address, and lets it be none', async () => {
    const page = await open('/client/calls/new?store=s1&machine=m4');
    const none = MatButtonHarness.with({ text: 'It is no machine' });
    await (await page.loader.getHarness(none)).click();
    pressSymptom('leaks');
    await page.press('Report the fault');
    expect(await page.answer('/api/calls', call, 201)).toMatchObject({ machineId: null });
  });

  it('asks for what is wrong before anything is sent', async () => {
    const page = await open();
    await page.press('Report the fault');
    expect(page.text).toContain('Choose what comes nearest.');
    page.server.expectNone('/api/calls');
  });
});
