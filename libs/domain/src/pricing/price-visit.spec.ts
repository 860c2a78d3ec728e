import fc from 'fast-check';
import { type Edition, type NothingFoundRule } from './edition';
import { priceVisit } from './price-visit';
import { sampleEdition, sampleJob, samplePart, sampleVisit } from './sample-visit';
import { type JobToPrice, type PricedLine, PRICE_BASE_MILLI, type VisitToPrice } from './visit';

function lists(visit: VisitToPrice): Record<string, number> {
  return Object.fromEntries(priceVisit(visit).map((line) => [line.lineKey, line.list]));
}

function lineOf(visit: VisitToPrice, key: string): PricedLine {
  const line = priceVisit(visit).find(({ lineKey }) => lineKey === key);
  if (!line) throw new Error(`No line ${key}`);
  return line;
}

describe('a visit to three machines', () => {
  const visit = sampleVisit([
    sampleJob('A-03', { minutes: 18, parts: [samplePart()] }),
    sampleJob('A-01', { minutes: 7, result: 'nothing_found' }),
    sampleJob('A-04', {
      minutes: 27,
      accessMinutes: 12,
      parts: [
        samplePart({ partUseId: 'use-2', partId: 'door-lock', description: 'Door lock' }),
        samplePart({ partUseId: 'use-3', source: 'storeroom', quantityMilli: 2_000 }),
      ],
    }),
  ]);

  it('shares the trip to the cent and the labour to the minute', () => {
    // 52 minutes in steps of 15 are 60: 20.8, 8.1 and 31.2 by time worked.
    expect(lists(visit)).toEqual({
      'job:A-03:trip': 31_67,
      'job:A-03:labour': 42_00,
      'job:A-03:part:use-1': 32_00,
      'job:A-01:trip': 31_67,
      'job:A-01:labour': 16_00,
      'job:A-04:trip': 31_66,
      'job:A-04:labour': 62_00,
      'job:A-04:access': 14_00,
      'job:A-04:part:use-2': 64_00,
      'job:A-04:part:use-3': 0,
    });
  });

  it('says how each figure came about', () => {
    expect(lineOf(visit, 'job:A-03:trip').reasons).toEqual([
      'Trip (everywhere): $95.00, shared over 3 machines',
    ]);
    expect(lineOf(visit, 'job:A-03:labour').reasons).toEqual([
      '18 minutes worked',
      'Billed in steps of 15 minutes: 60 for the visit',
      'This machine’s share by time worked: 21 of 60 minutes',
    ]);
    expect(lineOf(visit, 'job:A-04:part:use-3').reasons).toEqual([
      'From the store’s own storeroom: recorded, not charged',
    ]);
  });

  it('knows what each line cost the shop itself', () => {
    const costs = Object.fromEntries(priceVisit(visit).map((line) => [line.lineKey, line.cost]));
    expect(costs).toMatchObject({
      'job:A-03:trip': 6_67,
      'job:A-01:labour': 4_20,
      'job:A-04:labour': 16_20,
      'job:A-04:access': 7_20,
      'job:A-03:part:use-1': 21_33,
      'job:A-04:part:use-3': 0,
    });
  });
});

describe('labour', () => {
  it.each<[string, Partial<JobToPrice>[], number[]]>([
    ['nothing worked, nothing billed', [{}], []],
    ['the minimum for a short visit', [{ minutes: 10 }], [60_00]],
    ['the minimum once, not for each machine', [{ minutes: 5 }, { minutes: 10 }], [20_00, 40_00]],
    ['a full step as it is', [{ minutes: 45 }], [90_00]],
    ['the next step from a minute over', [{ minutes: 46 }], [120_00]],
    ['after hours at its own rate', [{ minutes: 30, afterHoursMinutes: 30 }], [60_00, 90_00]],
    ['the minimum after hours when nothing else', [{ afterHoursMinutes: 10 }], [90_00]],
    [
      'a shortfall at the normal rate when both',
      [{ minutes: 5, afterHoursMinutes: 15 }],
      [30_00, 45_00],
    ],
  ])('bills %s', (_, jobs, amounts) => {
    const visit = sampleVisit(jobs.map((job, i) => sampleJob(`A-${i}`, job)));
    const labour = priceVisit(visit).filter((line) => line.kind === 'labour');
    expect(labour.map((line) => line.list)).toEqual(amounts);
  });
});

describe('nothing found', () => {
  const test = sampleJob('A-01', { minutes: 20, accessMinutes: 15, result: 'nothing_found' });
  const repair = sampleJob('A-02', { minutes: 45 });

  it.each<[NothingFoundRule, JobToPrice[], Record<string, number>]>([
    [
      'bill_minimum',
      [test],
      { 'job:A-01:trip': 95_00, 'job:A-01:labour': 60_00, 'job:A-01:access': 20_00 },
    ],
    [
      'bill_trip_share_only',
      [test, repair],
      {
        'job:A-01:trip': 47_50,
        'job:A-01:labour': 0,
        'job:A-01:access': 0,
        'job:A-02:labour': 90_00,
      },
    ],
    [
      'free',
      [test, repair],
      {
        'job:A-01:trip': 0,
        'job:A-01:labour': 0,
        'job:A-02:trip': 95_00,
        'job:A-02:labour': 90_00,
      },
    ],
    ['free', [test], { 'job:A-01:trip': 0, 'job:A-01:labour': 0 }],
  ])('%s', (nothingFound, jobs, expected) => {
    expect(lists(sampleVisit(jobs, { edition: { nothingFound } }))).toMatchObject(expected);
  });

  it('bills the minimum also when nobody noted the minutes of testing', () => {
    const untimed = sampleJob('A-01', { result: 'nothing_found' });
    expect(lists(sampleVisit([untimed]))['job:A-01:labour']).toBe(60_00);
  });

  it('never bills a long search beyond the minimum', () => {
    const long = sampleJob('A-01', { minutes: 200, result: 'nothing_found' });
    expect(lists(sampleVisit([long]))['job:A-01:labour']).toBe(60_00);
  });

  it('keeps the tested minutes on a line that is not billed', () => {
    const visit = sampleVisit([test], { edition: { nothingFound: 'bill_trip_share_only' } });
    expect(lineOf(visit, 'job:A-01:labour')).toMatchObject({
      quantityMilli: 20_000,
      unitPrice: 0,
      cost: 12_00,
    });
  });
});

describe('access', () => {
  it.each([
    ['never', 30, 0],
    ['all', 30, 60_00],
    ['beyond_allowance', 30, 50_00],
    ['beyond_allowance', 5, 0],
  ] as const)('%s of %d minutes is %d', (bill, accessMinutes, list) => {
    const job = sampleJob('A-01', { minutes: 30, accessMinutes });
    const edition: Partial<Edition> = { access: { bill, allowanceMinutes: 5 } };
    expect(lists(sampleVisit([job], { edition }))['job:A-01:access']).toBe(list);
  });
});

describe('what a client has agreed on', () => {
  const job = sampleJob('A-01', { minutes: 60, afterHoursMinutes: 60, parts: [samplePart()] });

  it('stands before the price book', () => {
    const overrides = {
      normalPerHour: 100_00,
      afterHoursPerHour: 150_00,
      markupBasisPoints: 2_000,
      tripAmount: 40_00,
    };
    expect(lists(sampleVisit([job], { overrides }))).toEqual({
      'job:A-01:trip': 40_00,
      'job:A-01:labour': 100_00,
      'job:A-01:labour_after_hours': 150_00,
      'job:A-01:part:use-1': 25_60,
    });
  });

  it('takes a discount off every line, and says so', () => {
    const visit = sampleVisit([job], { overrides: { discountBasisPoints: 1_000 } });
    expect(lineOf(visit, 'job:A-01:labour')).toMatchObject({ discount: 12_00, list: 108_00 });
    expect(lineOf(visit, 'job:A-01:trip').reasons).toContain('Less the client’s discount: $9.50');
  });

  it('discounts the trip once, before it is shared', () => {
    const jobs = ['A-01', 'A-02', 'A-03'].map((id) => sampleJob(id, { minutes: 30 }));
    const trips = priceVisit(sampleVisit(jobs, { overrides: { discountBasisPoints: 1_000 } }))
      .filter((line) => line.kind === 'trip')
      .map((line) => line.list);
    expect(trips.reduce((a, b) => a + b, 0)).toBe(85_50);
  });
});

describe('what cannot be priced', () => {
  it.each([
    [sampleJob('A-01', { minutes: -1 })],
    [sampleJob('A-01', { minutes: 1.5 })],
    [sampleJob('A-01', { parts: [samplePart({ quantityMilli: 0 })] })],
    [sampleJob('A-01', { parts: [samplePart({ unitCost: -1 })] })],
  ])('is refused: %j', (job) => {
    expect(() => priceVisit(sampleVisit([job]))).toThrow(RangeError);
  });

  it('a discount beyond the whole is refused', () => {
    const overrides = { discountBasisPoints: 10_001 };
    expect(() => priceVisit(sampleVisit([sampleJob('A-01')], { overrides }))).toThrow(RangeError);
  });

  it('a visit without a machine has no lines', () => {
    expect(priceVisit(sampleVisit([]))).toEqual([]);
  });
});

describe('whatever the visit', () => {
  const jobs = fc.array(
    fc.record({
      minutes: fc.nat(600),
      afterHoursMinutes: fc.nat(600),
      accessMinutes: fc.nat(60),
      result: fc.constantFrom('put_right', 'nothing_found', 'unfinished'),
    }),
    { minLength: 1, maxLength: 12 },
  );
  const rule = fc.constantFrom<NothingFoundRule>('bill_minimum', 'bill_trip_share_only', 'free');

  it('each line is quantity times price less discount, and the trips add up', () => {
    fc.assert(
      fc.property(jobs, rule, fc.nat(10_000), (all, nothingFound, discountBasisPoints) => {
        const visit = sampleVisit(
          all.map((job, i) => sampleJob(`A-${i}`, job as Partial<JobToPrice>)),
          { edition: { nothingFound }, overrides: { discountBasisPoints } },
        );
        const lines = priceVisit(visit);
        for (const line of lines) {
          const exact = (line.unitPrice * line.quantityMilli) / PRICE_BASE_MILLI[line.unit];
          expect(Math.abs(line.list + line.discount - exact)).toBeLessThanOrEqual(0.5);
          expect(line.list).toBeGreaterThanOrEqual(0);
        }
        const trips = lines.filter((line) => line.kind === 'trip');
        const charged = trips.reduce((sum, line) => sum + line.list + line.discount, 0);
        const allFree =
          nothingFound === 'free' && all.every((job) => job.result === 'nothing_found');
        expect(charged).toBe(allFree ? 0 : 95_00);
        expect(trips.reduce((sum, line) => sum + line.cost, 0)).toBe(20_00);
        expect(new Set(lines.map((line) => line.lineKey)).size).toBe(lines.length);
      }),
    );
  });

  it('labour billed is at least what was worked, in whole steps', () => {
    fc.assert(
      fc.property(jobs, (all) => {
        const visit = sampleVisit(
          all.map((job, i) => sampleJob(`A-${i}`, { ...job, result: 'put_right' })),
        );
        const labour = priceVisit(visit).filter((line) => line.kind === 'labour');
        const billed = labour.reduce((sum, line) => sum + line.quantityMilli / 1000, 0);
        const worked = all.reduce((sum, job) => sum + job.minutes + job.afterHoursMinutes, 0);
        expect(billed).toBeGreaterThanOrEqual(worked);
        expect(billed % sampleEdition.labour.incrementMinutes).toBe(0);
      }),
    );
  });
});
