import { mkdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { type Progress } from '../bootstrap/progress.cjs';
import { type Mailbox, startMailbox } from '../fakes/mailbox/mailbox';
import { startStripeFake, type StripeFake } from '../fakes/stripe/stripe-fake';
import { root } from '../paths';
import { type Cluster, startCluster } from '../postgres/cluster';
import { type DatabaseUrls } from '../postgres/databases';
import { portFrom } from '../process/ports';
import { Service } from '../process/service';
import { readState, writeState } from '../process/state-file';
import { recreatePrivateDatabase, startPrivateDatabase, useGivenDatabase } from './database';
import { fillDemo, migrate, seed } from './fill';
import { readAccounts, runFilePath, type RunFile } from './run-file';
import { localSecrets } from './secrets';

export interface StackOptions {
  dataDir: string;
  progress: Progress;
  /** Fill an empty database with the demo. */
  demo: boolean;
  /** Then grow it by copies of its first shop, until there are so many. */
  shops?: number;
  /** False for tests: the database need not survive a loss of power. */
  durable: boolean;
  /** The first port to try for the web application; the others follow it. */
  port: number;
  /** More for the environment of web and worker. */
  env?: Record<string, string>;
  /** Commands instead of the built ones: `npm run dev` has others. */
  commands?: Partial<Record<'web' | 'worker', readonly [string, ...string[]]>>;
  webDir?: string;
  /** Where people reach the web application when something stands before it. */
  front?: string;
  /** Told when something died and was started again, or could not be. */
  notice?: (words: string) => void;
}

type PortName = 'web' | 'worker' | 'mailbox' | 'smtp' | 'stripe';
const portNames: readonly PortName[] = ['web', 'mailbox', 'stripe', 'smtp', 'worker'];

/** Where we reach what listens on HOST: on this machine, unless it listens on one address only. */
function reachedAt(host: string | undefined): string {
  return !host || host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host;
}

/** The whole application on this machine: database, fakes, web process and worker. */
export class Stack {
  cluster: Cluster | undefined;
  mailbox: Mailbox | undefined;
  stripe: StripeFake | undefined;
  urls!: DatabaseUrls;
  webUrl = '';
  workerUrl = '';
  web!: Service;
  worker!: Service;
  private stopping = false;
  private databaseStart: Promise<void> | undefined;
  private readonly aborter = new AbortController();

  constructor(readonly options: StackOptions) {}

  private get dataDir(): string {
    return this.options.dataDir;
  }

  async start(): Promise<void> {
    await this.startWithoutServices();
    await this.options.progress.step('Starting the web process and the worker', () =>
      Promise.all([this.web.start(), this.worker.start()]),
    );
    this.stripe?.setWebhookMode('normal');
    this.writeRunFile();
  }

  /** Database and fakes, migrated and filled; the environment in which server programs then run. */
  async startWithoutServices(): Promise<Record<string, string>> {
    const { progress } = this.options;
    mkdirSync(this.dataDir, { recursive: true });
    const ports = await this.choosePorts();
    await progress.step('Starting the database', () => this.startDatabase());
    await this.startFakes(ports);
    this.goOnOrLeave();
    const env = this.environment(ports);
    this.describeServices(ports, env);
    await progress.step('Bringing the database to the current schema', () =>
      migrate(env, this.aborter.signal),
    );
    if (this.options.demo) {
      await fillDemo({
        dataDir: this.dataDir,
        urls: this.urls,
        env,
        progress,
        signal: this.aborter.signal,
        recreate: this.cluster && (() => this.recreateDatabase()),
      });
    }
    await this.growDemo(env);
    return env;
  }

  private async growDemo(env: Record<string, string>): Promise<void> {
    const { shops, progress } = this.options;
    if (!shops) return;
    await progress.step(`Growing the demo to ${shops} shops`, () =>
      seed(this.dataDir, env, ['--shops', String(shops)], this.aborter.signal),
    );
  }

  private goOnOrLeave(): void {
    if (this.stopping) throw new Error('Stopped while starting.');
  }

  /** Ends everything in order; may be called at any moment, also while starting. */
  async stop(): Promise<void> {
    this.stopping = true;
    this.aborter.abort();
    await this.databaseStart?.catch(() => undefined);
    await Promise.all([this.web?.stop(), this.worker?.stop()]);
    await Promise.all([this.mailbox?.close(), this.stripe?.close()]);
    await this.cluster?.stop();
    rmSync(runFilePath(this.dataDir), { force: true });
  }

  /** Without any waiting, for a second Ctrl-C. */
  forceStop(): void {
    this.stopping = true;
    for (const service of [this.web, this.worker]) service?.kill('SIGKILL');
    if (this.cluster) process.kill(this.cluster.pid, 'SIGQUIT');
  }

  runFile(): RunFile {
    return {
      web: this.options.front ?? this.webUrl,
      mailbox: this.mailbox?.url ?? null,
      stripe: this.stripe?.url ?? null,
      worker: this.workerUrl,
      apiDocument: `${this.webUrl}/api/openapi.json`,
      database: this.urls.readerUrl,
      pids: {
        start: process.pid,
        web: this.web.pid,
        worker: this.worker.pid,
        postgres: this.cluster?.pid ?? null,
      },
      accounts: readAccounts(this.dataDir),
    };
  }

  private writeRunFile(): void {
    writeState(runFilePath(this.dataDir), this.runFile());
  }

  private notice(words: string): void {
    this.options.notice?.(words);
    if (!this.stopping && this.web && this.worker) this.writeRunFile();
  }

  /** The ports of last time when they are free, so that bookmarks keep working. */
  private async choosePorts(): Promise<Record<PortName, number>> {
    const file = path.join(this.dataDir, 'ports.json');
    const before = readState<Partial<Record<PortName, number>>>(file) ?? {};
    const chosen: Partial<Record<PortName, number>> = {};
    for (const [at, name] of portNames.entries()) {
      const asked = this.options.port + at * 10;
      const kept = name === 'web' && process.env.PORT ? undefined : before[name];
      chosen[name] = await portFrom(kept ?? asked, Object.values(chosen));
    }
    writeState(file, chosen);
    return chosen as Record<PortName, number>;
  }

  private async startDatabase(): Promise<void> {
    const given = process.env.DATABASE_URL;
    if (given) {
      this.urls = await useGivenDatabase(given, this.dataDir);
      return;
    }
    const folder = path.join(this.dataDir, 'postgres');
    this.databaseStart = startPrivateDatabase(folder, this.options.durable).then((started) => {
      this.urls = started.urls;
      this.watchDatabase(started.cluster, folder);
    });
    await this.databaseStart;
    this.goOnOrLeave();
  }

  private async recreateDatabase(): Promise<void> {
    if (this.cluster) await recreatePrivateDatabase(this.cluster);
  }

  /** A server that was killed recovers from its log when started again, on the same port. */
  private watchDatabase(cluster: Cluster, folder: string): void {
    this.cluster = cluster;
    void cluster.exited.then(async () => {
      if (this.stopping) return;
      try {
        const again = await startCluster({ folder, durable: this.options.durable });
        this.watchDatabase(again, folder);
        this.notice('PostgreSQL ended unexpectedly and was started again.');
      } catch (error) {
        this.notice(`PostgreSQL ended and does not start again: ${(error as Error).message}`);
      }
    });
  }

  private async startFakes(ports: Record<PortName, number>): Promise<void> {
    if (!process.env.SMTP_URL) {
      this.mailbox = await startMailbox({
        folder: path.join(this.dataDir, 'mailbox'),
        smtpPort: ports.smtp,
        webPort: ports.mailbox,
      });
    }
    if (!process.env.STRIPE_SECRET_KEY) {
      this.stripe = await startStripeFake({
        port: ports.stripe,
        dataFile: path.join(this.dataDir, 'stripe.jsonl'),
        webhookUrl: `http://${reachedAt(process.env.HOST)}:${ports.web}/api/stripe/webhook`,
        webhookSecret: localSecrets(this.dataDir).stripeWebhookSecret,
      });
      // Nobody listens yet: what the demo pays is told once the web process is there.
      this.stripe.setWebhookMode('hold');
    }
  }

  private environment(ports: Record<PortName, number>): Record<string, string> {
    const secrets = localSecrets(this.dataDir);
    const passedOn = ['HOST', 'LOG_LEVEL', 'MAIL_FROM', 'TRUST_PROXY', 'TZ', 'HOME'];
    const fromOutside = passedOn
      .map((name): [string, string | undefined] => [name, process.env[name]])
      .filter((pair): pair is [string, string] => pair[1] !== undefined);
    return {
      NODE_ENV: 'production',
      ...Object.fromEntries(fromOutside),
      PORT: String(ports.web),
      WORKER_PORT: String(ports.worker),
      PUBLIC_URL: process.env.PUBLIC_URL ?? `http://${reachedAt(process.env.HOST)}:${ports.web}`,
      DATABASE_OWNER_URL: this.urls.ownerUrl,
      DATABASE_APP_URL: this.urls.appUrl,
      DATABASE_PLATFORM_URL: this.urls.platformUrl,
      SMTP_URL: process.env.SMTP_URL ?? this.mailbox?.smtpUrl ?? '',
      SESSION_SECRET: process.env.SESSION_SECRET ?? secrets.sessionSecret,
      FILES_DIR: process.env.FILES_DIR ?? path.join(this.dataDir, 'files'),
      WEB_DIR: this.options.webDir ?? path.join(root, 'dist/web'),
      ...(this.stripe
        ? {
            STRIPE_SECRET_KEY: secrets.stripeKey,
            STRIPE_WEBHOOK_SECRET: secrets.stripeWebhookSecret,
            STRIPE_API_BASE: this.stripe.url,
          }
        : {
            STRIPE_SECRET_KEY: process.env.STRIPE_SECRET_KEY ?? '',
            STRIPE_WEBHOOK_SECRET: process.env.STRIPE_WEBHOOK_SECRET ?? '',
            // A stand-in of one's own; Stripe itself when not given.
            ...(process.env.STRIPE_API_BASE
              ? { STRIPE_API_BASE: process.env.STRIPE_API_BASE }
              : {}),
          }),
      ...this.options.env,
    };
  }

  private describeServices(ports: Record<PortName, number>, all: Record<string, string>): void {
    // The owner's address is for migrating; what serves requests must not have it.
    const { DATABASE_OWNER_URL: _, ...env } = all;
    const host = reachedAt(env.HOST);
    this.webUrl = `http://${host}:${ports.web}`;
    this.workerUrl = `http://${host}:${ports.worker}`;
    const service = (name: 'web' | 'worker', file: string, url: string): Service =>
      new Service({
        name,
        command: this.options.commands?.[name] ?? [path.join(root, 'dist/server', file)],
        env,
        cwd: root,
        logFolder: path.join(this.dataDir, 'logs'),
        readyUrl: `${url}/readyz`,
        onRevived: (how) => this.notice(`The ${name} process ended (${how}) and was restarted.`),
        onGivenUp: (error) => this.notice(error.message),
      });
    this.web = service('web', 'main.cjs', this.webUrl);
    this.worker = service('worker', 'worker.cjs', this.workerUrl);
  }
}
