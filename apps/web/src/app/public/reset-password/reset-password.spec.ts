import { aProblem, PageUnderTest } from '../../testing/page';
import { ResetPassword } from './reset-password';

describe('ResetPassword', () => {
  const url = '/api/password-reset/complete';
  const open = (secret: string) =>
    PageUnderTest.open(ResetPassword, 'reset-password', `/reset-password${secret}`);

  it('changes the password and leads to sign-in', async () => {
    const page = await open('?token=abc');
    await page.fill('New password', 'laundry soap');
    await page.press('Use this password');
    expect(await page.answer(url, null, 204)).toEqual({ token: 'abc', password: 'laundry soap' });
    expect(page.address).toBe('/sign-in');
  });

  it.each([
    ['was used', aProblem('not-found', 404), 404],
    [
      'was cut short',
      aProblem('invalid-request', 422, { errors: [{ pointer: '/token', detail: 'is short' }] }),
      422,
    ],
  ])('says so when the link %s', async (_, problem, status) => {
    const page = await open('#token=abc');
    await page.fill('New password', 'laundry soap');
    await page.press('Use this password');
    await page.answer(url, problem, status);
    expect(page.text).toContain('This link no longer works');
  });

  it('asks for nothing without a secret', async () => {
    expect((await open('')).text).toContain('This link no longer works');
  });
});
