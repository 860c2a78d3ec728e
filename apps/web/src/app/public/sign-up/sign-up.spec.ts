import { aProblem, PageUnderTest } from '../../testing/page';
import { SignUp } from './sign-up';

describe('SignUp', () => {
  async function filled(): Promise<PageUnderTest> {
    const page = await PageUnderTest.open(SignUp, 'sign-up', '/sign-up');
    await page.fill('Name of the shop', 'Thornbury Appliance Works');
    await page.fill('Your name', 'Imre Valdo');
    await page.fill('E-mail address', 'imre@example.com');
    await page.fill('Password', 'laundry soap');
    await page.press('Open the shop');
    return page;
  }

  it('sends what was typed with what was guessed, and says where the mail went', async () => {
    const page = await filled();
    expect(await page.answer('/api/sign-up', { message: 'sent' }, 202)).toEqual({
      shopName: 'Thornbury Appliance Works',
      name: 'Imre Valdo',
      email: 'imre@example.com',
      password: 'laundry soap',
      zone: Intl.DateTimeFormat().resolvedOptions().timeZone,
      currency: 'USD',
      locale: 'en-US',
    });
    expect(page.text).toContain('We have written to imre@example.com.');
  });

  it('shows a refusal at its field and keeps the rest', async () => {
    const page = await filled();
    const errors = [{ pointer: '/password', detail: 'is a very common password' }];
    await page.answer('/api/sign-up', aProblem('invalid-request', 422, { errors }), 422);
    expect(page.text).toContain('Is a very common password.');
    await page.press('Open the shop');
    page.server.expectNone('/api/sign-up');
    await page.fill('Password', 'laundry soap and water');
    await page.press('Open the shop');
    expect(await page.answer('/api/sign-up', { message: 'sent' }, 202)).toMatchObject({
      shopName: 'Thornbury Appliance Works',
      password: 'laundry soap and water',
    });
  });
});
