/**
 * Source: RFC 5545, 3.8.5.3, the standard's own examples in America/New_York, at 09:00.
 * The number of occurrences of those that end agrees with libical, test-data/recur.txt.
 */
import { occurrences } from '@lib/domain';

const newYork = 'America/New_York';

/** `1997-09-05 10-03` reads as two days of 1997. */
function daysOf(text: string): string[] {
  let year = '';
  return text.split(/[\s,]+/).map((word) => {
    if (word.length === 10) year = word.slice(0, 4);
    return word.length === 10 ? word : `${year}-${word}`;
  });
}

function found(rule: string, date: string, limit: number, zone = newYork) {
  return occurrences(rule, { date, time: '09:00' }, zone, { from: date, to: '2050-12-31', limit });
}

describe('RFC 5545, 3.8.5.3: rules that end give exactly these days', () => {
  it.each([
    [
      'FREQ=DAILY;COUNT=10',
      '1997-09-02',
      '1997-09-02 09-03 09-04 09-05 09-06 09-07 09-08 09-09 09-10 09-11',
    ],
    ['FREQ=DAILY;INTERVAL=10;COUNT=5', '1997-09-02', '1997-09-02 09-12 09-22 10-02 10-12'],
    [
      'FREQ=WEEKLY;COUNT=10',
      '1997-09-02',
      '1997-09-02 09-09 09-16 09-23 09-30 10-07 10-14 10-21 10-28 11-04',
    ],
    [
      'FREQ=WEEKLY;UNTIL=19971224T000000Z',
      '1997-09-02',
      '1997-09-02 09-09 09-16 09-23 09-30 10-07 10-14 10-21 10-28 11-04 11-11 11-18 11-25 12-02 12-09 12-16 12-23',
    ],
    [
      'FREQ=WEEKLY;UNTIL=19971007T000000Z;WKST=SU;BYDAY=TU,TH',
      '1997-09-02',
      '1997-09-02 09-04 09-09 09-11 09-16 09-18 09-23 09-25 09-30 10-02',
    ],
    [
      'FREQ=WEEKLY;INTERVAL=2;UNTIL=19971224T000000Z;WKST=SU;BYDAY=MO,WE,FR',
      '1997-09-01',
      '1997-09-01 09-03 09-05 09-15 09-17 09-19 09-29 10-01 10-03 10-13 10-15 10-17 10-27 10-29 10-31 11-10 11-12 11-14 11-24 11-26 11-28 12-08 12-10 12-12 12-22',
    ],
    [
      'FREQ=WEEKLY;INTERVAL=2;COUNT=8;WKST=SU;BYDAY=TU,TH',
      '1997-09-02',
      '1997-09-02 09-04 09-16 09-18 09-30 10-02 10-14 10-16',
    ],
    [
      'FREQ=MONTHLY;COUNT=10;BYDAY=1FR',
      '1997-09-05',
      '1997-09-05 10-03 11-07 12-05 1998-01-02 02-06 03-06 04-03 05-01 06-05',
    ],
    ['FREQ=MONTHLY;UNTIL=19971224T000000Z;BYDAY=1FR', '1997-09-05', '1997-09-05 10-03 11-07 12-05'],
    [
      'FREQ=MONTHLY;INTERVAL=2;COUNT=10;BYDAY=1SU,-1SU',
      '1997-09-07',
      '1997-09-07 09-28 11-02 11-30 1998-01-04 01-25 03-01 03-29 05-03 05-31',
    ],
    [
      'FREQ=MONTHLY;COUNT=6;BYDAY=-2MO',
      '1997-09-22',
      '1997-09-22 10-20 11-17 12-22 1998-01-19 02-16',
    ],
    [
      'FREQ=MONTHLY;COUNT=10;BYMONTHDAY=2,15',
      '1997-09-02',
      '1997-09-02 09-15 10-02 10-15 11-02 11-15 12-02 12-15 1998-01-02 01-15',
    ],
    [
      'FREQ=MONTHLY;COUNT=10;BYMONTHDAY=1,-1',
      '1997-09-30',
      '1997-09-30 10-01 10-31 11-01 11-30 12-01 12-31 1998-01-01 01-31 02-01',
    ],
    [
      'FREQ=MONTHLY;INTERVAL=18;COUNT=10;BYMONTHDAY=10,11,12,13,14,15',
      '1997-09-10',
      '1997-09-10 09-11 09-12 09-13 09-14 09-15 1999-03-10 03-11 03-12 03-13',
    ],
    [
      'FREQ=YEARLY;COUNT=10;BYMONTH=6,7',
      '1997-06-10',
      '1997-06-10 07-10 1998-06-10 07-10 1999-06-10 07-10 2000-06-10 07-10 2001-06-10 07-10',
    ],
    [
      'FREQ=YEARLY;INTERVAL=2;COUNT=10;BYMONTH=1,2,3',
      '1997-03-10',
      '1997-03-10 1999-01-10 02-10 03-10 2001-01-10 02-10 03-10 2003-01-10 02-10 03-10',
    ],
    [
      'FREQ=YEARLY;INTERVAL=3;COUNT=10;BYYEARDAY=1,100,200',
      '1997-01-01',
      '1997-01-01 04-10 07-19 2000-01-01 04-09 07-18 2003-01-01 04-10 07-19 2006-01-01',
    ],
    ['FREQ=MONTHLY;COUNT=3;BYDAY=TU,WE,TH;BYSETPOS=3', '1997-09-04', '1997-09-04 10-07 11-06'],
    [
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=MO',
      '1997-08-05',
      '1997-08-05 08-10 08-19 08-24',
    ],
    [
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=SU',
      '1997-08-05',
      '1997-08-05 08-17 08-19 08-31',
    ],
    ['FREQ=MONTHLY;BYMONTHDAY=15,30;COUNT=5', '2007-01-15', '2007-01-15 01-30 02-15 03-15 03-30'],
  ])('%s from %s', (rule, start, days) => {
    expect(found(rule, start, 1_000).map(({ date }) => date)).toEqual(daysOf(days));
  });

  it.each([
    ['FREQ=YEARLY;UNTIL=20000131T140000Z;BYMONTH=1;BYDAY=SU,MO,TU,WE,TH,FR,SA', '1998-01-01', 93],
    ['FREQ=DAILY;UNTIL=20000131T140000Z;BYMONTH=1', '1998-01-01', 93],
    ['FREQ=DAILY;UNTIL=19971224T000000Z', '1997-09-02', 113],
  ])('%s from %s comes so many times', (rule, start, times) => {
    expect(found(rule, start, 1_000)).toHaveLength(times);
  });
});

describe('RFC 5545, 3.8.5.3: endless rules begin with these days', () => {
  it.each([
    ['FREQ=DAILY;INTERVAL=2', '1997-09-02', '1997-09-02 09-04 09-06 09-08 09-10'],
    [
      'FREQ=WEEKLY;INTERVAL=2;WKST=SU',
      '1997-09-02',
      '1997-09-02 09-16 09-30 10-14 10-28 11-11 11-25 12-09 12-23 1998-01-06 01-20 02-03',
    ],
    ['FREQ=MONTHLY;BYMONTHDAY=-3', '1997-09-28', '1997-09-28 10-29 11-28 12-29 1998-01-29 02-26'],
    [
      'FREQ=MONTHLY;INTERVAL=2;BYDAY=TU',
      '1997-09-02',
      '1997-09-02 09-09 09-16 09-23 09-30 11-04 11-11 11-18 11-25 1998-01-06 01-13 01-20 01-27 03-03 03-10 03-17 03-24 03-31',
    ],
    ['FREQ=YEARLY;BYDAY=20MO', '1997-05-19', '1997-05-19 1998-05-18 1999-05-17'],
    ['FREQ=YEARLY;BYWEEKNO=20;BYDAY=MO', '1997-05-12', '1997-05-12 1998-05-11 1999-05-17'],
    [
      'FREQ=YEARLY;BYMONTH=3;BYDAY=TH',
      '1997-03-13',
      '1997-03-13 03-20 03-27 1998-03-05 03-12 03-19 03-26 1999-03-04 03-11 03-18 03-25',
    ],
    [
      'FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13',
      '1997-09-02',
      '1998-02-13 03-13 11-13 1999-08-13 2000-10-13',
    ],
    [
      'FREQ=MONTHLY;BYDAY=SA;BYMONTHDAY=7,8,9,10,11,12,13',
      '1997-09-13',
      '1997-09-13 10-11 11-08 12-13 1998-01-10 02-07 03-07 04-11 05-09 06-13',
    ],
    [
      'FREQ=YEARLY;INTERVAL=4;BYMONTH=11;BYDAY=TU;BYMONTHDAY=2,3,4,5,6,7,8',
      '1996-11-05',
      '1996-11-05 2000-11-07 2004-11-02',
    ],
    [
      'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2',
      '1997-09-29',
      '1997-09-29 10-30 11-27 12-30 1998-01-29 02-26 03-30',
    ],
  ])('%s from %s', (rule, start, days) => {
    const expected = daysOf(days);
    expect(found(rule, start, expected.length).map(({ date }) => date)).toEqual(expected);
  });

  it('skips years without a 29 February, and 1900-like century years', () => {
    expect(found('FREQ=YEARLY', '1996-02-29', 4).map(({ date }) => date)).toEqual(
      daysOf('1996-02-29 2000-02-29 2004-02-29 2008-02-29'),
    );
    const window = { from: '2096-01-01', to: '2104-12-31', limit: 9 };
    expect(
      occurrences('FREQ=YEARLY', { date: '2096-02-29' }, newYork, window).map(({ date }) => date),
    ).toEqual(['2096-02-29', '2104-02-29']);
  });
});

describe('RFC 5545, 3.8.5.3: times of day', () => {
  it('stays at 09:00 on the wall when daylight time ends: UTC-4, then UTC-5', () => {
    const at = found('FREQ=WEEKLY;COUNT=10', '1997-09-02', 10).map((each) => each.at);
    expect(at.filter((instant) => instant.endsWith('T13:00:00.000Z'))).toHaveLength(8);
    expect(at.slice(7, 9)).toEqual(['1997-10-21T13:00:00.000Z', '1997-10-28T14:00:00.000Z']);
  });

  it('reads UNTIL as an instant: every three hours from 9 to 5 of one day', () => {
    const at = found('FREQ=HOURLY;INTERVAL=3;UNTIL=19970902T210000Z', '1997-09-02', 10);
    expect(at.map((each) => each.at.slice(11, 16))).toEqual(['13:00', '16:00', '19:00']);
  });

  it('steps by minutes', () => {
    const minutes = (rule: string) =>
      found(rule, '1997-09-02', 100)
        .map((each) => each.at.slice(11, 16))
        .join(' ');
    expect(minutes('FREQ=MINUTELY;INTERVAL=15;COUNT=6')).toBe(
      '13:00 13:15 13:30 13:45 14:00 14:15',
    );
    expect(minutes('FREQ=MINUTELY;INTERVAL=90;COUNT=4')).toBe('13:00 14:30 16:00 17:30');
  });

  it('expands a day by hours and minutes: every twenty minutes from 9:00 to 16:40', () => {
    const byDay = 'FREQ=DAILY;BYHOUR=9,10,11,12,13,14,15,16;BYMINUTE=0,20,40';
    const byMinute = 'FREQ=MINUTELY;INTERVAL=20;BYHOUR=9,10,11,12,13,14,15,16';
    const first = found(byDay, '1997-09-02', 48).map((each) => each.at);
    expect(first.slice(0, 3).map((at) => at.slice(11, 16))).toEqual(['13:00', '13:20', '13:40']);
    expect(first[23]).toBe('1997-09-02T20:40:00.000Z');
    expect(first[24]).toBe('1997-09-03T13:00:00.000Z');
    expect(found(byMinute, '1997-09-02', 48).map((each) => each.at)).toEqual(first);
  });
});
