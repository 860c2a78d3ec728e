import {
  type Bearer,
  type JobResult,
  type LineKind,
  type MachineKind,
  type StatedVisit,
} from '@lib/contracts';
import { symptomWord } from '@lib/domain';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { visitWords } from './visit-words';

interface TicketFacts {
  id: string;
  visitId: string;
  number: number;
  date: string;
  net: number;
  tax: number;
  borneByShop: number;
}

interface JobRow {
  ticketId: string;
  jobId: string;
  machineId: string;
  bay: string;
  kind: MachineKind;
  model: string;
  reported: string;
  found: string;
  done: string;
  result: JobResult | null;
  testCoins: number;
  testAmount: number;
}

interface LineRow {
  ticketId: string;
  jobId: string | null;
  kind: LineKind;
  description: string;
  bearer: Bearer;
  list: number;
  charged: number;
}

/** The visits behind some tickets as their statement tells them, in the tickets' order. */
export async function statedVisits(
  context: Pick<Context, 'shopId'>,
  tickets: readonly TicketFacts[],
): Promise<StatedVisit[]> {
  const bind = { shopId: context.shopId, ticketIds: tickets.map((ticket) => ticket.id) };
  const jobs = await rows<JobRow>(
    `select t.id as "ticketId", j.id as "jobId", j.machine_id as "machineId", m.bay, m.kind,
       trim(m.make || ' ' || m.model) as model, j.symptom as reported, j.finding as found,
       j.action as done, j.result, j.test_coins as "testCoins", j.test_amount as "testAmount"
     from tickets t
     join jobs j on j.shop_id = t.shop_id and j.visit_id = t.visit_id
     join machines m on m.shop_id = j.shop_id and m.id = j.machine_id
     where t.shop_id = $shopId and t.id = any ($ticketIds::uuid[])
     order by j.position`,
    bind,
  );
  const lines = await rows<LineRow>(
    `select ticket_id as "ticketId", job_id as "jobId", kind, description, bearer, list, charged
     from ticket_lines
     where shop_id = $shopId and ticket_id = any ($ticketIds::uuid[])
     order by position`,
    bind,
  );
  const jobsOf = byTicket(jobs);
  const linesOf = byTicket(lines);
  return tickets.map((ticket) =>
    statedVisit(ticket, jobsOf.get(ticket.id) ?? [], linesOf.get(ticket.id) ?? []),
  );
}

function byTicket<Row extends { ticketId: string }>(all: readonly Row[]): Map<string, Row[]> {
  const found = new Map<string, Row[]>();
  for (const each of all) {
    const others = found.get(each.ticketId);
    if (others) others.push(each);
    else found.set(each.ticketId, [each]);
  }
  return found;
}

function statedVisit(ticket: TicketFacts, ofVisit: JobRow[], ofTicket: LineRow[]): StatedVisit {
  return {
    ticketId: ticket.id,
    ticketNumber: ticket.number,
    visitId: ticket.visitId,
    date: ticket.date,
    words: visitWords(ofVisit),
    charged: ticket.net,
    tax: ticket.tax,
    borneByShop: ticket.borneByShop,
    lines: ofTicket.filter((line) => line.jobId === null).map(shown),
    jobs: ofVisit.map(({ ticketId: _, ...job }) => {
      const ofJob = ofTicket.filter((line) => line.jobId === job.jobId);
      const borne = ofJob.filter(({ bearer }) => bearer === 'shop' || bearer === 'goodwill');
      return {
        ...job,
        reported: symptomWord(job.reported),
        borneByShop: borne.reduce((sum, line) => sum + line.list, 0),
        lines: ofJob.map(shown),
      };
    }),
  };
}

function shown({
  kind,
  description,
  bearer,
  list,
  charged,
}: LineRow): StatedVisit['lines'][number] {
  return { kind, description, bearer, list, charged };
}
