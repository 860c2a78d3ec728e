import { csvRow, csvStart } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows, withTenant } from '../../core/database/tenancy';
import { type InputOf, RawReply } from '../../core/http/route';
import { sendPiece } from '../../core/http/send-piece';
import { shown } from '../../core/lists/shown';
import { shopFacts, type ShopFacts } from '../../core/shop-facts';
import { tradeDayNow } from '../settings/trade-day';
import { cellsOf, type ExportedList, exportedLists } from './lists';

type Show = InputOf<'exports.download'>['query']['show'];
type Keyed = Parameters<typeof cellsOf>[1] & { sort_values: string[]; sort_id: string };

/** Rows read at once: one short transaction each, so a slow reader holds nothing open. */
const atOnce = 1000;

/** Gives out a whole list, however long, without ever holding more than a page of it. */
export async function exportList(
  context: Context,
  kind: keyof typeof exportedLists,
  show: Show,
): Promise<RawReply> {
  const list = exportedLists[kind];
  const { shop, today } = await withTenant(context, async () => ({
    shop: await shopFacts(context),
    today: await tradeDayNow(context),
  }));
  // Read before anything is sent, so that trouble with the database is still a problem document.
  const first = await nextRows(context, list, show, undefined);
  return new RawReply(async (response) => {
    response
      .status(200)
      .set('Content-Disposition', `attachment; filename="${kind}-${today}.csv"`)
      .type('text/csv; charset=utf-8');
    await sendPiece(response, csvStart + csvRow(list.headers));
    for (let found = first; ;) {
      const goesOn = await sendPiece(response, text(list, found, shop));
      const last = found.at(-1);
      if (found.length < atOnce || !last || !goesOn) break;
      found = await nextRows(context, list, show, last);
    }
    response.end();
  });
}

function nextRows(
  context: Context,
  list: ExportedList,
  show: Show,
  after: Keyed | undefined,
): Promise<Keyed[]> {
  const order = [...list.sort, list.id].join(', ');
  return withTenant(context, () =>
    rows<Keyed>(
      `${list.select.replace(/^select/, `select array[${list.sort.join(', ')}] as sort_values, ${list.id} as sort_id,`)}
       where ${[
         `${list.shopColumn} = $shopId`,
         ...shown(show, list.ended),
         ...(after ? isAfter(list) : []),
       ].join(' and ')}
       order by ${order} limit ${atOnce}`,
      {
        shopId: context.shopId,
        ...(after ? { values: after.sort_values, id: after.sort_id } : {}),
      },
    ),
  );
}

/** The first column is compared by itself too: an index of its table alone can use that. */
function isAfter({ sort, id }: ExportedList): string[] {
  const values = sort.map((_, at) => `($values::text[])[${at + 1}]`);
  return [
    `${sort[0]} >= ${values[0]}`,
    `(${[...sort, id].join(', ')}) > (${[...values, '$id::uuid'].join(', ')})`,
  ];
}

function text(list: ExportedList, found: Keyed[], shop: ShopFacts): string {
  return found.map((row) => csvRow(cellsOf(list, row, shop))).join('');
}
