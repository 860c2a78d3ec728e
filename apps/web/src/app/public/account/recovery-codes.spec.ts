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
  oneTimeCodes: true,
  oneTimeCodesOffered: true,
  recoveryCodesLeft: 3,
  version: 3,
};
const fresh = ['k7mfw-2hqzx', 'p3tvn-9wbcd'];

describe('RecoveryCodes', () => {
  let page: PageUnderTest;
  let clipboard: { writeText: jest.Mock };

  beforeEach(async () => {
    localStorage.clear();
    clipboard = { writeText: jest.fn(() => Promise.resolve()) };
    Object.defineProperty(navigator, 'clipboard', { value: clipboard, configurable: true });
    page = await PageUnderTest.open(Account, 'account', '/account');
    TestBed.inject(Session).take(anAnswer());
    await page.answer('/api/account', account);
    await page.answer('/api/sessions', { items: [] });
  });

  async function renew(): Promise<unknown> {
    await page.press('Make new recovery codes');
    await page.fill('Your password', 'laundry soap');
    await page.press('Make ten new codes');
    const sent = await page.answer('/api/account/recovery-codes', { recoveryCodes: fresh });
    await page.answer('/api/account', { ...account, recoveryCodesLeft: 10 });
    return sent;
  }
  const printed = () =>
    [...document.querySelectorAll('.tw-sheet:not(.tw-unprinted)')].map((sheet) =>
      sheet.tagName.toLowerCase(),
    );

  it('says how many are left', () => {
    expect(page.text).toContain('3 codes left.');
  });

  it('makes new ones for the password, shows them until they are kept, and never again', async () => {
    expect(await renew()).toEqual({ password: 'laundry soap' });
    for (const code of fresh) expect(page.text).toContain(code);
    expect(document.activeElement?.textContent).toBe('Keep your recovery codes now');
    await page.press('I have kept them');
    for (const code of fresh) expect(page.text).not.toContain(code);
    expect(page.text).toContain('10 codes left.');
  });

  it('says at the field that the password is not right, and shows no codes', async () => {
    await page.press('Make new recovery codes');
    await page.fill('Your password', 'wrong');
    await page.press('Make ten new codes');
    await page.answer('/api/account/recovery-codes', aProblem('sign-in-refused', 401), 401);
    expect(page.text).toContain('This is not your password.');
    expect(page.text).toContain('3 codes left.');
  });

  it('copies them one a line, and says when the browser does not let it', async () => {
    await renew();
    await page.press('Copy');
    expect(clipboard.writeText).toHaveBeenCalledWith('k7mfw-2hqzx\np3tvn-9wbcd');
    expect(page.text).toContain('2 codes are copied.');
    clipboard.writeText.mockRejectedValueOnce(new Error('not allowed'));
    await page.press('Copy');
    expect(page.text).toContain('The browser does not let us copy.');
  });

  it('prints the codes and not the rest of the account', async () => {
    expect(printed()).toHaveLength(4);
    await renew();
    expect(printed()).toEqual(['tw-one-time-codes']);
  });

  it('takes a recovery code to stop one-time codes', async () => {
    await page.press('Stop using codes');
    await page.fill('A code, to prove that it is you', 'k7mfw-2hqzx');
    await page.press('Stop using codes');
    expect(await page.answer('/api/account/totp/remove', null, 204)).toEqual({
      code: 'k7mfw-2hqzx',
    });
    await page.answer('/api/account', { ...account, oneTimeCodes: false, recoveryCodesLeft: 0 });
    expect(page.text).toContain('Set up codes');
  });
});
