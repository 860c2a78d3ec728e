import { type Express } from 'express';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createApp } from '../../server/src/app';
import { readConfig } from '../../server/src/core/config';
import { openServices } from '../../server/src/core/process';
import { createLog } from '../../server/src/core/logging';
import { testDatabase } from './postgres';

export const sessionSecret = 'a-secret-for-tests-only-0123456789abcdef';

export interface TestServer {
  app: Express;
  ownerUrl: string;
  config: ReturnType<typeof readConfig>;
  log: ReturnType<typeof createLog>;
  close(): Promise<void>;
}

/**
 * The whole web process in this one, on a database of its own. `environment` adds what a test
 * brings: the addresses of a mailbox or of the card payment fake.
 */
export async function startTestServer(
  environment: Record<string, string> = {},
): Promise<TestServer> {
  const urls = await testDatabase();
  const folder = mkdtempSync(join(tmpdir(), 'tumblewright-files-'));
  const config = readConfig({
    NODE_ENV: 'test',
    DATABASE_APP_URL: urls.appUrl,
    DATABASE_PLATFORM_URL: urls.platformUrl,
    DATABASE_POOL: '8',
    SESSION_SECRET: sessionSecret,
    STRIPE_SECRET_KEY: 'sk_test_local',
    // Nobody: a test that pays brings the fake, and none may reach the real service.
    STRIPE_API_BASE: 'http://127.0.0.1:9',
    STRIPE_WEBHOOK_SECRET: 'whsec_test_local',
    FILES_DIR: folder,
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'silent',
    RATE_LIMIT: '0',
    SIGN_IN_RATE_LIMIT: '0',
    ...environment,
  });
  const log = createLog(config.logLevel, 'test');
  const closeServices = await openServices(config, log, 'web');
  return {
    app: createApp(config, log),
    ownerUrl: urls.ownerUrl,
    config,
    log,
    close: async () => {
      await closeServices();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
