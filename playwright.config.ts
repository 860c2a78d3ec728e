import { defineConfig } from '@playwright/test';
import { existsSync, readFileSync } from 'node:fs';

// The application is started by `npm run test:e2e`, which says where in this file. To run a test
// against an `npm start` of your own: E2E_RUN_FILE=.data/run.json npx playwright test
const runFile = process.env.E2E_RUN_FILE ?? '.data/run.json';
const run = existsSync(runFile)
  ? (JSON.parse(readFileSync(runFile, 'utf8')) as { web: string })
  : undefined;

export default defineConfig({
  testDir: 'test/e2e',
  testMatch: '**/*.spec.ts',
  outputDir: 'test-results',
  fullyParallel: false,
  forbidOnly: true,
  workers: 2,
  retries: 0,
  timeout: 90_000,
  expect: { timeout: 10_000 },
  reporter: 'list',
  use: {
    baseURL: run?.web,
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
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
    {
      name: 'desktop',
      use: { viewport: { width: 1280, height: 860 }, colorScheme: 'light' },
    },
    {
      name: 'phone',
      use: {
        viewport: { width: 390, height: 844 },
        colorScheme: 'dark',
        hasTouch: true,
        isMobile: true,
      },
    },
  ],
});
