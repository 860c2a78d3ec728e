import { addDays } from '../calendar/trade-day';
import { type RecurrenceStart, occurrences } from './occurrences';
import { type RuleParts, RuleError, parseRule } from './rule-parts';

export type RuleVerdict = { valid: true } | { valid: false; problem: string };

/** Within this time a rule must name a day: 29 Februaries are 8 years apart at most. */
const horizonDays = 40 * 366;

/**
 * Whether a rule can govern maintenance rounds: well-formed by RFC 5545, daily at most, without
 * times of day (a visit is planned onto a day), and, when the start is given, with at least one
 * round in it.
 *
 * @param start first day the contract could have a round
 * @returns the problem in words for whoever wrote the rule
 */
export function validateRule(text: string, start?: Pick<RecurrenceStart, 'date'>): RuleVerdict {
  try {
    refuseWithinDay(parseRule(text));
    if (start && !everOccurs(text, start)) {
      throw new RuleError(`The rule names no day that ever comes after ${start.date}`);
    }
    return { valid: true };
  } catch (error) {
    if (error instanceof RuleError) return { valid: false, problem: error.message };
    throw error;
  }
}

function refuseWithinDay({ frequency, numbers }: RuleParts): void {
  if (frequency === 'HOURLY' || frequency === 'MINUTELY' || frequency === 'SECONDLY') {
    throw new RuleError(`Rounds come daily at most, not ${frequency}`);
  }
  if (numbers.BYHOUR.length + numbers.BYMINUTE.length + numbers.BYSECOND.length > 0) {
    throw new RuleError('Rounds are planned by day: leave out BYHOUR, BYMINUTE and BYSECOND');
  }
}

function everOccurs(text: string, { date }: Pick<RecurrenceStart, 'date'>): boolean {
  const window = { from: date, to: addDays(date, horizonDays), limit: 1 };
  return occurrences(text, { date }, 'UTC', window).length > 0;
}
