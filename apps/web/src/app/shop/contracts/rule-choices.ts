import { type Choice } from '@lib/ui';
import { type RuleValues } from './rule-values';

export const patterns: readonly Choice<RuleValues['pattern']>[] = [
  { value: 'weekday_of_month', label: 'A weekday of the month' },
  { value: 'day_of_month', label: 'A date of the month' },
  { value: 'weeks', label: 'Every few weeks' },
  { value: 'own', label: 'Another rule' },
];

export const positions: readonly Choice[] = [
  { value: '1', label: 'First' },
  { value: '2', label: 'Second' },
  { value: '3', label: 'Third' },
  { value: '4', label: 'Fourth' },
  { value: '-1', label: 'Last' },
];

export const weekdays: readonly Choice[] = [
  { value: 'MO', label: 'Monday' },
  { value: 'TU', label: 'Tuesday' },
  { value: 'WE', label: 'Wednesday' },
  { value: 'TH', label: 'Thursday' },
  { value: 'FR', label: 'Friday' },
  { value: 'SA', label: 'Saturday' },
  { value: 'SU', label: 'Sunday' },
];

/** Dates every month has; later ones would leave months out. */
export const monthDays: readonly Choice[] = [
  ...Array.from({ length: 28 }, (_, at) => ({ value: String(at + 1), label: String(at + 1) })),
  { value: '-1', label: 'Last day' },
];
