import { TestBed } from '@angular/core/testing';
import { type Bearer, type Permission } from '@lib/contracts/web';
import { otherOutcomes } from '@lib/domain/warranty/outcomes';
import { Problem } from '../../core/api/problem';
import { Session } from '../../core/session/session';
import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { RulingPage } from './ruling-page';

function line(lineKey: string, list: number, cost: number, waiting: boolean) {
  return {
    lineKey,
    description: lineKey,
    list,
    cost,
    basis: `basis of ${lineKey}`,
    bearer: 'shop' as Bearer,
    waiting,
    decision: null,
    outcomes: otherOutcomes({ list, cost }),
    proposed: {
      bearer: 'shop' as Bearer,
      needsConfirmation: true,
      reasons: [
        { code: 'marked_own_mistake', words: 'Imre marked it as our own mistake.', decides: true },
        { code: 'caused_by_job', words: 'It followed from job 0398/2.', decides: false },
      ],
    },
  };
}

function rulings(waiting: number, lines: object[]) {
  return {
    visit: {
      id: 'v1',
      number: 412,
      on: '2031-05-06',
      store: { id: 's1', name: 'Foxglove Lane' },
      client: { id: 'c1', name: 'Alder & Finch' },
      tech: 'Imre',
      ticketId: null,
    },
    currency: 'GBP',
    edition: { id: 'e1', number: 2 },
    waiting,
    jobs: [
      {
        jobId: 'j1',
        position: 1,
        machine: { id: 'm1', bay: 'A-04', kind: 'top_loader' },
        symptom: null,
        finding: 'Lock burnt out',
        category: 'door',
        cause: 'shop_error',
        action: 'Lock fitted',
        lines,
      },
    ],
    totals: {
      list: 17_100,
      charged: 0,
      shop: 17_100,
      supplier: 0,
      contract: 0,
      goodwill: 0,
      ourCost: 8_810,
    },
  };
}

const asked = rulings(2, [
  line('Labour', 11_000, 4_600, true),
  line('Door lock', 6_100, 4_210, true),
]);
const settled = rulings(0, [
  line('Labour', 11_000, 4_600, false),
  line('Door lock', 6_100, 4_210, false),
]);
const next = {
  visitId: 'v2',
  visitNumber: 415,
  on: '2031-05-07',
  store: { id: 's2', name: 'Quay 9' },
  client: { id: 'c2', name: 'Quayside' },
  tech: 'Salma',
  jobs: 1,
  lines: 1,
  list: 100,
  cost: 40,
};

async function opened(permissions: Permission[], answers: object = {}) {
  const api = AnsweringApi.provide({
    'rulings.show': asked,
    'rulings.waiting': onePage([next]),
    'rulings.confirm': settled,
    'rulings.overrule': settled,
    ...answers,
  });
  const page = await PageUnderTest.open(RulingPage, 'rulings/:visitId', '/rulings/v1');
  TestBed.inject(Session).take(anAnswer({ permissions }));
  await page.rest();
  return { api, page };
}

describe('a ruling', () => {
  it('shows the reasons in their order beside the figures of all its lines', async () => {
    const { page } = await opened(['rulings.read', 'rulings.decide']);
    expect(page.text).toMatch(/Imre marked it.*It followed from job 0398\/2/s);
    expect(page.text).toContain('171.00');
    expect(page.text).toContain('88.10');
    expect(page.text).toContain('1 of 1 to decide');
  });

  it('confirms every waiting line with what it rests on, and leads on', async () => {
    const { api, page } = await opened(['rulings.read', 'rulings.decide', 'tickets.sign_off']);
    await page.press('Shop bears it');
    expect(api.sent('rulings.confirm')[0]?.body).toEqual({
      lines: [
        { lineKey: 'Labour', basis: 'basis of Labour' },
        { lineKey: 'Door lock', basis: 'basis of Door lock' },
      ],
    });
    expect(page.text).toContain('Sign off the ticket');
    expect(page.text).toContain('Next: visit 415, Quay 9, 1 line');
    expect(page.text).not.toContain('Shop bears it');
  });

  it('decides otherwise only with a reason', async () => {
    const { api, page } = await opened(['rulings.read', 'rulings.decide']);
    await page.press('Decide otherwise, with a reason');
    await page.press('Decide so');
    expect(api.sent('rulings.overrule')).toEqual([]);
    expect(page.text).toContain('Choose who bears it.');
  });

  it('is looked at again when the work was changed meanwhile', async () => {
    const changed = new Problem('conflict', 409, 'Conflict', 'The work was changed: look again.');
    const { api, page } = await opened(['rulings.read', 'rulings.decide'], {
      'rulings.confirm': changed,
    });
    await page.press('Shop bears it');
    expect(api.sent('rulings.show')).toHaveLength(2);
    expect(page.text).toContain('Shop bears it');
  });

  it('is not for the office to decide', async () => {
    const { page } = await opened(['rulings.read']);
    expect(page.text).toContain('The owner of the shop decides this.');
    expect(page.text).not.toContain('Decide otherwise');
  });
});
