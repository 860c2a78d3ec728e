import { type DateTime } from 'luxon';
import { systemContext } from '../core/context';
import { withTenant, write } from '../core/database/tenancy';
import { finishRun } from '../features/statements/finish-run';
import { moveRun } from '../features/statements/move-run';
import { ask } from './ask';
import { type DemoShop } from './set-up';

const closed = new Set<string>();

/** On the second of a month the one before is closed; the last one is left for whoever tries it. */
export async function closeMonthsDue(
  shop: DemoShop,
  day: DateTime,
  first: DateTime,
  today: DateTime,
): Promise<void> {
  if (day.day !== 2) return;
  const month = day.minus({ months: 1 });
  if (month < first.startOf('month') || month.hasSame(today.minus({ months: 1 }), 'month')) return;
  const key = `${shop.id} ${month.toFormat('yyyy-MM')}`;
  if (closed.has(key)) return;
  closed.add(key);
  const now = day.set({ hour: 8 }).toJSDate();
  const run = await ask(shop.owner.at(now), 'statements.close', {
    body: { month: month.toFormat('yyyy-MM') },
  });
  await finishRun(systemContext(shop.id, now), run.id);
  // These mails are history: they were sent then, and must not be sent now.
  await withTenant(systemContext(shop.id, now), () =>
    write(
      `update deliveries set state = 'sent', attempt = 1, sent_at = $now, created_at = $now
       where shop_id = $shopId and state = 'waiting'`,
      { shopId: shop.id, now },
    ),
  );
  await moveRun(systemContext(shop.id, now), run.id, []);
}

/** Transfers arrive as each store's owner is used to pay. */
export async function payWhatIsDue(shop: DemoShop, day: DateTime): Promise<void> {
  if (day.day !== 9 && day.day !== 24) return;
  const now = day.set({ hour: 11 }).toJSDate();
  for (const store of shop.stores) {
    const payer = store.plan.pays;
    const first = closed.size <= 2;
    if (payer === 'never' && !first) continue;
    if ((payer === 'late') !== (day.day === 24)) continue;
    const { items } = await ask(shop.office.at(now), 'statements.list', {
      query: { storeId: store.id, limit: 1 },
    });
    const [latest] = items;
    if (!latest || latest.open <= 0) continue;
    await ask(shop.office.at(now), 'payments.record', {
      body: {
        storeId: store.id,
        amount: latest.open,
        receivedOn: day.toISODate() as string,
        method: payer === 'late' ? 'cheque' : 'transfer',
        words: `Statement ${latest.name}`,
      },
    });
  }
}
