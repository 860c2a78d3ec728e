import { type Frequency, type Weekday } from './rule-parts';

export const frequencyNames: Record<Frequency, string> = {
  SECONDLY: 'second',
  MINUTELY: 'minute',
  HOURLY: 'hour',
  DAILY: 'day',
  WEEKLY: 'week',
  MONTHLY: 'month',
  YEARLY: 'year',
};

export const dayNames: Record<Weekday, string> = {
  MO: 'Monday',
  TU: 'Tuesday',
  WE: 'Wednesday',
  TH: 'Thursday',
  FR: 'Friday',
  SA: 'Saturday',
  SU: 'Sunday',
};

export const monthNames: readonly string[] = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

const smallPositions = ['first', 'second', 'third', 'fourth', 'fifth'];

/** `first`, `20th`, and from the end `last`, `second-to-last`. @param position not zero */
export function positionWords(position: number): string {
  const size = Math.abs(position);
  const words = smallPositions[size - 1] ?? ordinal(size);
  if (position > 0) return words;
  return size === 1 ? 'last' : `${words}-to-last`;
}

/** `1st`, `2nd`, `11th`, `23rd`. */
export function ordinal(value: number): string {
  const teens = value % 100 >= 11 && value % 100 <= 13;
  const endings: Record<number, string> = { 1: 'st', 2: 'nd', 3: 'rd' };
  return `${value}${teens ? 'th' : (endings[value % 10] ?? 'th')}`;
}

/** `a`, `a and b`, `a, b and c`. */
export function joined(words: readonly string[], conjunction: 'and' | 'or' = 'and'): string {
  const last = words.at(-1) ?? '';
  if (words.length < 2) return last;
  return `${words.slice(0, -1).join(', ')} ${conjunction} ${last}`;
}
