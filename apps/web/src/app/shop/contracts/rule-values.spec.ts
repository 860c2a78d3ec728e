import { ruleOf, usualRule, valuesOf } from './rule-values';

describe('rules of the form', () => {
  it.each([
    'FREQ=MONTHLY;BYDAY=1FR',
    'FREQ=MONTHLY;INTERVAL=3;BYDAY=-1MO',
    'FREQ=MONTHLY;INTERVAL=6;BYMONTHDAY=15',
    'FREQ=MONTHLY;BYMONTHDAY=-1',
    'FREQ=WEEKLY;BYDAY=TU',
    'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TH',
    'FREQ=YEARLY;BYMONTH=1,7;BYDAY=2WE',
    'FREQ=MONTHLY;BYMONTHDAY=31',
    'FREQ=MONTHLY;COUNT=10;BYDAY=1FR',
  ])('come back as they were: %s', (rule) => {
    expect(ruleOf(valuesOf(rule))).toBe(rule);
  });

  it('are in words where the form has words for them, else by hand', () => {
    expect(valuesOf('RRULE:FREQ=MONTHLY;INTERVAL=3;BYDAY=2WE')).toMatchObject({
      pattern: 'weekday_of_month',
      every: 3,
      nth: '2',
      weekday: 'WE',
    });
    expect(valuesOf('FREQ=MONTHLY;BYMONTHDAY=31').pattern).toBe('own');
    expect(valuesOf('FREQ=DAILY;INTERVAL=45')).toMatchObject({
      pattern: 'own',
      own: 'FREQ=DAILY;INTERVAL=45',
    });
  });

  it('are empty while too little is said', () => {
    expect(ruleOf({ ...usualRule, every: null })).toBe('');
    expect(ruleOf({ ...usualRule, pattern: 'weeks', weekdays: [] })).toBe('');
    expect(ruleOf({ ...usualRule, pattern: 'own', own: ' freq=daily ' })).toBe('FREQ=DAILY');
  });
});
