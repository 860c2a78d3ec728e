import { aProblem, PageUnderTest } from '../../testing/page';
import { VerifyEmail } from './verify-email';

describe('VerifyEmail', () => {
  const open = () => PageUnderTest.open(VerifyEmail, 'verify-email', '/verify-email#token=abc');

  it('confirms with the mailed secret', async () => {
    const page = await open();
    expect(await page.answer('/api/verify-email', null, 204)).toEqual({ token: 'abc' });
    expect(page.text).toContain('You can sign in now.');
  });

  it('says what to do with a link that was used', async () => {
    const page = await open();
    await page.answer('/api/verify-email', aProblem('not-found', 404), 404);
    expect(page.text).toContain('This link no longer works');
  });

  it('tries again when there was no answer', async () => {
    const page = await open();
    await page.answer('/api/verify-email', aProblem('unavailable', 503), 503);
    await page.press('Try again');
    await page.answer('/api/verify-email', null, 204);
    expect(page.text).toContain('Your address is confirmed');
  });
});
