import { type Bearer } from '@lib/contracts';
import { type PricedLine, type Reason } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type RuledLine } from './ruled-line';

type LineRow = Omit<PricedLine, 'reasons'> & {
  priceReasons: string[];
  proposedBearer: Bearer;
  proposedReasons: Reason[];
  needsConfirmation: boolean;
  basis: string;
};

/** The lines of a signed-off ticket with the proposals they were ruled by: a record, not a new reckoning. */
export async function ticketedLines(context: Context, ticketId: string): Promise<RuledLine[]> {
  const lines = await rows<LineRow>(
    `select l.line_key as "lineKey", l.job_id as "jobId", l.kind, l.description, l.unit,
       l.quantity_milli as "quantityMilli", l.unit_price as "unitPrice", l.discount, l.list, l.cost,
       l.price_reasons as "priceReasons", coalesce(p.bearer, l.bearer) as "proposedBearer",
       coalesce(p.reasons, '[]') as "proposedReasons",
       coalesce(p.needs_confirmation, false) as "needsConfirmation", coalesce(p.basis, '') as basis
     from ticket_lines l
     join tickets t on t.shop_id = l.shop_id and t.id = l.ticket_id
     left join lateral (
       select r.bearer, r.reasons, r.needs_confirmation, r.basis from rulings r
       where r.shop_id = l.shop_id and r.visit_id = t.visit_id and r.line_key = l.line_key
         and r.step = 'proposed' order by r.id desc limit 1) p on true
     where l.shop_id = $shopId and l.ticket_id = $ticketId and l.job_id is not null
     order by l.position`,
    { shopId: context.shopId, ticketId },
  );
  return lines.map(
    ({ priceReasons, proposedBearer, proposedReasons, needsConfirmation, ...line }) => ({
      ...line,
      reasons: priceReasons,
      proposal: { bearer: proposedBearer, reasons: proposedReasons, needsConfirmation },
    }),
  );
}
