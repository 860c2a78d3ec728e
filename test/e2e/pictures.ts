import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { chromium, type Browser, type Page } from '@playwright/test';
import sharp from 'sharp';
import { layOutOverview } from './overview';
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

const openStore = async (page: Page) => {
  await page.getByRole('link', { name: 'Foxglove Lane' }).click();
};

const openFirstRow = async (page: Page) => {
  await page.getByRole('row').nth(1).getByRole('link').first().click();
};

/** The visits of the day are the headings below the day's own. */
const openFirstVisit = async (page: Page) => {
  await page.getByRole('heading', { level: 2 }).getByRole('link').first().click();
};

const accounts = (role: string) =>
  run.accounts.filter((account) => account.role === role).map(({ email }) => email);
const [owner = ''] = accounts('shop_owner');
const [tech = ''] = accounts('tech');
// The second one has something to pay.
const client = accounts('client_owner')[1] ?? '';
const [attendant = ''] = accounts('attendant');
const [admin = ''] = accounts('platform_admin');

const pictures: Picture[] = [
  {
    name: 'shop-store',
    as: owner,
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/stores',
    then: openStore,
  },
  { name: 'shop-today', as: owner, screen: 'desktop', scheme: 'light', path: '/shop/today' },
  {
    name: 'shop-ruling',
    as: owner,
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/rulings',
    then: openFirstRow,
  },
  {
    name: 'shop-ticket',
    as: owner,
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/tickets',
    then: openFirstRow,
  },
  {
    name: 'shop-day-sheet',
    as: owner,
    screen: 'desktop',
    scheme: 'light',
    path: '/shop/day-sheet',
  },
  {
    name: 'shop-month-close',
    as: owner,
    screen: 'desktop',
    scheme: 'dark',
    path: '/shop/month-close',
  },
  { name: 'field-day', as: tech, screen: 'phone', scheme: 'light', path: '/field/day' },
  {
    name: 'field-visit',
    as: tech,
    screen: 'phone',
    scheme: 'dark',
    path: '/field/day',
    then: openFirstVisit,
  },
  {
    name: 'field-job',
    as: tech,
    screen: 'phone',
    scheme: 'light',
    path: '/field/day',
    then: async (page) => {
      await openFirstVisit(page);
      await page.getByRole('button', { name: 'I am here' }).click();
      await page
        .getByRole('button', { name: /^Work on / })
        .first()
        .click();
      await page.waitForURL(/\/jobs\//);
    },
  },
  { name: 'client-home', as: client, screen: 'phone', scheme: 'light', path: '/client/home' },
  {
    name: 'client-statement',
    as: client,
    screen: 'desktop',
    scheme: 'light',
    path: '/client/statements',
    then: async (page) => {
      await page.getByRole('row', { name: 'Quay 9' }).first().getByRole('link').click();
    },
  },
  {
    name: 'client-attendant',
    as: attendant,
    screen: 'phone',
    scheme: 'light',
    path: '/client/home',
  },
  {
    name: 'platform-shop',
    as: admin,
    screen: 'desktop',
    scheme: 'light',
    path: '/platform/shops',
    then: openFirstRow,
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
    // What it keeps for the next visit of a page is of no use to a picture.
    serviceWorkers: 'block',
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
      await page.mouse.move(0, 0);
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

/** Until the page has its heading, waits for nothing, and has stood still for a while. */
async function settled(page: Page): Promise<void> {
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page.waitForFunction(
    () =>
      !/^\s*Loading\b/m.test(document.body.innerText) &&
      !document.querySelector('.skeleton, [aria-busy="true"]') &&
      Array.from(document.images).every((image) => image.complete),
  );
  let before: string;
  let now = await page.content();
  do {
    before = now;
    await page.waitForTimeout(400);
    now = await page.content();
  } while (now !== before);
}

async function main(): Promise<void> {
  mkdirSync(folder, { recursive: true });
  const browser = await chromium.launch(config.use?.launchOptions);
  try {
    for (const picture of pictures) await take(browser, picture);
    await layOutOverview(folder);
    console.log('overview.png');
  } finally {
    await browser.close();
  }
}

main().catch((error: unknown) => {
  console.error(error);
  process.exit(1);
});
