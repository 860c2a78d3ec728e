import { type PriceBook } from '@lib/contracts';
import { type Context } from '../../core/context';
import { row, withTenant } from '../../core/database/tenancy';

export interface EditionRow {
  id: string;
  number: number;
  valid_from: string;
  note: string;
  created_at: Date;
  book: PriceBook;
}

/** The edition a visit of `day` is priced by, or undefined before the first one's day. */
export function editionInForce(context: Context, day: string): Promise<EditionRow | undefined> {
  return withTenant(context, () =>
    row<EditionRow>(
      `select id, number, valid_from, note, created_at, book from editions
       where shop_id = $shopId and valid_from <= $day
       order by valid_from desc, number desc limit 1`,
      { shopId: context.shopId, day },
    ),
  );
}
