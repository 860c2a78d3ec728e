/** FREQ of RFC 5545, from the shortest period to the longest. */
export const frequencies = [
  'SECONDLY',
  'MINUTELY',
  'HOURLY',
  'DAILY',
  'WEEKLY',
  'MONTHLY',
  'YEARLY',
] as const;
export type Frequency = (typeof frequencies)[number];

export const weekdays = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const;
export type Weekday = (typeof weekdays)[number];

/** `{ day: 'FR', nth: 1 }` is the first Friday of its period, `nth: 0` every Friday. */
export interface ByDay {
  day: Weekday;
  nth: number;
}

const numberLists = {
  BYSECOND: { least: 0, most: 60, negative: false },
  BYMINUTE: { least: 0, most: 59, negative: false },
  BYHOUR: { least: 0, most: 23, negative: false },
  BYMONTH: { least: 1, most: 12, negative: false },
  BYMONTHDAY: { least: 1, most: 31, negative: true },
  BYYEARDAY: { least: 1, most: 366, negative: true },
  BYWEEKNO: { least: 1, most: 53, negative: true },
  BYSETPOS: { least: 1, most: 366, negative: true },
} as const;
export type NumberList = keyof typeof numberLists;

/** A recurrence rule taken apart. Lists that the rule does not name are empty. */
export interface RuleParts {
  frequency: Frequency;
  interval: number;
  count?: number;
  /** As written: `20261231`, or with a time and perhaps Z. */
  until?: string;
  byDay: ByDay[];
  numbers: Record<NumberList, number[]>;
  weekStart: Weekday;
}

/** Says in words what is wrong with a rule; made to be shown to whoever wrote it. */
export class RuleError extends RangeError {
  override readonly name = 'RuleError';
}

/**
 * Takes a rule apart and refuses what the standard does not allow: unknown or repeated parts,
 * numbers out of range, parts that do not go with the frequency.
 *
 * @param text `FREQ=MONTHLY;BYDAY=1FR`, with or without `RRULE:` before it; case does not matter
 * @throws RuleError in words
 * Source: RFC 5545, 3.3.10.
 */
export function parseRule(text: string): RuleParts {
  const given = namedParts(text);
  const frequency = given.get('FREQ');
  if (frequency === undefined) throw new RuleError('A rule needs FREQ, as in FREQ=MONTHLY');
  const numbers = {} as Record<NumberList, number[]>;
  for (const name of Object.keys(numberLists) as NumberList[]) {
    numbers[name] = numberList(name, given.get(name));
  }
  const count = given.get('COUNT');
  const parts: RuleParts = {
    frequency: oneOf('FREQ', frequency, frequencies),
    interval: wholeNumber('INTERVAL', given.get('INTERVAL') ?? '1', 1, 9999),
    count: count === undefined ? undefined : wholeNumber('COUNT', count, 1, 99_999),
    until: untilText(given.get('UNTIL')),
    byDay: given.get('BYDAY')?.split(',').map(byDay) ?? [],
    numbers,
    weekStart: oneOf('WKST', given.get('WKST') ?? 'MO', weekdays),
  };
  refuseWhatDoesNotGoTogether(parts);
  return parts;
}

const knownParts = ['FREQ', 'INTERVAL', 'COUNT', 'UNTIL', 'BYDAY', 'WKST'];

function namedParts(text: string): Map<string, string> {
  const given = new Map<string, string>();
  for (const part of text
    .trim()
    .toUpperCase()
    .replace(/^RRULE:/, '')
    .split(';')) {
    const [name = '', value = '', ...rest] = part.split('=');
    if (value === '' || rest.length > 0) throw new RuleError(`Not NAME=VALUE: "${part}"`);
    if (!knownParts.includes(name) && !(name in numberLists)) {
      throw new RuleError(`A rule has no part ${name}`);
    }
    if (given.has(name)) throw new RuleError(`${name} is given twice`);
    given.set(name, value);
  }
  return given;
}

function oneOf<T extends string>(name: string, value: string, allowed: readonly T[]): T {
  const found = allowed.find((each) => each === value);
  if (!found) throw new RuleError(`${name} is one of ${allowed.join(', ')}, not ${value}`);
  return found;
}

function wholeNumber(name: string, text: string, least: number, most: number): number {
  const value = /^\d{1,6}$/.test(text) ? Number(text) : Number.NaN;
  if (!(value >= least && value <= most)) {
    throw new RuleError(`${name} is a whole number from ${least} to ${most}, not ${text}`);
  }
  return value;
}

function numberList(name: NumberList, text: string | undefined): number[] {
  if (text === undefined) return [];
  const { least, most, negative } = numberLists[name];
  return text.split(',').map((each) => {
    const value = /^[+-]?\d{1,3}$/.test(each) ? Number(each) : Number.NaN;
    const size = negative ? Math.abs(value) : value;
    if (size >= least && size <= most) return value;
    const range = negative ? `${least} to ${most} or -${most} to -${least}` : `${least} to ${most}`;
    throw new RuleError(`${name} holds numbers from ${range}, not ${each}`);
  });
}

function byDay(text: string): ByDay {
  const [, sign = '', digits = '', day] =
    /^([+-]?)(\d{0,2})(MO|TU|WE|TH|FR|SA|SU)$/.exec(text) ?? [];
  const nth = Number(`${sign}${digits || '0'}`);
  const wrong = day === undefined || Math.abs(nth) > 53 || (nth === 0 && (sign || digits));
  if (wrong) throw new RuleError(`BYDAY holds days as MO, 1FR or -1SU, not ${text}`);
  return { day: oneOf('BYDAY', day, weekdays), nth: nth === 0 ? 0 : nth };
}

function untilText(text: string | undefined): string | undefined {
  if (text === undefined) return undefined;
  const [, year, month, day] =
    /^(\d{4})(\d\d)(\d\d)(?:T([01]\d|2[0-3])[0-5]\d[0-5]\dZ?)?$/.exec(text) ?? [];
  const days = new Date(Date.UTC(Number(year), Number(month), 0)).getUTCDate();
  const exists =
    Number(month) >= 1 && Number(month) <= 12 && Number(day) >= 1 && Number(day) <= days;
  if (!exists) throw new RuleError(`UNTIL is a date as 20261231, or 20261231T170000Z, not ${text}`);
  return text;
}

function refuseWhatDoesNotGoTogether({ frequency, count, until, byDay, numbers }: RuleParts): void {
  const refuse = (wrong: boolean, words: string) => {
    if (wrong) throw new RuleError(words);
  };
  const has = (name: NumberList) => numbers[name].length > 0;
  const counted = byDay.some(({ nth }) => nth !== 0);
  refuse(count !== undefined && until !== undefined, 'A rule ends by COUNT or by UNTIL, not both');
  refuse(
    counted && frequency !== 'MONTHLY' && frequency !== 'YEARLY',
    'Days as 1FR or -1SU need FREQ=MONTHLY or FREQ=YEARLY',
  );
  refuse(counted && has('BYWEEKNO'), 'Days as 1FR do not go with BYWEEKNO');
  refuse(has('BYMONTHDAY') && frequency === 'WEEKLY', 'BYMONTHDAY does not go with FREQ=WEEKLY');
  refuse(
    has('BYYEARDAY') && ['DAILY', 'WEEKLY', 'MONTHLY'].includes(frequency),
    `BYYEARDAY does not go with FREQ=${frequency}`,
  );
  refuse(has('BYWEEKNO') && frequency !== 'YEARLY', 'BYWEEKNO needs FREQ=YEARLY');
  const others = (Object.keys(numbers) as NumberList[]).filter((name) => name !== 'BYSETPOS');
  refuse(
    has('BYSETPOS') && byDay.length === 0 && !others.some(has),
    'BYSETPOS picks from days that another part must name',
  );
}
