/** How a rule is written in the form: in words for the common ones, by hand for any other. */
export interface RuleValues {
  readonly pattern: 'weekday_of_month' | 'day_of_month' | 'weeks' | 'own';
  /** Every so many months or weeks. */
  readonly every: number | null;
  /** `1` is the first of the month, `-1` the last. */
  readonly nth: string;
  readonly weekday: string;
  /** `-1` is the last day of the month. */
  readonly monthDay: string;
  readonly weekdays: readonly string[];
  readonly own: string;
}

export const usualRule: RuleValues = {
  pattern: 'weekday_of_month',
  every: 1,
  nth: '1',
  weekday: 'MO',
  monthDay: '1',
  weekdays: ['MO'],
  own: '',
};

const weekday = '(MO|TU|WE|TH|FR|SA|SU)';
const ofMonth = new RegExp(`^FREQ=MONTHLY(?:;INTERVAL=(\\d{1,3}))?;BYDAY=([1-4]|-1)${weekday}$`);
const dayOfMonth = /^FREQ=MONTHLY(?:;INTERVAL=(\d{1,3}))?;BYMONTHDAY=(-1|[1-9]|1\d|2[0-8])$/;
const inWeeks = new RegExp(
  `^FREQ=WEEKLY(?:;INTERVAL=(\\d{1,3}))?;BYDAY=(${weekday}(?:,${weekday})*)$`,
);

/** The recurrence rule (RFC 5545) of what the form says; '' while it says too little. */
export function ruleOf(values: RuleValues): string {
  const { pattern, every, nth, weekday: day, monthDay, weekdays, own } = values;
  if (pattern === 'own') return own.trim().toUpperCase();
  if (!every || every < 1) return '';
  const interval = every > 1 ? `;INTERVAL=${every}` : '';
  if (pattern === 'weekday_of_month') return `FREQ=MONTHLY${interval};BYDAY=${nth}${day}`;
  if (pattern === 'day_of_month') return `FREQ=MONTHLY${interval};BYMONTHDAY=${monthDay}`;
  return weekdays.length ? `FREQ=WEEKLY${interval};BYDAY=${weekdays.join(',')}` : '';
}

/** The form's values for a rule; one the form has no words for is kept as it was written. */
export function valuesOf(rule: string): RuleValues {
  if (!rule) return usualRule;
  const text = rule.toUpperCase().replace(/^RRULE:/, '');
  const onWeekday = ofMonth.exec(text);
  if (onWeekday) {
    const [, every, nth = '1', day = 'MO'] = onWeekday;
    return { ...usualRule, every: Number(every ?? 1), nth, weekday: day };
  }
  const onDay = dayOfMonth.exec(text);
  if (onDay) {
    const [, every, monthDay = '1'] = onDay;
    return { ...usualRule, pattern: 'day_of_month', every: Number(every ?? 1), monthDay };
  }
  const weekly = inWeeks.exec(text);
  if (weekly) {
    const [, every, days = ''] = weekly;
    const weekdays = days.split(',');
    return { ...usualRule, pattern: 'weeks', every: Number(every ?? 1), weekdays };
  }
  return { ...usualRule, pattern: 'own', own: text };
}
