import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createServer } from 'node:http';
import { type AddressInfo } from 'node:net';
import { join } from 'node:path';
import { type Bench, type BenchContext } from '../../infra/bench/bench-contract';
import { seed } from '../../infra/stack/fill';
import { localSecrets } from '../../infra/stack/secrets';
import { createApp } from '../../server/src/app';
import { signAccessToken } from '../../server/src/core/auth/access-token';
import { readConfig } from '../../server/src/core/config';
import { closeDatabase, openDatabase } from '../../server/src/core/database/database';
import { platformRows } from '../../server/src/core/database/tenancy';
import { createLog } from '../../server/src/core/logging';
import { openServices } from '../../server/src/core/process';
import { load, type Shot } from './support/load';
import { recordSql, type Statement } from './support/record-sql';
import { signIn } from './support/signed-in';
import { type Asked, tenOperations } from './support/ten-operations';

// The limits: product throughput at least 0.5 of bare; p95 at 200 shops at most
// 1.3 of that at 10.
const leastOfBare = 0.5;
const mostOfTenShops = 1.3;
const connections = 32;

/** `npm run bench -- api [--requests N] [--shops 10,200]` */
export const bench: Bench = async (context) => {
  const { stack, args, say } = context;
  const requests = Number(args[args.indexOf('--requests') + 1]) || 1500;
  const web = stack.webUrl;
  const accounts = stack.runFile().accounts;
  const [first] = accounts.filter((a) => a.role === 'office');
  if (!first) throw new Error('The demo has no office account.');
  const tokens = new Map<string, string>();
  for (const role of ['office', 'tech', 'client_owner'] as const) {
    const account = accounts.find((a) => a.role === role && a.shop === first.shop);
    if (account) tokens.set(role, await signIn(web, account.email, account.password));
  }
  const ask = async (path: string) => {
    const answer = await fetch(web + path, {
      headers: { authorization: `Bearer ${tokens.get('office')}` },
    });
    return (await answer.json()) as { items: { id: string }[] };
  };
  const storeId = (await ask('/api/stores?limit=1')).items[0]?.id ?? '';
  const visitId = (await ask('/api/visits?limit=1&state=completed')).items[0]?.id ?? '';
  const asked = tenOperations({ storeId, visitId, clientStoreId: storeId });

  const recorded = await recordOperations(context, asked, tokens);
  const bare = await startBare(stack.urls.appUrl, recorded);
  const rows: Record<string, string | number>[] = [];
  try {
    for (const operation of asked) {
      const token = tokens.get(operation.as) as string;
      const ours = (n = requests) =>
        load(web, () => operation.shot(token), { connections, total: n });
      const theirs = (n = requests) =>
        load(bare.url, () => ({ method: 'GET', path: `/${operation.id}`, headers: {} }), {
          connections,
          total: n,
        });
      // Both warm up, then take turns, so that neither has the quieter half of the machine's day.
      await ours(200);
      await theirs(200);
      const runs = [await ours(), await theirs(), await ours(), await theirs()];
      const product = best(runs[0], runs[2]);
      const plain = best(runs[1], runs[3]);
      const ratio = product.perSecond / plain.perSecond;
      rows.push({
        operation: operation.id,
        statements: recorded.operations[operation.id]?.length ?? 0,
        'product /s': Math.round(product.perSecond),
        'bare /s': Math.round(plain.perSecond),
        ratio: Number(ratio.toFixed(2)),
        limit: leastOfBare,
        'p95 ms': Number(product.p95.toFixed(1)),
        failed: product.failed + plain.failed,
      });
      say(`${operation.id}: ${ratio.toFixed(2)} of bare`);
    }
  } finally {
    bare.child.kill();
  }
  const many = await measureManyShops(context, asked, requests);
  const met =
    rows.every((row) => Number(row.ratio) >= leastOfBare && row.failed === 0) &&
    (many === undefined || many.ratio <= mostOfTenShops);
  if (many)
    rows.push({
      operation: `p95 at ${many.shops[1]} shops / ${many.shops[0]}`,
      statements: '',
      'product /s': '',
      'bare /s': '',
      ratio: many.ratio,
      limit: mostOfTenShops,
      'p95 ms': many.p95[1] ?? 0,
      failed: 0,
    });
  return { rows, met, details: { requests, connections, many } };
};

function best<T extends { perSecond: number }>(a: T | undefined, b: T | undefined): T {
  if (!a || !b) throw new Error('A run is missing.');
  return a.perSecond >= b.perSecond ? a : b;
}

/** Runs each operation once in this process and writes down its SQL. */
async function recordOperations(
  { stack }: BenchContext,
  asked: readonly Asked[],
  tokens: ReadonlyMap<string, string>,
): Promise<{ operations: Record<string, Statement[]>; made: string[] }> {
  const secrets = localSecrets(stack.options.dataDir);
  const config = readConfig({
    DATABASE_APP_URL: stack.urls.appUrl,
    DATABASE_PLATFORM_URL: stack.urls.platformUrl,
    SESSION_SECRET: secrets.sessionSecret,
    LOG_LEVEL: 'silent',
    RATE_LIMIT: '0',
    FILES_DIR: join(stack.options.dataDir, 'files'),
  });
  const log = createLog('silent', 'bench');
  const close = await openServices(config, log, 'web');
  const server = createServer(createApp(config, log)).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const operations: Record<string, Statement[]> = {};
  const made = new Set<string>();
  try {
    for (const operation of asked) {
      const shot: Shot = operation.shot(tokens.get(operation.as) as string);
      const call = async () => {
        const answer = await fetch(base + shot.path, {
          method: shot.method,
          headers: operation.shot(tokens.get(operation.as) as string).headers,
          body: shot.body,
        });
        await answer.text();
        if (!answer.ok) throw new Error(`${operation.id} answered ${answer.status}`);
      };
      await call();
      const begun = Date.now() - 1;
      operations[operation.id] = await recordSql(call);
      for (const id of madeSince(operations[operation.id] as Statement[], begun)) made.add(id);
    }
  } finally {
    server.close();
    server.closeAllConnections();
    await close();
  }
  return { operations, made: [...made] };
}

/** Ids of version 7 tell when they were made. */
function madeSince(statements: readonly Statement[], begun: number): string[] {
  const ids = JSON.stringify(statements).match(
    /[0-9a-f]{8}-[0-9a-f]{4}-7[0-9a-f]{3}-[0-9a-f]{4}-[0-9a-f]{12}/g,
  );
  return (ids ?? []).filter((id) => parseInt(id.replace('-', '').slice(0, 12), 16) >= begun);
}

async function startBare(
  appUrl: string,
  recorded: { operations: Record<string, Statement[]>; made: string[] },
): Promise<{ url: string; child: ChildProcess }> {
  const child = fork(join(__dirname, 'support/bare-server.ts'), { execArgv: ['--import', 'tsx'] });
  child.send({ appUrl, pool: 16, ...recorded });
  const [{ port }] = (await once(child, 'message')) as [{ port: number }];
  return { url: `http://127.0.0.1:${port}`, child };
}

/** The same load spread over few and over many shops. */
async function measureManyShops(
  { stack, args, say }: BenchContext,
  asked: readonly Asked[],
  requests: number,
): Promise<{ shops: number[]; p95: number[]; ratio: number } | undefined> {
  const given = args[args.indexOf('--shops') + 1];
  const shops = args.includes('--shops') && given ? given.split(',').map(Number) : [10, 200];
  const reads = asked.filter(
    (a) => a.as === 'office' && !['stores.floor', 'visits.show', 'calls.report'].includes(a.id),
  );
  const p95: number[] = [];
  for (const count of shops) {
    say(`Growing to ${count} shops`);
    await seed(stack.options.dataDir, await environmentOf(stack), ['--shops', String(count)]);
    const tokens = await officeTokens(stack);
    const total = requests * 4;
    await load(stack.webUrl, (n) => pick(reads, tokens, n), { connections, total: 500 });
    const runs = [
      await load(stack.webUrl, (n) => pick(reads, tokens, n), { connections, total }),
      await load(stack.webUrl, (n) => pick(reads, tokens, n), { connections, total }),
    ];
    p95.push(Number(Math.min(...runs.map((r) => r.p95)).toFixed(1)));
    say(`p95 ${p95.at(-1)} ms at ${count} shops`);
  }
  return { shops, p95, ratio: Number(((p95[1] ?? 0) / (p95[0] ?? 1)).toFixed(2)) };
}

function pick(reads: readonly Asked[], tokens: readonly string[], n: number): Shot {
  const operation = reads[n % reads.length] as Asked;
  return operation.shot(tokens[Math.floor(n / reads.length) % tokens.length] as string);
}

async function environmentOf(stack: BenchContext['stack']): Promise<Record<string, string>> {
  const secrets = localSecrets(stack.options.dataDir);
  return {
    DATABASE_OWNER_URL: stack.urls.ownerUrl,
    DATABASE_APP_URL: stack.urls.appUrl,
    DATABASE_PLATFORM_URL: stack.urls.platformUrl,
    SESSION_SECRET: secrets.sessionSecret,
    FILES_DIR: join(stack.options.dataDir, 'files'),
  };
}

/** Signed here, so that the people of 200 shops need not sign in one by one. */
async function officeTokens(stack: BenchContext['stack']): Promise<string[]> {
  const secrets = localSecrets(stack.options.dataDir);
  openDatabase({ appUrl: stack.urls.appUrl, platformUrl: stack.urls.platformUrl, pool: 2 });
  try {
    const found = await platformRows<{
      shop_id: string;
      id: string;
      user_id: string;
      name: string;
    }>(`select shop_id, id, user_id, name from memberships where role = 'office' order by shop_id`);
    return found.map(
      (m) =>
        signAccessToken(
          { sub: m.user_id, sid: m.id, name: m.name, mid: m.id, role: 'office', shop: m.shop_id },
          secrets.sessionSecret,
        ).token,
    );
  } finally {
    await closeDatabase();
  }
}
