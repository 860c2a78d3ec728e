import { type Bearer } from '@lib/contracts';
import {
  type BilledTicket,
  billTicket,
  type LineToBill,
  type PricedLine,
  type Reason,
} from '@lib/domain';
import { type RuledVisit, standing } from '../rulings/show-rulings';

/** A line as it stands on the ticket, with all that is kept of how it came about. */
export interface TicketLine extends LineToBill, PricedLine {
  kind: PricedLine['kind'];
  list: number;
  cost: number;
  bearer: Bearer;
  rulingReasons: Reason[];
  decision: { by: string; why: string } | null;
}

/** The visit's lines with who bears them, charged and taxed as of the day of the work. */
export function billVisit(ruled: RuledVisit): BilledTicket<TicketLine> {
  const { visit, edition, lines } = ruled;
  return billTicket({
    lines: lines.map((line) => {
      const { bearer, proposed, decision } = standing(ruled, line);
      const { proposal: _, basis: __, ...priced } = line;
      return {
        ...priced,
        bearer,
        rulingReasons: proposed.reasons,
        decision: decision && { by: decision.byName ?? '', why: decision.why },
      };
    }),
    taxRates: edition.book.taxes.rates,
    place: visit.taxPlace,
    on: visit.workedOn,
    exemption: visit.taxExempt ? { from: null, until: null, kinds: null } : null,
    rounding: edition.book.taxes.rounding,
  });
}

/** What keeps a visit's ticket from being signed off, in plain words. */
export function blockers(ruled: RuledVisit): string[] {
  const { visit, jobs, lines } = ruled;
  const without = jobs.filter((job) => job.result === null).map((job) => job.bay);
  const waiting = lines.filter((line) => standing(ruled, line).waiting).length;
  return [
    ...(visit.state === 'completed' ? [] : ['The visit is not completed yet.']),
    ...(jobs.length > 0 ? [] : ['No machine was worked on: there is nothing to bill.']),
    ...(without.length === 0
      ? []
      : [`${without.join(', ')} ${without.length === 1 ? 'has' : 'have'} no result yet.`]),
    ...(waiting === 0
      ? []
      : [`The owner must still decide who bears ${waiting} ${waiting === 1 ? 'line' : 'lines'}.`]),
  ];
}
