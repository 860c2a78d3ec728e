import { TestBed } from '@angular/core/testing';
import { Session } from '../../core/session/session';
import { aProblem, PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { Account } from './account';

const account = {
  id: 'p1',
  name: 'Imre Valdo',
  email: 'imre@example.com',
  emailVerified: true,
  oneTimeCodes: false,
  oneTimeCodesOffered: true,
  recoveryCodesLeft: 0,
  version: 3,
};
const device = {
  id: 'd1',
  startedAt: '2031-05-01T10:00:00Z',
  lastUsedAt: '2031-05-06T10:00:00Z',
  device: 'Chromium on Linux',
  current: true,
};

const recoveryCodes = ['k7mfw-2hqzx', 'p3tvn-9wbcd'];

describe('Account', () => {
  let page: PageUnderTest;

  beforeEach(async () => {
    localStorage.clear();
    page = await PageUnderTest.open(Account, 'account', '/account');
    TestBed.inject(Session).take(anAnswer());
    await page.answer('/api/account', account);
    await page.answer('/api/sessions', { items: [device] });
  });

  it('changes the name over the version that was read', async () => {
    await page.fill('Your name', 'Imre V');
    await page.press('Save the name');
    const call = page.server.expectOne('/api/account');
    expect(call.request.headers.get('If-Match')).toBe('"3"');
    call.flush({ name: 'Imre V', version: 4 });
    await page.rest();
    expect(TestBed.inject(Session).person()?.name).toBe('Imre V');
    page.server.expectOne('/api/account').flush({ ...account, name: 'Imre V', version: 4 });
  });

  it('says at the field that the present password is not right', async () => {
    await page.fill('Present password', 'wrong');
    await page.fill('New password', 'laundry soap 2');
    await page.press('Change the password');
    await page.answer('/api/account/password', aProblem('sign-in-refused', 401), 401);
    expect(page.text).toContain('This is not your present password.');
  });

  it('puts one-time codes in force with a first code', async () => {
    await page.press('Set up codes');
    const begun = { secret: 'JBSWY3DP', uri: 'otpauth://totp/x', qrSvg: '<svg></svg>' };
    await page.answer('/api/account/totp', begun, 201);
    const picture = document.querySelector<HTMLImageElement>('tw-one-time-codes img');
    expect(picture?.src).toBe('data:image/svg+xml,%3Csvg%3E%3C%2Fsvg%3E');
    await page.fill('First code', '000000');
    await page.press('Use codes from now on');
    await page.answer('/api/account/totp/confirm', aProblem('sign-in-refused', 401), 401);
    expect(page.text).toContain('This code does not fit.');
    await page.fill('First code', '287082');
    await page.press('Use codes from now on');
    const confirmed = await page.answer('/api/account/totp/confirm', { recoveryCodes });
    expect(confirmed).toEqual({ code: '287082' });
    await page.answer('/api/account', { ...account, oneTimeCodes: true, recoveryCodesLeft: 2 });
    expect(page.text).toContain('Signing in asks for a code from your authenticator.');
    for (const code of recoveryCodes) expect(page.text).toContain(code);
  });

  it('offers one-time codes to nobody who may not use them', async () => {
    await page.fill('Your name', 'Imre V');
    await page.press('Save the name');
    await page.answer('/api/account', { name: 'Imre V', version: 4 });
    await page.answer('/api/account', { ...account, oneTimeCodesOffered: false });
    expect(page.text).not.toContain('One-time codes');
  });

  it('shows where the person is signed in', () => {
    expect(page.text).toContain('Chromium on Linux, this device');
  });
});
