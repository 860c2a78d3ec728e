import { type Page } from '@playwright/test';
import { Keys } from './support/keys';
import { expect, test } from './support/test';
import { planVisit } from './support/visits';
import { password } from './support/works';

const store = 'Foxglove Lane';

async function signIn(page: Page, keys: Keys, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor();
  await keys.write(page.getByLabel('E-mail address'), email);
  await keys.write(page.getByLabel('Password', { exact: true }), password);
  await keys.press('Enter');
  await expect(page).not.toHaveURL(/sign-in/);
}

test('the first stop of a page leads past its navigation', async ({ page, works }) => {
  const keys = new Keys(page);
  await signIn(page, keys, works.owner);
  await page.goto('/shop/stores');
  await page.getByRole('heading', { level: 1, name: 'Stores' }).waitFor();
  await keys.press('Tab');
  const skip = page.getByRole('link', { name: 'Skip to the content' });
  await expect(skip).toBeFocused();
  await expect(skip).toBeInViewport();
  await keys.enter(skip);
  await expect(page.getByRole('main')).toBeFocused();
  await keys.press('Tab');
  await expect(page.getByRole('main').locator(':focus')).toHaveCount(1);
});

test('a tech signs in and does a job by keyboard alone', async ({ page, works }) => {
  const visitId = await planVisit(works, store, 'Look at the drain');
  const keys = new Keys(page);
  await signIn(page, keys, works.tech);

  await test.step('goes to the visit', async () => {
    const visit = page.getByRole('link', { name: store, exact: true });
    await keys.enter(visit.and(page.locator(`[href$="${visitId}"]`)));
    await expect(page.getByRole('heading', { level: 1, name: store })).toBeFocused();
    await keys.enter(page.getByRole('button', { name: 'I am here' }));
  });

  await test.step('walks the floor to a machine', async () => {
    const floor = page.getByRole('grid');
    await keys.to(floor.getByRole('gridcell', { name: /^A-01/ }));
    await keys.press('ArrowDown');
    await keys.press('ArrowRight');
    await expect(floor.getByRole('gridcell', { name: /^B-02/ })).toBeFocused();
    await keys.press('Enter');
    await keys.enter(page.getByRole('button', { name: 'Work on B-02' }));
    await expect(page.getByRole('heading', { level: 1, name: 'B-02' })).toBeFocused();
  });

  await test.step('ticks every caution', async () => {
    const cautions = page.getByRole('group', { name: 'Before covers come off' });
    const boxes = cautions.getByRole('checkbox');
    const count = await boxes.count();
    for (let at = 0; at < count; at++) {
      await keys.tick(boxes.nth(at));
      if (at < count - 1) await expect(boxes.nth(at)).toBeChecked();
    }
    await expect(page.getByText(/Before covers come off: all \d+ ticked/)).toBeVisible();
  });

  await test.step('writes down what was found and done', async () => {
    const group = (name: RegExp) => page.getByRole('group', { name });
    const pick = (name: RegExp, choice: string) =>
      keys.choose(group(name), group(name).getByRole('radio', { name: choice, exact: true }));
    await keys.write(page.getByLabel('What you found'), 'Hairpins in the pump');
    await pick(/^How it failed/, 'blocked');
    await keys.write(page.getByLabel('What failed'), 'drain');
    await keys.press('Escape');
    await pick(/^Cause$/, 'misuse');
    await keys.write(page.getByLabel('What you did'), 'Pump cleared, drain run twice');
    await keys.write(page.getByLabel('Full cycles', { exact: true }), '1');
    await keys.write(page.getByLabel('Work', { exact: true }), '25');
    await pick(/^Left as/, 'up');
    await keys.enter(page.getByRole('button', { name: 'Done with B-02' }));
    await expect(
      page.getByRole('status').getByText('B-02 is put right and left up.'),
    ).toBeVisible();
  });

  await test.step('and signs off the visit', async () => {
    await expect(page.getByRole('heading', { level: 1, name: store })).toBeFocused();
    await keys.enter(page.getByRole('link', { name: 'Sign off' }));
    await keys.write(page.getByLabel(/^Received by/), 'Noa Pell');
    await keys.press('Enter');
    await expect(page.getByText('Everything is sent')).toBeVisible();
  });
});
