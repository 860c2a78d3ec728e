import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { chromium, type Browser, type Page } from '@playwright/test';
import sharp from 'sharp';
import config from './playwright.config';
import { run } from './support/run';
import { desktop, phone } from './support/screens';
import { password } from './support/works';

// The pictures of docs/pictures, made from a fresh demo: `npm run pictures`.
const folder = path.join(__dirname, '../../docs/pictures');

interface Picture {
  name: string;
  as: string;
  screen: 'phone' | 'desktop';
  scheme: 'light' | 'dark';
  path: string;
  /** Goes on from the page, to where the picture is taken. */
  then?: (page: Page) => Promise<void>;
}

const firstLink = (pattern: RegExp) => async (page: Page) => {
  await page.getByRole('link', { name: pattern }).first().click();
};

const [owner, tech, client, attendant] = (
  ['shop_owner', 'tech', 'client_owner', 'attendant'] as const
).map((role) => run.accounts.find((account) => account.role === role)?.email ?? '');
const admin = run.accounts.find((account) => account.role === 'platform_admin')?.email ?? '';

const pictures: Picture[] = [
  {
    name: 'overview',
    as: owner ?? '',
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/stores',
    then: firstLink(/Foxglove Lane/),
  },
  { name: 'shop-today', as: owner ?? '', screen: 'desktop', scheme: 'light', path: '/shop/today' },
  {
    name: 'shop-ruling',
    as: owner ?? '',
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/rulings',
    then: async (page) => page.getByRole('row').nth(1).getByRole('link').first().click(),
  },
  {
    name: 'shop-ticket',
    as: owner ?? '',
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/tickets',
    then: async (page) => page.getByRole('row').nth(1).getByRole('link').first().click(),
  },
  {
    name: 'shop-month-close',
    as: owner ?? '',
    screen: 'desktop',
    scheme: 'dark',
    path: '/shop/month-close',
  },
  { name: 'field-day', as: tech ?? '', screen: 'phone', scheme: 'light', path: '/field/day' },
  {
    name: 'field-visit',
    as: tech ?? '',
    screen: 'phone',
    scheme: 'dark',
    path: '/field/day',
    then: async (page) => page.getByRole('main').getByRole('link').first().click(),
  },
  { name: 'client-home', as: client ?? '', screen: 'phone', scheme: 'light', path: '/client/home' },
  {
    name: 'client-statement',
    as: client ?? '',
    screen: 'desktop',
    scheme: 'light',
    path: '/client/statements',
    then: async (page) => page.getByRole('row').nth(1).getByRole('link').first().click(),
  },
  {
    name: 'client-attendant',
    as: attendant ?? '',
    screen: 'phone',
    scheme: 'light',
    path: '/client/home',
  },
  {
    name: 'platform-shops',
    as: admin,
    screen: 'desktop',
    scheme: 'light',
    path: '/platform/shops',
  },
  { name: 'public-sign-in', as: '', screen: 'phone', scheme: 'light', path: '/sign-in' },
];

async function take(browser: Browser, picture: Picture): Promise<void> {
  const screen = picture.screen === 'phone' ? phone : desktop;
  const context = await browser.newContext({
    ...screen,
    baseURL: run.web,
    colorScheme: picture.scheme,
    locale: 'en-US',
    reducedMotion: 'reduce',
  });
  try {
    const page = await context.newPage();
    page.setDefaultTimeout(60_000);
    if (picture.as) await signIn(page, picture.as);
    await page.goto(picture.path);
    await settled(page);
    if (picture.then) {
      await picture.then(page);
      await page.waitForURL((url) => url.pathname !== picture.path);
      await settled(page);
    }
    const png = await page.screenshot();
    await sharp(png)
      .png({ palette: true, colours: 128, effort: 10 })
      .toFile(path.join(folder, `${picture.name}.png`));
    console.log(`${picture.name}.png`);
  } finally {
    await context.close();
  }
}

async function signIn(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.includes('sign-in'));
}

/** Until the page has its heading and nothing says that it is loading. */
async function settled(page: Page): Promise<void> {
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page
    .getByText(/^\s*Loading\s*$/)
    .first()
    .waitFor({ state: 'hidden' });
}

async function main(): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const browser = await chromium.launch(config.use?.launchOptions);
  try {
    for (const picture of pictures) await take(browser, picture);
  } finally {
    await browser.close();
  }
}

main().catch((error: unknown) => {
  console.error(error);
  process.exit(1);
});
