import { addDays, occurrences, shiftForHolidays } from '@lib/domain';
import { closedOn, type Closures } from './closures';

export interface RoundDay {
  /** The day the rule gives. */
  dueOn: string;
  /** The day it is planned on: another when the shop is closed on that one. */
  plannedOn: string;
}

export interface RoundRule {
  rule: string;
  startsOn: string;
  endsOn: string | null;
  shift: 'next' | 'previous' | 'none';
}

/** Rounds of a contract whose day by the rule lies in a span, both ends included. */
export function roundsBetween(
  contract: RoundRule,
  closures: Closures,
  span: { from: string; to: string; limit: number },
): RoundDay[] {
  const to = contract.endsOn && contract.endsOn < span.to ? contract.endsOn : span.to;
  if (to < span.from) return [];
  const closed = closedOn(closures);
  // Rounds are about whole days, which are the same in every zone.
  const window = { from: span.from, to, limit: span.limit };
  return occurrences(contract.rule, { date: contract.startsOn }, 'UTC', window).map(({ date }) => ({
    dueOn: date,
    plannedOn: shiftForHolidays(date, closed, contract.shift),
  }));
}

/** The next rounds from a day on, as far ahead as a yearly rule needs. */
export function nextRounds(
  contract: RoundRule,
  closures: Closures,
  from: string,
  limit = 5,
): RoundDay[] {
  return roundsBetween(contract, closures, { from, to: addDays(from, 6 * 366), limit });
}
