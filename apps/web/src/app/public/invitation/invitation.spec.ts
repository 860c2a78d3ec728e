import { TestBed } from '@angular/core/testing';
import { Session } from '../../core/session/session';
import { aProblem, PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { Invitation } from './invitation';

const found = {
  shopName: 'Thornbury Appliance Works',
  role: 'client_owner',
  clientName: 'Alder & Finch Laundries',
  email: 'imre@example.com',
  name: 'Imre',
  known: false,
};

describe('Invitation', () => {
  const open = () => PageUnderTest.open(Invitation, 'invitations/:token', '/invitations/abc');

  beforeEach(() => localStorage.clear());

  it('says who invites as what, and takes a name and a password', async () => {
    const page = await open();
    await page.answer('/api/invitations/abc', found);
    expect(page.text).toContain('Join Alder & Finch Laundries');
    expect(page.text).toContain('as client owner');
    await page.fill('Password', 'laundry soap');
    await page.press('Accept');
    expect(await page.answer('/api/invitations/abc/accept', anAnswer())).toEqual({
      name: 'Imre',
      password: 'laundry soap',
    });
    expect(TestBed.inject(Session).signedIn()).toBe(true);
    expect(page.address).toBe('/');
  });

  it('demands a password of a person who is new', async () => {
    const page = await open();
    await page.answer('/api/invitations/abc', found);
    await page.press('Accept');
    page.server.expectNone('/api/invitations/abc/accept');
    expect(page.text).toContain('Fill this in.');
  });

  it('lets a known person accept only when signed in', async () => {
    const page = await open();
    await page.answer('/api/invitations/abc', { ...found, known: true });
    expect(page.text).toContain('sign in as imre@example.com to accept');
    TestBed.inject(Session).take(anAnswer());
    await page.rest();
    await page.press('Accept');
    expect(await page.answer('/api/invitations/abc/accept', anAnswer())).toEqual({});
  });

  it('says when it no longer works', async () => {
    const page = await open();
    await page.answer('/api/invitations/abc', aProblem('not-found', 404), 404);
    expect(page.text).toContain('This invitation no longer works');
  });
});
