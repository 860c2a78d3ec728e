import { expect, type Locator, type Page } from '@playwright/test';
import { expectUsable } from './usable';
import { password } from './works';

type Name = string | RegExp;

/** Somebody in front of a browser of their own. */
export class Visitor {
  constructor(readonly page: Page) {}

  /** Waits until the page of this heading is all there, and looks whether everybody can use it. */
  async arrive(heading: Name): Promise<void> {
    await this.heading(heading);
    await expect(this.page).toHaveTitle(/\S.* · Tumblewright$/);
    await expect(this.page.getByRole('heading', { level: 1 })).toHaveCount(1);
    await expectUsable(this.page);
  }

  /** As `arrive`, for a page that the test has looked at before. */
  async heading(heading: Name): Promise<void> {
    await expect(this.page.getByRole('heading', { level: 1, name: heading })).toBeVisible();
    await expect(this.page.getByRole('status').filter({ hasText: /^\s*Loading\s*$/ })).toHaveCount(
      0,
    );
  }

  async goTo(path: string, heading: Name): Promise<void> {
    await this.page.goto(path);
    await this.arrive(heading);
  }

  async signIn(email: string, withPassword = password): Promise<void> {
    await this.page.goto('/sign-in');
    await this.fill('E-mail address', email);
    await this.fill('Password', withPassword);
    await this.press('Sign in');
    await expect(this.page).not.toHaveURL(/sign-in/);
  }

  /** Goes to a page by the navigation of the area, which a phone hides behind a button. */
  async open(item: string, heading: Name = item): Promise<void> {
    const menu = this.page.getByRole('button', { name: 'Menu', exact: true });
    if (await menu.isVisible()) await menu.click();
    await this.page.getByRole('navigation').getByRole('link', { name: item, exact: true }).click();
    await this.arrive(heading);
  }

  async press(name: Name, within: Page | Locator = this.page): Promise<void> {
    await within
      .getByRole('button', { name, exact: typeof name === 'string' })
      .first()
      .click();
  }

  /** Reads what an act will bring, and agrees. */
  async agree(heading: Name, action: Name): Promise<void> {
    const dialog = this.page.getByRole('dialog', { name: heading });
    await expect(dialog).toBeVisible();
    await expectUsable(this.page);
    await this.press(action, dialog);
    await expect(dialog).toBeHidden();
  }

  /** An empty list offers its one action a second time; either will do. */
  async follow(name: Name, within: Page | Locator = this.page): Promise<void> {
    await within
      .getByRole('link', { name, exact: typeof name === 'string' })
      .first()
      .click();
  }

  async fill(label: Name, value: string, within: Page | Locator = this.page): Promise<void> {
    await within.getByLabel(label, { exact: typeof label === 'string' }).fill(value);
  }

  async select(label: Name, option: string, within: Page | Locator = this.page): Promise<void> {
    await within
      .getByLabel(label, { exact: typeof label === 'string' })
      .selectOption({ label: option });
  }

  /** One of few, shown as chips; by keys, because the native button under a chip is unseen. */
  async choose(legend: Name, choice: Name, within: Page | Locator = this.page): Promise<void> {
    const radio = within
      .getByRole('group', { name: legend })
      .getByRole('radio', { name: choice, exact: typeof choice === 'string' });
    await radio.press('Space');
    await expect(radio).toBeChecked();
  }

  async tick(label: Name, within: Page | Locator = this.page): Promise<void> {
    const box = within.getByRole('checkbox', { name: label }).first();
    if (!(await box.isChecked())) await box.press('Space');
    await expect(box).toBeChecked();
  }

  /** Waits until the page says what has happened. */
  async told(words: Name): Promise<void> {
    await expect(this.page.getByRole('status').filter({ hasText: words }).first()).toBeVisible();
  }

  async sees(words: Name): Promise<void> {
    await expect(this.page.getByText(words).first()).toBeVisible();
  }

  /** A row of a list, by what stands in it. */
  row(words: Name): Locator {
    return this.page.getByRole('row').filter({ hasText: words });
  }
}
