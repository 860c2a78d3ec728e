import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { row } from '../../core/database/tenancy';

const prefix = { clients: 'C', stores: 'S' } as const;

/** The next number of its kind that nobody gave by hand before. */
export async function freeNumber(context: Context, of: keyof typeof prefix): Promise<string> {
  for (;;) {
    const next = await nextNumber(context, of);
    const number = `${prefix[of]}-${String(next).padStart(3, '0')}`;
    if (!(await numberTaken(context, of, number))) return number;
  }
}

/** Whether another row of the shop has the number. */
export async function numberTaken(
  context: Context,
  of: keyof typeof prefix,
  number: string,
  exceptId: string | null = null,
): Promise<boolean> {
  const other = await row(
    `select 1 from ${of} where shop_id = $shopId and number = $number and id is distinct from $exceptId::uuid`,
    { shopId: context.shopId, number, exceptId },
  );
  return other !== undefined;
}
