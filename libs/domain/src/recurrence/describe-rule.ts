import { type IsoDate, plainDate } from '../calendar/iso';
import {
  dayNames,
  frequencyNames,
  joined,
  monthNames,
  ordinal,
  positionWords,
} from './describe-words';
import { type ByDay, type RuleParts, parseRule, weekdays } from './rule-parts';

/**
 * A rule in plain English: `every 3 months on the first Friday`.
 * Written here because the recurrence library words days counted from the end wrongly.
 *
 * @param start when given, what the rule leaves to it is said too: `every month on the 10th`
 * @throws RuleError for a malformed rule
 */
export function describeRule(rule: string, start?: IsoDate): string {
  const parts = start === undefined ? parseRule(rule) : completed(parseRule(rule), start);
  const words = [everyPeriod(parts), weeks(parts), days(parts), months(parts), times(parts)];
  return words.filter((each) => each !== '').join(' ') + picked(parts) + end(parts);
}

/** Adds what RFC 5545 takes from DTSTART: the day within the period. */
function completed(parts: RuleParts, start: IsoDate): RuleParts {
  const { day, month, dayOfWeek } = plainDate(start);
  const { frequency, byDay, numbers } = parts;
  const namesDay =
    byDay.length + numbers.BYMONTHDAY.length + numbers.BYYEARDAY.length + numbers.BYSETPOS.length >
    0;
  const weekday = weekdays[dayOfWeek - 1] ?? 'MO';
  const onWeekday: ByDay[] = [{ day: weekday, nth: 0 }];
  if (namesDay) return parts;
  if (frequency === 'WEEKLY' || numbers.BYWEEKNO.length > 0) return { ...parts, byDay: onWeekday };
  if (frequency === 'MONTHLY') return { ...parts, numbers: { ...numbers, BYMONTHDAY: [day] } };
  if (frequency !== 'YEARLY') return parts;
  const BYMONTH = numbers.BYMONTH.length > 0 ? numbers.BYMONTH : [month];
  return { ...parts, numbers: { ...numbers, BYMONTH, BYMONTHDAY: [day] } };
}

function everyPeriod({ frequency, interval }: RuleParts): string {
  const name = frequencyNames[frequency];
  return interval === 1 ? `every ${name}` : `every ${interval} ${name}s`;
}

function weeks({ numbers }: RuleParts): string {
  if (numbers.BYWEEKNO.length === 0) return '';
  const named = numbers.BYWEEKNO.map((week) =>
    week > 0 ? `week ${week}` : `the ${positionWords(week)} week`,
  );
  return `in ${joined(named)}`;
}

function days({ frequency, byDay, numbers }: RuleParts): string {
  const ofMonth = numbers.BYMONTHDAY.map((day) =>
    day > 0 ? `the ${ordinal(day)}` : `the ${positionWords(day)} day`,
  );
  const ofYear = numbers.BYYEARDAY.map((day) =>
    day > 0 ? `day ${day} of the year` : `the ${positionWords(day)} day of the year`,
  );
  const dates = [...ofMonth, ...ofYear];
  if (dates.length === 0) return byDay.length === 0 ? '' : `on ${weekdayWords(byDay)}`;
  // A day of the week beside a date narrows it: Friday the 13th.
  const narrowed = byDay.length > 0 ? ` if that is ${weekdayWords(byDay, true)}` : '';
  const period = ofMonth.length > 0 && frequency === 'YEARLY' && numbers.BYMONTH.length === 0;
  return `on ${joined(dates)}${period ? ' of every month' : ''}${narrowed}`;
}

function weekdayWords(byDay: ByDay[], alternatives = false): string {
  const plain = byDay.every(({ nth }) => nth === 0);
  const codes = byDay.map(({ day }) => day);
  const workingDays = codes.length === 5 && !codes.includes('SA') && !codes.includes('SU');
  if (plain && workingDays && new Set(codes).size === 5) {
    return alternatives ? 'a day from Monday to Friday' : 'Monday to Friday';
  }
  const named = byDay.map(({ day, nth }) =>
    nth === 0
      ? `${alternatives ? 'a ' : ''}${dayNames[day]}`
      : `the ${positionWords(nth)} ${dayNames[day]}`,
  );
  return joined(named, alternatives ? 'or' : 'and');
}

function months({ numbers }: RuleParts): string {
  if (numbers.BYMONTH.length === 0) return '';
  return `in ${joined(numbers.BYMONTH.map((month) => monthNames[month - 1] ?? ''))}`;
}

function times({ numbers }: RuleParts): string {
  const { BYHOUR, BYMINUTE, BYSECOND } = numbers;
  const listed = [
    ['hour', BYHOUR],
    ['minute', BYMINUTE],
    ['second', BYSECOND],
  ] as const;
  return listed
    .filter(([, values]) => values.length > 0)
    .map(
      ([unit, values]) => `at ${unit}${values.length > 1 ? 's' : ''} ${joined(values.map(String))}`,
    )
    .join(', ');
}

function picked({ numbers }: RuleParts): string {
  if (numbers.BYSETPOS.length === 0) return '';
  return `, only the ${joined(numbers.BYSETPOS.map(positionWords))} of these`;
}

function end({ count, until }: RuleParts): string {
  if (count !== undefined) return count === 1 ? ', once' : `, ${count} times`;
  if (until === undefined) return '';
  const month = monthNames[Number(until.slice(4, 6)) - 1] ?? '';
  return `, until ${Number(until.slice(6, 8))} ${month} ${until.slice(0, 4)}`;
}
