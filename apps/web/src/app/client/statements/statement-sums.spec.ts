import { type StatedVisit, type VisitLine } from './statements-api';
import { monthInWords, sumsOf } from './statement-sums';

function line(facts: Partial<VisitLine>): VisitLine {
  return { kind: 'labour', description: '', bearer: 'store', list: 0, charged: 0, ...facts };
}

type Result = StatedVisit['jobs'][number]['result'];

function visit(...results: Result[]): StatedVisit {
  return {
    ticketId: 't',
    ticketNumber: 1,
    visitId: 'v',
    date: '2031-05-06',
    words: '',
    charged: 0,
    tax: 0,
    borneByShop: 0,
    lines: [],
    jobs: results.map((result, index) => ({
      jobId: `j${index}`,
      machineId: `m${index}`,
      bay: 'A-01',
      kind: 'dryer',
      model: '',
      reported: '',
      found: '',
      done: '',
      result,
      testCoins: 0,
      testAmount: 0,
      borneByShop: 0,
      lines: [],
    })),
  };
}

describe('sumsOf', () => {
  it('adds up what lines are worth and what is charged, and names each bearer once', () => {
    const lines = [
      line({ list: 5220, charged: 5220 }),
      line({ list: 17100, charged: 0, bearer: 'shop' }),
      line({ list: 4380, charged: 4380 }),
    ];
    expect(sumsOf(lines)).toEqual({ list: 26700, charged: 9600, bearers: ['store', 'shop'] });
  });
});

describe('monthInWords', () => {
  it.each([
    [[], 'No visit this month'],
    [
      [visit('put_right', 'replaced'), visit('nothing_found')],
      '2 visits, 2 machines put right, 1 with nothing wrong',
    ],
    [[visit('unfinished')], '1 visit'],
  ])('tells the month', (visits, words) => expect(monthInWords(visits)).toBe(words));
});
