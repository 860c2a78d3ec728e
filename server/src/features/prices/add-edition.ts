import { type PriceBook } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { nextNumber } from '../../core/counters';
import { write } from '../../core/database/tenancy';

/** Writes an edition in the open tenant transaction; the newest of a day is the one in force. */
export async function addEdition(
  context: Context,
  edition: { validFrom: string; note: string; book: PriceBook },
): Promise<string> {
  const id = uuid();
  await write(
    `insert into editions (shop_id, id, number, valid_from, book, note, by_user_id)
     values ($shopId, $id, $number, $validFrom, $book, $note, $userId)`,
    {
      shopId: context.shopId,
      id,
      number: await nextNumber(context, 'edition'),
      validFrom: edition.validFrom,
      book: JSON.stringify(edition.book),
      note: edition.note,
      userId: context.userId,
    },
  );
  return id;
}
