import { type Context } from './context';
import { write } from './database/tenancy';

/**
 * The next number of a kind of document. It is taken in the transaction that uses it, so a rolled
 * back document leaves no gap; two at once take turns on the counter's row.
 */
export async function nextNumber(
  context: Pick<Context, 'shopId'>,
  kind: string,
  howMany = 1,
): Promise<number> {
  const [counter] = await write<{ value: number }>(
    `insert into counters (shop_id, kind, value) values ($shopId, $kind, $howMany)
     on conflict (shop_id, kind) do update set value = counters.value + $howMany
     returning value`,
    { shopId: context.shopId, kind, howMany },
  );
  return (counter as { value: number }).value - howMany + 1;
}
