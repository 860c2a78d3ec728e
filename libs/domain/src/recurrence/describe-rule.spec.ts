import { describeRule } from './describe-rule';

describe('a rule in words', () => {
  it.each([
    ['FREQ=WEEKLY', 'every week'],
    ['FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TH', 'every 2 weeks on Monday and Thursday'],
    ['FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR', 'every week on Monday to Friday'],
    ['FREQ=MONTHLY;BYDAY=1FR', 'every month on the first Friday'],
    ['FREQ=MONTHLY;COUNT=6;BYDAY=-2MO', 'every month on the second-to-last Monday, 6 times'],
    ['FREQ=MONTHLY;BYMONTHDAY=-3', 'every month on the third-to-last day'],
    ['FREQ=MONTHLY;INTERVAL=3;BYMONTHDAY=1,-1', 'every 3 months on the 1st and the last day'],
    ['FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13', 'every month on the 13th if that is a Friday'],
    [
      'FREQ=MONTHLY;BYDAY=TU,WE,TH;BYSETPOS=3',
      'every month on Tuesday, Wednesday and Thursday, only the third of these',
    ],
    [
      'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-1',
      'every month on Monday to Friday, only the last of these',
    ],
    ['FREQ=YEARLY;INTERVAL=2;BYMONTH=1,2,3', 'every 2 years in January, February and March'],
    ['FREQ=YEARLY;BYDAY=20MO', 'every year on the 20th Monday'],
    ['FREQ=YEARLY;BYMONTHDAY=15', 'every year on the 15th of every month'],
    ['FREQ=YEARLY;BYWEEKNO=20,-1;BYDAY=MO', 'every year in week 20 and the last week on Monday'],
    [
      'FREQ=YEARLY;BYYEARDAY=100,-1',
      'every year on day 100 of the year and the last day of the year',
    ],
    ['FREQ=DAILY;UNTIL=19971224T000000Z', 'every day, until 24 December 1997'],
    ['FREQ=DAILY;COUNT=1', 'every day, once'],
    ['FREQ=DAILY;BYHOUR=9,10;BYMINUTE=0', 'every day at hours 9 and 10, at minute 0'],
  ])('says %s', (rule, words) => {
    expect(describeRule(rule)).toBe(words);
  });

  it.each([
    ['FREQ=WEEKLY', 'every week on Tuesday'],
    ['FREQ=MONTHLY;INTERVAL=6', 'every 6 months on the 2nd'],
    ['FREQ=YEARLY', 'every year on the 2nd in September'],
    ['FREQ=YEARLY;BYMONTH=3,6', 'every year on the 2nd in March and June'],
    ['FREQ=YEARLY;BYWEEKNO=20', 'every year in week 20 on Tuesday'],
    ['FREQ=MONTHLY;BYDAY=1FR', 'every month on the first Friday'],
    ['FREQ=DAILY', 'every day'],
  ])('says of %s what it leaves to its start', (rule, words) => {
    expect(describeRule(rule, '1997-09-02')).toBe(words);
  });
});
