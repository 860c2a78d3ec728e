import { writeFileSync } from 'node:fs';
import { DateTime } from 'luxon';
import { config, readConfig } from '../core/config';
import { platformRow } from '../core/database/tenancy';
import { createLog } from '../core/logging';
import { openServices } from '../core/process';
import { ask } from './ask';
import { growTo } from './clone-shop';
import { liveThrough } from './history';
import { addPlatformAdmin, demoPassword, type DemoAccount } from './people';
import { seeded } from './random';
import { type DemoShop, setUpShop } from './set-up';
import { setClocksBack } from './set-clocks-back';
import { shopPlans } from './world';

/** Four whole months before this one, and the days of this one so far. */
const wholeMonths = 4;

/** Fills an empty database with the demo; with `--shops N` grows it by copies to N shops. */
async function main(): Promise<void> {
  const config = readConfig();
  // Thousands of small transactions, none of which anybody relies on yet: the disk need not be
  // waited for after each.
  config.database.appUrl = withoutWaiting(config.database.appUrl);
  config.database.platformUrl = withoutWaiting(config.database.platformUrl);
  const close = await openServices(config, createLog('error', 'demo'), 'web');
  try {
    const wanted = Number(process.argv[process.argv.indexOf('--shops') + 1]) || 0;
    const there = await platformRow<{ n: number }>('select count(*)::int as n from shops');
    if (!there?.n) await fill();
    if (process.argv.includes('--shops')) await growTo(wanted);
  } finally {
    await close();
  }
}

function withoutWaiting(address: string): string {
  const url = new URL(address);
  url.searchParams.set('options', '-c synchronous_commit=off');
  return url.href;
}

async function fill(): Promise<void> {
  const accounts: DemoAccount[] = [await addPlatformAdmin()];
  for (const [index, plan] of shopPlans.entries()) {
    const random = seeded(20_310 + index);
    const today = DateTime.now().setZone(plan.zone).startOf('day');
    const first = today.startOf('month').minus({ months: wholeMonths });
    const shop = await setUpShop(plan, first.minus({ days: 2 }).toJSDate(), random);
    // Where no card payments are to be had, the shop connects later, as any shop would.
    if (config().card.apiBase) await ask(shop.owner.at(new Date()), 'payments.connect');
    await liveThrough(shop, first, today, random);
    await setClocksBack(shop.id);
    accounts.push(...accountsOf(shop));
    process.stdout.write(`${plan.name}: ${shop.stores.length} stores.\n`);
  }
  const file = process.env.DEMO_ACCOUNTS_FILE;
  if (file) writeFileSync(file, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 });
}

function accountsOf(shop: DemoShop): DemoAccount[] {
  const of = (role: DemoAccount['role'], email: string): DemoAccount => ({
    role,
    shop: shop.plan.name,
    email,
    password: demoPassword,
  });
  return [
    of('shop_owner', shop.owner.email),
    of('office', shop.office.email),
    ...shop.techs.slice(0, 2).map((tech) => of('tech', tech.email)),
    ...shop.clientOwners.map((owner) => of('client_owner', owner.email)),
    of('attendant', shop.stores[0]?.attendant.email ?? ''),
  ];
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
  if (error instanceof Error && error.cause)
    process.stderr.write(`${JSON.stringify(error.cause)} ${(error.cause as Error).stack}\n`);
  process.exit(1);
});
