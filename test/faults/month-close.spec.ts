import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { monthOf, previousMonth } from '@lib/domain';
import { createProgress } from '../../infra/bootstrap/progress.cjs';
import { withClient } from '../../infra/postgres/databases';
import { withPrivateStack } from '../../infra/stack/private-stack';
import { type Stack } from '../../infra/stack/stack';
import { closeDatabase, openDatabase } from '../../server/src/core/database/database';
import { rows } from '../../server/src/core/database/tenancy';
import { sessionSecret } from '../support/app';
import {
  buildPerson,
  buildShop,
  insert,
  inShop,
  type TestPerson,
  type TestShop,
} from '../support/factories';
import {
  bookTroubles,
  buildPayingStore,
  buildSignedOff,
  type MoneyStore,
  zone,
} from '../support/money';
import { type Random, seeded } from '../support/random';

// Months of statements are closed while their processes and their database are killed under them.
// Afterwards every store has one statement a month, every mail went out once or says that nobody
// knows, and the books agree.
const kills = Number(process.env.CLOSE_KILLS ?? 20);
const stops = Number(process.env.CLOSE_STOPS ?? 5);
const stores = Number(process.env.CLOSE_STORES ?? 60);
const seed = Number(process.env.CLOSE_SEED ?? 20311);

const last = previousMonth(monthOf(new Date(), zone));
const months = [last];
while (months.length < 6) months.unshift(previousMonth(months[0] as string));

interface Run {
  id: string;
  state: string;
  counts: { waiting: number; built: number; rendered: number; failed: number };
  mails: { waiting: number; sent: number; uncertain: number; failed: number; total: number };
}

interface World {
  stack: Stack;
  shop: TestShop;
  owner: TestPerson;
  all: MoneyStore[];
  random: Random;
}

/** A database of two roles' worth, open only while this process itself needs it. */
async function withDatabase<T>(stack: Stack, work: () => Promise<T>): Promise<T> {
  openDatabase({ appUrl: stack.urls.appUrl, platformUrl: stack.urls.platformUrl, pool: 4 });
  try {
    return await work();
  } finally {
    await closeDatabase();
  }
}

async function buildWorld(stack: Stack): Promise<World> {
  return withDatabase(stack, async () => {
    const shop = await buildShop({ name: 'Harbour Appliance' });
    // The button closes each month here, so that one close is under way at a time.
    await inShop(shop, () =>
      rows('update shop_settings set close_by_schedule = false where shop_id = $shopId', {
        shopId: shop.id,
      }),
    );
    const owner = await buildPerson(shop, 'shop_owner');
    const all: MoneyStore[] = [];
    for (let n = 0; n < stores; n += 1) {
      const store = await buildPayingStore(shop);
      all.push(store);
      if (n % 3 === 0) {
        await insert(shop, 'contacts', {
          client_id: store.clientId,
          name: 'Second reader',
          email: `second-${n}@laundry.example`,
          gets_statements: true,
        });
      }
      await buildSignedOff(shop, store, { on: `${months[n % months.length]}-10`, net: 1_000 + n });
    }
    return { stack, shop, owner, all, random: seeded(seed) };
  });
}

/** Asks the web process, which may be dead or without a database at the moment. */
async function ask<T>({ stack, owner }: World, method: string, where: string, body?: unknown) {
  try {
    const answer = await fetch(`${stack.webUrl}${where}`, {
      method,
      headers: {
        authorization: `Bearer ${owner.token}`,
        'content-type': 'application/json',
        'idempotency-key': `fault-test-${method}-${where}-${JSON.stringify(body)}`
          .replace(/[^A-Za-z0-9]/g, '_')
          .slice(0, 100),
      },
      body: body === undefined ? undefined : JSON.stringify(body),
      signal: AbortSignal.timeout(5_000),
    });
    const text = await answer.text();
    return { status: answer.status, body: (text ? JSON.parse(text) : undefined) as T };
  } catch {
    return undefined;
  }
}

async function insist<T>(world: World, method: string, where: string, body?: unknown): Promise<T> {
  for (let tries = 0; tries < 120; tries += 1) {
    const answer = await ask<T>(world, method, where, body);
    if (answer && answer.status < 300) return answer.body;
    if (answer && answer.status < 500) throw new Error(`${where}: ${JSON.stringify(answer)}`);
    await wait(500);
  }
  throw new Error(`${where} does not answer`);
}

/** One blow at a random moment of a close; waits until what was hit is standing again. */
async function blow(world: World, kind: 'kill' | 'stop'): Promise<void> {
  const { stack, random } = world;
  await wait(100 + random.below(900));
  if (kind === 'stop') {
    const before = stack.cluster?.pid;
    await stack.cluster?.stop('immediate');
    while (stack.cluster?.pid === before) await wait(50);
    return;
  }
  // Mostly the worker, which does the closing; the web process is asked all the while.
  const service = random.chance(0.7) ? stack.worker : stack.web;
  service.kill('SIGKILL');
  await wait(300);
}

async function closeUnderFire(world: World): Promise<{ runs: string[]; inClose: number }> {
  const blows = [
    ...Array.from({ length: kills }, () => 'kill' as const),
    ...Array.from({ length: stops }, () => 'stop' as const),
  ];
  for (let at = blows.length - 1; at > 0; at -= 1) {
    const other = world.random.below(at + 1);
    [blows[at], blows[other]] = [blows[other]!, blows[at]!];
  }
  const runs: string[] = [];
  let inClose = 0;
  for (const month of months) {
    const { id } = await insist<Run>(world, 'POST', '/api/closes', { month });
    runs.push(id);
    for (let done = false; !done && blows.length > 0;) {
      const run = await insist<Run>(world, 'GET', `/api/closes/${id}`);
      // What is left of a close may be mails of killed workers, whose leases take minutes to end.
      done = run.mails.total > 0 && run.counts.waiting + run.counts.built === 0;
      if (done && run.mails.sent + run.mails.uncertain < run.mails.total)
        done = world.random.chance(0.3);
      if (done) break;
      await blow(world, blows.pop()!);
      inClose += 1;
    }
    if (blows.length === 0) break;
  }
  expect(blows).toEqual([]);
  return { runs, inClose };
}

/** As if five minutes passed: the leases of the dead run out. Then everything comes to its end. */
async function settle(world: World, runs: readonly string[]): Promise<Run[]> {
  const { stack } = world;
  const database = new URL(stack.urls.appUrl).pathname.slice(1);
  const superuser = stack.cluster!.url('postgres', database);
  for (let tries = 0; tries < 90; tries += 1) {
    await wait(2_000);
    const states = await Promise.all(
      runs.map((id) => insist<Run>(world, 'GET', `/api/closes/${id}`)),
    );
    if (states.every((run) => run.state === 'done')) return states;
    const quiet = states.every((run) => run.counts.waiting + run.counts.built === 0);
    if (quiet && tries % 10 === 9) {
      await withClient(superuser, (client) =>
        client.query(`update deliveries set lease_until = now() - interval '1 second'
          where state = 'handing_over' and updated_at < now() - interval '15 seconds'`),
      );
    }
    // A fresh worker sweeps at once instead of at the next full minute.
    if (tries % 10 === 9) stack.worker.kill('SIGKILL');
  }
  throw new Error('The closes do not come to an end');
}

interface Sent {
  state: string;
  messageId: string;
  id: string;
  version: number;
}

describe('a month close under fire', () => {
  it('loses nothing and doubles nothing', async () => {
    const webDir = mkdtempSync(path.join(tmpdir(), 'tumblewright-noweb-'));
    try {
      await withPrivateStack(
        {
          progress: createProgress(() => undefined),
          demo: false,
          durable: true,
          webDir,
          env: { SESSION_SECRET: sessionSecret },
        },
        async (stack) => {
          const world = await buildWorld(stack);
          const { runs, inClose } = await closeUnderFire(world);
          expect(inClose).toBe(kills + stops);
          const ended = await settle(world, runs);
          await judge(world, ended);
        },
      );
    } finally {
      rmSync(webDir, { recursive: true, force: true });
    }
  }, 900_000);
});

async function judge(world: World, ended: readonly Run[]): Promise<void> {
  const { stack, shop } = world;
  const letters = () => stack.mailbox!.letters.list();
  const recipients = stores + Math.ceil(stores / 3);

  for (const run of ended) {
    expect(run.counts).toEqual({ waiting: 0, built: 0, rendered: stores, failed: 0 });
    expect(run.mails).toMatchObject({ waiting: 0, failed: 0, total: recipients });
    expect(run.mails.sent + run.mails.uncertain).toBe(recipients);
  }
  await withDatabase(stack, async () => {
    expect(await bookTroubles(shop)).toEqual([]);
    const [counted] = await inShop(shop, () =>
      rows<{ statements: number; stores: number; files: number; tickets: number; stated: number }>(
        `select (select count(*)::int from statements where shop_id = $shopId) as statements,
           (select count(distinct (store_id, month))::int from statements where shop_id = $shopId) as stores,
           (select count(distinct owner_id)::int from attachments
            where shop_id = $shopId and owner_kind = 'statement') as files,
           (select count(*)::int from tickets
            where shop_id = $shopId and to_char(signed_off_on, 'YYYY-MM') <= $month) as tickets,
           (select count(*)::int from statement_documents
            where shop_id = $shopId and document_kind = 'ticket') as stated`,
        { shopId: shop.id, month: months[ended.length - 1] },
      ),
    );
    const statements = stores * ended.length;
    expect(counted).toMatchObject({ statements, stores: statements, files: statements });
    expect(counted?.stated).toBe(counted?.tickets);
  });

  // 0 doubled: no Message-ID reached the mailbox twice.
  const arrived = new Map<string, number>();
  for (const { messageId } of letters()) arrived.set(messageId, (arrived.get(messageId) ?? 0) + 1);
  expect([...arrived.values()].filter((times) => times > 1)).toEqual([]);

  // 0 lost: a mail is there, or it is shown as uncertain.
  const mails = await withDatabase(stack, () =>
    inShop(shop, () =>
      rows<Sent>(
        `select id, state, version, message_id as "messageId" from deliveries where shop_id = $shopId`,
        { shopId: shop.id },
      ),
    ),
  );
  const sentButNotThere = mails.filter((m) => m.state === 'sent' && !arrived.has(m.messageId));
  expect(sentButNotThere).toEqual([]);
  const uncertain = mails.filter((mail) => mail.state === 'uncertain');
  const shown = ended.reduce((sum, run) => sum + run.mails.uncertain, 0);
  expect(uncertain).toHaveLength(shown);

  // A person settles what is uncertain; then everybody has every statement, once.
  for (const mail of uncertain) {
    const decision = arrived.has(mail.messageId) ? 'arrived' : 'send_again';
    const answer = await fetch(`${stack.webUrl}/api/deliveries/${mail.id}/decide`, {
      method: 'POST',
      headers: {
        authorization: `Bearer ${world.owner.token}`,
        'content-type': 'application/json',
        'if-match': `"${mail.version}"`,
        'idempotency-key': `decide-${mail.id}`,
      },
      body: JSON.stringify({ decision }),
    });
    expect(answer.status).toBe(200);
  }
  for (let tries = 0; letters().length < mails.length && tries < 60; tries += 1) await wait(500);
  const ids = letters().map((letter) => letter.messageId);
  expect(ids).toHaveLength(mails.length);
  expect(new Set(ids).size).toBe(mails.length);
  console.log(
    `month close: ${kills} kills and ${stops} stops in ${ended.length} closes of ${stores} stores, ` +
      `seed ${seed}: ${mails.length} mails, ${uncertain.length} uncertain, 0 lost, 0 doubled`,
  );
}
