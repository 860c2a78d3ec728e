import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { problem } from '../../core/problems/problem';
import { isoWeekday } from './weekday';

export type Closures = AnswerOf<'closures.show'>;

/** Before a shop has said anything it is open every day. */
const untold: Closures = { weekdays: [], days: [], version: 1 };

export function showClosures(context: Pick<Context, 'shopId' | 'clientId'>): Promise<Closures> {
  return withTenant(context, async () => {
    const told = await row<Closures>(
      'select weekdays, days, version from closures where shop_id = $shopId',
      { shopId: context.shopId },
    );
    return told ?? untold;
  });
}

export function changeClosures(
  context: Context,
  version: number,
  body: InputOf<'closures.change'>['body'],
): Promise<Closures> {
  return withTenant(context, async () => {
    const bind = {
      shopId: context.shopId,
      weekdays: JSON.stringify([...body.weekdays].sort()),
      days: JSON.stringify([...body.days].sort((a, b) => (a.day < b.day ? -1 : 1))),
      version,
    };
    const [changed] = await write<Closures>(
      `insert into closures (shop_id, id, weekdays, days, version)
       select $shopId, $id, $weekdays::jsonb, $days::jsonb, $version + 1
       where $version = 1 or exists (select 1 from closures where shop_id = $shopId)
       on conflict (shop_id) do update
         set weekdays = excluded.weekdays, days = excluded.days
         where closures.version = $version
       returning weekdays, days, version`,
      { ...bind, id: uuid() },
    );
    if (!changed) throw problem('stale-version');
    await record(context, 'closures changed', { kind: 'shop', id: context.shopId });
    return changed;
  });
}

/** Whether the shop is closed on a day, for shifting rounds. */
export function closedOn({ weekdays, days }: Closures): (day: string) => boolean {
  const single = new Set(days.map((closed) => closed.day));
  return (day) => single.has(day) || weekdays.includes(isoWeekday(day));
}
