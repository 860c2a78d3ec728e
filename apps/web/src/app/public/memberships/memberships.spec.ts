import { TestBed } from '@angular/core/testing';
import { Session } from '../../core/session/session';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { Memberships } from './memberships';

describe('Memberships', () => {
  const open = () => PageUnderTest.open(Memberships, 'memberships', '/memberships');

  beforeEach(() => localStorage.clear());

  it('goes on as the one that is chosen', async () => {
    const page = await open();
    TestBed.inject(Session).take(anAnswer());
    await page.rest();
    const choices = [...document.querySelectorAll<HTMLElement>('.go')];
    choices.find((choice) => choice.textContent?.includes('Alder & Finch'))?.click();
    await page.rest();
    const other = anAnswer().memberships[1] ?? null;
    expect(await page.answer('/api/session/membership', anAnswer({ membership: other }))).toEqual({
      membershipId: 'm2',
    });
    expect(page.address).toBe('/');
  });

  it('tells a person without any what to do', async () => {
    const page = await open();
    TestBed.inject(Session).take(anAnswer({ memberships: [], membership: null }));
    await page.rest();
    expect(page.text).toContain('imre@example.com belongs to no shop or client');
  });
});
