import { PageUnderTest } from '../../testing/page';
import { ForgotPassword } from './forgot-password';

it('asking for a link never tells whether an address is known', async () => {
  const page = await PageUnderTest.open(ForgotPassword, 'forgot-password', '/forgot-password');
  await page.fill('E-mail address', 'nobody@example.com');
  await page.press('Mail me a link');
  expect(await page.answer('/api/password-reset', { message: 'sent' }, 202)).toEqual({
    email: 'nobody@example.com',
  });
  expect(page.text).toContain('If nobody@example.com is known here');
});
