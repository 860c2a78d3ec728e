import { type Bearer, type LineKind } from '@lib/contracts';
import { absorbedPostings } from '@lib/domain';
import { type Context, systemContext } from '../../core/context';
import { row, rows, withTenant } from '../../core/database/tenancy';
import { enqueue } from '../../core/jobs/boss';
import { type Job } from '../../core/jobs/work';
import { postDocument } from '../ledger/post';

/**
 * Posts the own cost of what the shop bore of a signed-off ticket. The ticket's id is the document's,
 * so the database holds it to once; a job that runs again finds it done.
 */
export async function absorbTicket(shopId: string, ticketId: string, now: Date): Promise<void> {
  const context = systemContext(shopId, now, 'warranty-absorb');
  await withTenant(context, async () => {
    const bind = { shopId, ticketId };
    const ticket = await row<{ storeId: string; clientId: string; on: string; posted: boolean }>(
      `select store_id as "storeId", client_id as "clientId", signed_off_on as on,
         exists (select 1 from entries e where e.shop_id = t.shop_id
           and e.document_kind = 'absorbed' and e.document_id = t.id) as posted
       from tickets t where shop_id = $shopId and id = $ticketId`,
      bind,
    );
    if (!ticket || ticket.posted) return;
    const lines = await rows<{ kind: LineKind; bearer: Bearer; charged: number; ownCost: number }>(
      `select kind, bearer, charged, cost as "ownCost" from ticket_lines
       where shop_id = $shopId and ticket_id = $ticketId order by position`,
      bind,
    );
    await postDocument(context, {
      kind: 'absorbed',
      id: ticketId,
      clientId: ticket.clientId,
      postedOn: ticket.on,
      postings: absorbedPostings({ storeId: ticket.storeId, lines }),
    });
  });
}

/** Days back in which the sweep looks for a ticket whose job was lost. */
const lookBackDays = 100;

/** For the sweep: tickets of a shop whose own cost no job has posted, though one should have. */
export function sweepAbsorbed(context: Context): Promise<void> {
  return withTenant(context, async () => {
    const unposted = await rows<{ id: string }>(
      `select t.id from tickets t
       where t.shop_id = $shopId and t.own_cost <> 0
         and t.signed_off_on > $now::timestamptz::date - ${lookBackDays}
         and t.signed_off_at < $now::timestamptz - interval '10 minutes'
         and not exists (select 1 from entries e where e.shop_id = t.shop_id
           and e.document_kind = 'absorbed' and e.document_id = t.id)
       order by t.signed_off_on limit 100`,
      { shopId: context.shopId, now: context.now },
    );
    for (const { id } of unposted) {
      await enqueue(
        'warranty-absorb',
        { shopId: context.shopId, ticketId: id },
        { singletonKey: `absorb ${id}` },
      );
    }
  });
}

export const ticketJobs: Job[] = [
  {
    queue: 'warranty-absorb',
    work: (data) => absorbTicket(data.shopId as string, data.ticketId as string, new Date()),
  },
];
