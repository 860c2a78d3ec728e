import { type InputOf, type AnswerOf } from '../../core/http/route';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { page } from '../../core/lists/keyset';
import { announce } from '../../core/live/live';
import { found, invalid, notFound } from '../../core/problems/problem';
import { tradeDayNow } from '../settings/trade-day';
import { addEdition } from './add-edition';
import { type EditionRow, editionInForce } from './edition-in-force';

/** Editions, the latest first. */
export function listEditions(
  context: Context,
  query: InputOf<'editions.list'>['query'],
): Promise<AnswerOf<'editions.list'>> {
  return withTenant(context, async () => {
    const current = await editionInForce(context, await tradeDayNow(context));
    return page<EditionRow, AnswerOf<'editions.list'>['items'][number]>(
      {
        select: 'select e.id, e.number, e.valid_from, e.note, e.created_at from editions e',
        from: 'editions e',
        where: ['e.shop_id = $shopId'],
        bind: { shopId: context.shopId },
        sort: { column: 'e.valid_from', type: 'date', descending: true },
        id: 'e.id',
        limit: query.limit,
        cursor: query.cursor,
      },
      (edition) => summary(edition, current?.id),
    );
  });
}

export function showEdition(
  context: Context,
  editionId: string,
): Promise<AnswerOf<'editions.show'>> {
  return withTenant(context, async () => {
    const edition = found(
      await row<EditionRow>(
        `select id, number, valid_from, note, created_at, book from editions
         where shop_id = $shopId and id = $editionId`,
        { shopId: context.shopId, editionId },
      ),
    );
    const current = await editionInForce(context, await tradeDayNow(context));
    return { ...summary(edition, current?.id), book: edition.book };
  });
}

/** The edition of a day; of today when none is named. */
export function showInForce(
  context: Context,
  on: string | undefined,
): Promise<AnswerOf<'prices.inForce'>> {
  return withTenant(context, async () => {
    const today = await tradeDayNow(context);
    const edition = await editionInForce(context, on ?? today);
    if (!edition) throw notFound();
    const current = await editionInForce(context, today);
    return { ...summary(edition, current?.id), book: edition.book };
  });
}

/**
 * Puts an edition in force. What a ticket was priced by must stay what was in force on its day, so
 * a day that is past is refused as soon as a ticket stands.
 */
export function createEdition(
  context: Context,
  body: InputOf<'editions.create'>['body'],
): Promise<AnswerOf<'editions.create'>> {
  return withTenant(context, async () => {
    const used = await row('select 1 from tickets where shop_id = $shopId limit 1', {
      shopId: context.shopId,
    });
    if (used && body.validFrom < (await tradeDayNow(context))) {
      throw invalid([
        { pointer: '/validFrom', detail: 'is past: tickets stand that other prices made' },
      ]);
    }
    await refuseUnknownParts(
      context,
      body.book.partPrices.map((price) => price.partId),
    );
    const id = await addEdition(context, body);
    await record(context, 'price book: edition added', { kind: 'edition', id });
    await announce(context, 'prices', id);
    return showEdition(context, id);
  });
}

async function refuseUnknownParts(context: Context, partIds: string[]): Promise<void> {
  if (!partIds.length) return;
  const known = await rows<{ id: string }>(
    'select id from parts where shop_id = $shopId and id = any($partIds::uuid[])',
    { shopId: context.shopId, partIds },
  );
  const ids = new Set(known.map((part) => part.id));
  const wrong = partIds.flatMap((id, i) =>
    ids.has(id.toLowerCase())
      ? []
      : [{ pointer: `/book/partPrices/${i}/partId`, detail: 'is no part of the shop' }],
  );
  if (wrong.length) throw invalid(wrong.slice(0, 50));
}

function summary(edition: EditionRow, currentId: string | undefined) {
  return {
    id: edition.id,
    number: edition.number,
    validFrom: edition.valid_from,
    note: edition.note,
    inForce: edition.id === currentId,
    createdAt: edition.created_at.toISOString(),
  };
}
