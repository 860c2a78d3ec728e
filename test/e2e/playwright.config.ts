import path from 'node:path';
import { defineConfig } from '@playwright/test';
import { run } from './support/run';
import { phone, desktop } from './support/screens';

const stories = { testMatch: 'story-*.spec.ts' };

// The application is started by `npm run test:e2e`, which says where in a file. To run a test
// against an `npm start` of your own:
//     E2E_RUN_FILE=.data/run.json npx playwright test --config test/e2e/playwright.config.ts
export default defineConfig({
  testDir: __dirname,
  outputDir: path.join(__dirname, '../../test-results'),
  fullyParallel: true,
  forbidOnly: true,
  workers: 2,
  retries: 0,
  timeout: 180_000,
  expect: { timeout: 15_000 },
  reporter: 'list',
  use: {
    baseURL: run.web,
    locale: 'en-US',
    timezoneId: 'America/Chicago',
    actionTimeout: 20_000,
    serviceWorkers: 'block',
    screenshot: 'only-on-failure',
    // A picture and the structure of each page; for every step of it, add `--trace on`.
    trace: 'off',
    contextOptions: { reducedMotion: 'reduce' },
    launchOptions: {
      executablePath: process.env.CHROME_PATH || '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  projects: [
    { name: 'phone-light', ...stories, use: { ...phone, colorScheme: 'light' } },
    { name: 'phone-dark', ...stories, use: { ...phone, colorScheme: 'dark' } },
    { name: 'desktop-light', ...stories, use: { ...desktop, colorScheme: 'light' } },
    { name: 'desktop-dark', ...stories, use: { ...desktop, colorScheme: 'dark' } },
    // What sets its own screen, or does not depend on one.
    { name: 'once', testIgnore: stories.testMatch, use: { ...desktop, colorScheme: 'light' } },
  ],
});
