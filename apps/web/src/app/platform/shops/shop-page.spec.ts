import { PageUnderTest } from '../../testing/page';
import { Session } from '../../core/session/session';
import { anAnswer } from '../../testing/session';
import { TestBed } from '@angular/core/testing';
import { type Shop } from '../platform-api';
import { ShopPage } from './shop-page';

const plan: Shop['plan'] = {
  id: 'p1',
  code: 'workshop',
  name: 'Workshop',
  monthlyAmount: 12900,
  currency: 'USD',
  storeLimit: 80,
  machineLimit: 4000,
  crewLimit: 12,
  trialDays: 30,
  graceDays: 14,
  offered: true,
  version: 1,
};

function shop(facts: Partial<Shop>): Shop {
  return {
    id: 's1',
    name: 'Brackwater Appliance Works',
    zone: 'America/Chicago',
    currency: 'USD',
    planId: 'p1',
    planName: 'Workshop',
    state: 'active',
    stateSince: '2031-05-01T10:00:00Z',
    stores: 8,
    machines: 180,
    crew: 7,
    createdAt: '2031-01-01T10:00:00Z',
    pausedByPlatform: false,
    trialEndsAt: null,
    graceEndsAt: null,
    paidUntil: null,
    mayWrite: true,
    plan,
    usage: [],
    events: [],
    owners: [],
    consentUntil: null,
    version: 1,
    ...facts,
  };
}

async function open() {
  const page = await PageUnderTest.open(ShopPage, 'platform/shops/:shopId', '/platform/shops/s1');
  TestBed.inject(Session).take(anAnswer({ permissions: ['platform.read', 'platform.change'] }));
  await page.answer('/api/platform/shops/s1', shop({}));
  return page;
}

describe('ShopPage', () => {
  it('says what pausing means before it is done, and shows how the shop stands then', async () => {
    const page = await open();
    await page.press('Pause');
    expect(page.text).toContain('can read and export everything and change nothing');
    await page.fill('Why', 'Asked for by the owner');
    await page.press('Pause the shop');
    const sent = await page.answer('/api/platform/shops/s1/pause', shop({ state: 'paused' }));
    expect(sent).toEqual({ note: 'Asked for by the owner' });
    expect(page.text).toContain('Paused');
    expect(page.text).toContain('Resume');
  });

  it('changes nothing when the thought is given up', async () => {
    const page = await open();
    await page.press('End the subscription');
    await page.press('Leave it as it is');
    expect(page.text).not.toContain('It is billed no more');
    page.server.verify();
  });
});
