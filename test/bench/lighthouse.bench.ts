import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { chromium } from '@playwright/test';
import { type Bench } from '../../infra/bench/bench-contract';
import { quietRun } from '../../infra/bootstrap/quiet-run.cjs';
import { findChromium } from '../../infra/bootstrap/programs.cjs';
import { root } from '../../infra/paths';
import { anyPort } from '../../infra/process/ports';
import { type Stack } from '../../infra/stack/stack';

/** Of 100, as Lighthouse counts on its middling phone. */
const targets = { performance: 90, accessibility: 100 };

/** A timing: the middle one of several counts. */
const runs = 3;

interface Report {
  finalDisplayedUrl: string;
  categories: Record<'performance' | 'accessibility', { score: number }>;
  audits: Record<string, { numericValue: number; displayValue: string }>;
}

interface Browser {
  port: number;
  signIn(email: string, password: string): Promise<void>;
  /** Everything that was loaded, so that it is loaded anew; who is signed in stays so. */
  forgetFiles(): Promise<void>;
}

/** A browser of its own that Lighthouse can be let into, so that it finds somebody signed in. */
async function withBrowser<T>(web: string, work: (browser: Browser) => Promise<T>): Promise<T> {
  const profile = mkdtempSync(path.join(tmpdir(), 'tumblewright-lighthouse-'));
  const port = await anyPort();
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: findChromium(),
    baseURL: web,
    args: ['--no-sandbox', '--disable-gpu', `--remote-debugging-port=${port}`],
  });
  try {
    return await work({
      port,
      async signIn(email, password) {
        const page = await context.newPage();
        await page.goto('/sign-in');
        await page.getByLabel('E-mail address').fill(email);
        await page.getByLabel('Password', { exact: true }).fill(password);
        await page.getByRole('button', { name: 'Sign in' }).click();
        await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
        await page.close();
      },
      async forgetFiles() {
        const page = await context.newPage();
        const session = await context.newCDPSession(page);
        await session.send('Network.clearBrowserCache');
        await session.send('Storage.clearDataForOrigin', {
          origin: web,
          storageTypes: 'cache_storage,service_workers,shader_cache',
        });
        await page.close();
      },
    });
  } finally {
    await context.close();
    rmSync(profile, { recursive: true, force: true });
  }
}

async function look(url: string, browser: Browser): Promise<Report> {
  const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-lighthouse-'));
  const file = path.join(folder, 'report.json');
  try {
    await quietRun(process.execPath, [
      path.join(root, 'node_modules/lighthouse/cli/index.js'),
      url,
      `--port=${browser.port}`,
      '--only-categories=performance,accessibility',
      // Who signed in must stay so; what was loaded is forgotten by ourselves.
      '--disable-storage-reset',
      '--output=json',
      `--output-path=${file}`,
      '--quiet',
    ]);
    return JSON.parse(readFileSync(file, 'utf8')) as Report;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function row(name: string, reports: Report[]) {
  const scores = (of: 'performance' | 'accessibility') =>
    reports.map(({ categories }) => Math.round(categories[of].score * 100)).sort((a, b) => a - b);
  const middle = Math.floor(reports.length / 2);
  const seconds = (audit: string) => {
    const values = reports.map(({ audits }) => audits[audit]?.numericValue ?? NaN);
    return Number(((values.sort((a, b) => a - b)[middle] ?? NaN) / 1000).toFixed(2));
  };
  return {
    page: name,
    performance: scores('performance')[middle] ?? 0,
    // No timing: the worst of them counts.
    accessibility: scores('accessibility')[0] ?? 0,
    'first paint s': seconds('first-contentful-paint'),
    'largest paint s': seconds('largest-contentful-paint'),
    'blocked s': seconds('total-blocking-time'),
  };
}

function accountOf(stack: Stack, role: string) {
  const account = stack.runFile().accounts.find((one) => one.role === role);
  if (!account) throw new Error(`The demo has no ${role}.`);
  return account;
}

/** `npm run bench -- lighthouse`: sign-in and the client's home, as a middling phone loads them. */
export const bench: Bench = async ({ stack, say }) => {
  const client = accountOf(stack, 'client_owner');
  const pages = [
    { name: 'sign-in', path: '/sign-in', as: undefined },
    { name: 'portal', path: '/client/home', as: client },
  ];
  const rows = [];
  for (const { name, path: where, as } of pages) {
    say(`Looking at ${where}, ${runs} times`);
    const reports = await withBrowser(stack.webUrl, async (browser) => {
      if (as) await browser.signIn(as.email, as.password);
      const found: Report[] = [];
      for (let run = 0; run < runs; run++) {
        await browser.forgetFiles();
        const report = await look(stack.webUrl + where, browser);
        const { pathname } = new URL(report.finalDisplayedUrl);
        if (pathname !== where) throw new Error(`${where} led to ${pathname}.`);
        found.push(report);
      }
      return found;
    });
    rows.push(row(name, reports));
  }
  const met = rows.every(
    ({ performance, accessibility }) =>
      performance >= targets.performance && accessibility >= targets.accessibility,
  );
  return { rows, met, details: { targets, runs } };
};
