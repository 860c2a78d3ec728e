import { run } from './support/run';
import { expect, test } from './support/test';
import { overflowing } from './support/usable';
import { type Visitor } from './support/visitor';

/** A narrow phone, and a desktop of 1280 x 800 at 300 % zoom. */
const screens = [
  { width: 320, height: 640 },
  { width: 426, height: 266 },
];

/** The shop with the long words: what fits there fits everywhere. */
const longWords = 'Hausgerätewerkstatt Lindental';

function accountOf(role: string): string {
  const account = run.accounts.find(
    (one) => one.role === role && (one.shop === null || one.shop === longWords),
  );
  if (!account) throw new Error(`The demo has no ${role}.`);
  return account.email;
}

async function expectToFit({ page }: Visitor): Promise<void> {
  for (const screen of screens) {
    await page.setViewportSize(screen);
    expect
      .soft(await overflowing(page), `${new URL(page.url()).pathname} at ${screen.width} px`)
      .toEqual([]);
  }
}

for (const role of ['shop_owner', 'tech', 'client_owner', 'platform_admin']) {
  test(`nothing of what a ${role} sees is wider than a small screen`, async ({ visitor }) => {
    const person = await visitor(accountOf(role));
    const { page } = person;
    await person.heading(/./);
    await page.setViewportSize({ width: 1280, height: 800 });
    const items = page.getByRole('navigation').first().getByRole('link');
    const paths = await items.evaluateAll((links) =>
      links.map((link) => link.getAttribute('href')),
    );
    expect(paths.length).toBeGreaterThan(1);
    for (const path of paths) {
      await page.goto(path ?? '');
      await person.heading(/./);
      await expectToFit(person);
      // And what the first entry of its list leads to.
      const first = page.getByRole('main').getByRole('table').getByRole('link').first();
      if (!(await first.isVisible())) continue;
      await first.click();
      await expect(page).not.toHaveURL(new RegExp(`${path}$`));
      await person.heading(/./);
      await expectToFit(person);
    }
  });
}

test('long forms fit a small screen', async ({ visitor }) => {
  const owner = await visitor(accountOf('shop_owner'));
  for (const path of [
    '/shop/price-book/new',
    '/shop/clients/new',
    '/shop/stores/new',
    '/shop/calls/new',
    '/shop/visits/new',
    '/shop/imports',
    '/shop/month-close',
    '/account',
  ]) {
    await owner.page.goto(path);
    await owner.heading(/./);
    await expectToFit(owner);
  }
});
