import { TestBed } from '@angular/core/testing';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { AnsweringApi } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { SubscriptionPage } from './subscription-page';

const plan = {
  id: 'p1',
  code: 'workshop',
  name: 'Workshop',
  monthlyAmount: 12_900,
  currency: 'GBP',
  storeLimit: 80,
  machineLimit: 4_000,
  crewLimit: 12,
  trialDays: 30,
  graceDays: 14,
  offered: true,
  version: 1,
};
const subscription = {
  state: 'past_due',
  stateSince: '2031-05-01T00:00:00Z',
  pausedByPlatform: false,
  trialEndsAt: null,
  graceEndsAt: '2031-05-15T10:00:00Z',
  paidUntil: null,
  mayWrite: true,
  plan,
  usage: [
    {
      kind: 'stores',
      used: 70,
      limit: 80,
      level: 'near',
      words: '70 of 80: 10 more can be added.',
    },
  ],
  events: [],
  version: 1,
};

describe('SubscriptionPage', () => {
  async function opened(address: string) {
    const api = AnsweringApi.provide({
      'subscription.show': subscription,
      'subscription.plans': { items: [plan] },
      'consents.list': { items: [] },
      'subscription.check': { ...subscription, state: 'active' },
      'session.refresh': anAnswer({ permissions: ['subscription.change'] }),
      'consents.give': {
        id: 'k1',
        givenByName: 'Imre Valdo',
        until: '2031-05-06T14:00:00Z',
        createdAt: '2031-05-06T10:00:00Z',
        withdrawnAt: null,
        inForce: true,
      },
    });
    const page = await PageUnderTest.open(SubscriptionPage, 'subscription', address);
    TestBed.inject(Session).take(anAnswer({ permissions: ['subscription.change'] }));
    await page.rest();
    return { api, page };
  }

  it('says how it stands, what is used, and offers to pay for the plan that is past due', async () => {
    const { page } = await opened('/subscription');
    expect(page.text).toContain('Everything works until');
    expect(page.text).toContain('10 more can be added');
    expect(page.text).toMatch(/Pay for\s+Workshop/);
  });

  it('asks how it stands when the browser is back from the card page', async () => {
    const { api, page } = await opened('/subscription?paid=1');
    expect(api.sent('subscription.check')).toHaveLength(1);
    expect(TestBed.inject(Messages).message()?.text).toBe('Workshop is paid. Thank you.');
    expect(page.text).toContain('your plan');
    expect(page.address).toBe('/subscription');
  });

  it('says that nothing changed when the person turned back', async () => {
    const { api, page } = await opened('/subscription?cancelled=1');
    expect(api.sent('subscription.check')).toEqual([]);
    expect(TestBed.inject(Messages).message()?.text).toContain('Nothing was changed');
    expect(page.address).toBe('/subscription');
  });

  it('lets support in for the hours chosen', async () => {
    const { api, page } = await opened('/subscription');
    await page.press('Let support in');
    expect(api.sent('consents.give').map(({ body }) => body)).toEqual([{ hours: 4 }]);
    expect(TestBed.inject(Messages).message()?.text).toContain('Support can read this shop until');
  });
});
