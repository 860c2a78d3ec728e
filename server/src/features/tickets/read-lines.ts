import { type Bearer, type Cause, type JobResult, type MachineKind } from '@lib/contracts';
import { addUp, type Reason } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type AnswerOf } from '../../core/http/route';

type Shown = AnswerOf<'tickets.show'>;
export type ShownTicketJob = Shown['jobs'][number];
type ShownLine = ShownTicketJob['lines'][number];

interface LineRow extends Omit<ShownLine, 'shop'> {
  cost: number;
  reasons: Reason[];
  decision: { by: string; why: string } | null;
}

export async function linesOfTicket(context: Context, ticketId: string): Promise<ShownLine[]> {
  const lines = await rows<LineRow>(
    `select position, job_id as "jobId", line_key as "lineKey", kind, description, unit,
       quantity_milli as "quantityMilli", unit_price as "unitPrice", discount, bearer, list,
       charged, tax_basis_points as "taxBasisPoints", tax, price_reasons as "priceReasons", cost,
       reasons, decision
     from ticket_lines where shop_id = $shopId and ticket_id = $ticketId order by position`,
    { shopId: context.shopId, ticketId },
  );
  return lines.map(({ cost, reasons, decision, ...line }) => ({
    ...line,
    shop: context.clientId === null ? { cost, decision, reasons: reasons.map(shownReason) } : null,
  }));
}

export function shownReason({ code, words, decides }: Reason) {
  return { code, words, decides };
}

/** The jobs of a ticket's visit, each with its lines. */
export async function jobsOfTicket(
  context: Context,
  visitId: string,
  lines: readonly ShownLine[],
): Promise<ShownTicketJob[]> {
  const jobs = await rows<{
    jobId: string;
    position: number;
    machineId: string;
    bay: string;
    kind: MachineKind;
    make: string;
    model: string;
    finding: string;
    cause: Cause | null;
    action: string;
    result: JobResult | null;
  }>(
    `select j.id as "jobId", j.position, m.id as "machineId", m.bay, m.kind, m.make, m.model,
       j.finding, j.cause, j.action, j.result
     from jobs j join machines m on m.shop_id = j.shop_id and m.id = j.machine_id
     where j.shop_id = $shopId and j.visit_id = $visitId order by j.position`,
    { shopId: context.shopId, visitId },
  );
  return jobs.map(({ machineId, bay, kind, make, model, ...job }) => ({
    ...job,
    machine: { id: machineId, bay, kind, make, model },
    lines: lines.filter((line) => line.jobId === job.jobId),
  }));
}

/** List value by who bears it, other than the store. */
export function absorbedOf(lines: readonly { bearer: Bearer; list: number }[]) {
  const of = (bearer: Bearer) =>
    addUp(lines.filter((line) => line.bearer === bearer).map((line) => line.list));
  return {
    shop: of('shop'),
    supplier: of('supplier'),
    contract: of('contract'),
    goodwill: of('goodwill'),
  };
}
