import { readFileSync } from 'node:fs';
import { v7 as uuid } from 'uuid';
import { type Bench, type BenchContext } from '../../infra/bench/bench-contract';
import { withClient } from '../../infra/postgres/databases';
import { localSecrets } from '../../infra/stack/secrets';
import { signAccessToken } from '../../server/src/core/auth/access-token';
import { barePdf, bareSql } from './support/bare-close';
import { buildBenchShop, type BenchShop } from './support/bench-shop';

// The limits.
const mostOfBare = 3;
const mostMegabytes = 512;

/** `npm run bench -- statements [--stores N]`: a month close of 2,000 stores, mails included. */
export const bench: Bench = async (context) => {
  const { stack, args, say } = context;
  const stores = Number(args[args.indexOf('--stores') + 1]) || 2000;
  if (!stack.cluster) throw new Error('This bench needs the private PostgreSQL.');
  const superuser = stack.cluster.url('postgres', new URL(stack.urls.ownerUrl).pathname.slice(1));
  const month = lastMonth();
  say(`Preparing ${stores} stores twice`);
  const ours = await buildBenchShop(superuser, stores, month);
  const bare = await buildBenchShop(superuser, stores, month);

  const sqlStart = performance.now();
  const lines = await bareSql(superuser, bare, month);
  const sqlSeconds = (performance.now() - sqlStart) / 1000;
  const pdfStart = performance.now();
  await barePdf(lines);
  const pdfSeconds = (performance.now() - pdfStart) / 1000;
  say(`Bare SQL ${sqlSeconds.toFixed(1)} s, bare PDF ${pdfSeconds.toFixed(1)} s`);

  const start = performance.now();
  const end = await closeMonth(context, ours, month);
  const seconds = (performance.now() - start) / 1000;
  const counted = await count(superuser, ours);
  const [web, worker] = [stack.web.pid, stack.worker.pid].map(peakMegabytes);
  const ratio = seconds / (sqlSeconds + pdfSeconds);
  const complete =
    counted.statements === stores &&
    counted.sent === stores &&
    counted.files === stores &&
    counted.balance === 0;
  const rows = [
    { what: 'close, product, s', value: Number(seconds.toFixed(1)), limit: '' },
    { what: 'bare SQL, s', value: Number(sqlSeconds.toFixed(1)), limit: '' },
    { what: 'bare PDF, s', value: Number(pdfSeconds.toFixed(1)), limit: '' },
    { what: 'ratio', value: Number(ratio.toFixed(2)), limit: mostOfBare },
    { what: 'peak memory web, MB', value: web ?? 0, limit: mostMegabytes },
    { what: 'peak memory worker, MB', value: worker ?? 0, limit: mostMegabytes },
    { what: 'statements', value: counted.statements, limit: stores },
    { what: 'mails sent', value: counted.sent, limit: stores },
    { what: 'trial balance', value: counted.balance, limit: 0 },
  ];
  const met =
    end === 'done' &&
    complete &&
    ratio <= mostOfBare &&
    Math.max(web ?? 0, worker ?? 0) <= mostMegabytes;
  return { rows, met, details: { stores, month, state: end } };
};

function lastMonth(): string {
  const now = new Date();
  return new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth() - 1, 15))
    .toISOString()
    .slice(0, 7);
}

/** Presses the owner's button and waits until the run says it is done. */
async function closeMonth(
  { stack, say }: BenchContext,
  shop: BenchShop,
  month: string,
): Promise<string> {
  const { token } = signAccessToken(
    {
      sub: shop.ownerUserId,
      sid: uuid(),
      name: 'Bench Owner',
      mid: shop.ownerMembershipId,
      role: 'shop_owner',
      shop: shop.id,
    },
    localSecrets(stack.options.dataDir).sessionSecret,
  );
  const headers = { authorization: `Bearer ${token}`, 'content-type': 'application/json' };
  const begun = await fetch(`${stack.webUrl}/api/closes`, {
    method: 'POST',
    headers: { ...headers, 'idempotency-key': uuid() },
    body: JSON.stringify({ month }),
  });
  if (!begun.ok) throw new Error(`The close was refused: ${await begun.text()}`);
  const { id } = (await begun.json()) as { id: string };
  for (let last = 0; ;) {
    const answer = await fetch(`${stack.webUrl}/api/closes/${id}`, { headers });
    const run = (await answer.json()) as { state: string; counts?: Record<string, number> };
    if (run.state === 'done' || run.state === 'failed') return run.state;
    if (Date.now() - last > 5000) {
      say(`  ${run.state} ${JSON.stringify(run.counts ?? {})}`);
      last = Date.now();
    }
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
}

async function count(superuser: string, shop: BenchShop) {
  let counted = { statements: 0, sent: 0, files: 0, balance: 0 };
  await withClient(superuser, async (db) => {
    const { rows } = await db.query<typeof counted>(
      `select (select count(*)::int from statements where shop_id = $1) as statements,
         (select count(*)::int from deliveries where shop_id = $1 and state = 'sent') as sent,
         (select count(*)::int from attachments where shop_id = $1 and owner_kind = 'statement') as files,
         (select coalesce(sum(amount), 0)::int from entries where shop_id = $1) as balance`,
      [shop.id],
    );
    counted = rows[0] ?? counted;
  });
  return counted;
}

/** The most memory a process ever had, by the kernel's own count. */
function peakMegabytes(pid: number | undefined): number | undefined {
  if (!pid) return undefined;
  const peak = /VmHWM:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1];
  return Math.round(Number(peak) / 1024);
}
