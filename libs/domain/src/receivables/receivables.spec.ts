import * as fc from 'fast-check';
import { addDays } from '../calendar/trade-day';
import { type AgeingBucket, ageing, ageingBucket, daysPastDue } from './ageing';
import { allocatePayment } from './allocate-payment';
import { lateCharge, yearFraction } from './late-charge';

describe('ageing', () => {
  it.each<[number, AgeingBucket]>([
    [-1, 'current'],
    [0, 'current'],
    [1, 'days1To30'],
    [30, 'days1To30'],
    [31, 'days31To60'],
    [60, 'days31To60'],
    [61, 'days61To90'],
    [90, 'days61To90'],
    [91, 'over90'],
  ])('puts an item %i days past due under %s', (days, bucket) => {
    expect(ageingBucket('2026-01-31', addDays('2026-01-31', days))).toBe(bucket);
    expect(daysPastDue('2026-01-31', addDays('2026-01-31', days))).toBe(Math.max(0, days));
  });

  it('adds up, credits included', () => {
    const items = [
      { id: 'a', dueOn: '2026-05-01', open: 100 },
      { id: 'b', dueOn: '2026-03-31', open: 250 },
      { id: 'c', dueOn: '2026-03-15', open: -50 },
      { id: 'd', dueOn: '2025-01-01', open: 9 },
    ];
    expect(ageing(items, '2026-04-01')).toEqual({
      current: 100,
      days1To30: 200,
      days31To60: 0,
      days61To90: 0,
      over90: 9,
      total: 309,
    });
  });
});

describe('a payment', () => {
  const items = [
    { id: 'may', dueOn: '2026-05-01', open: 300 },
    { id: 'march', dueOn: '2026-03-01', open: 200 },
    { id: 'paid', dueOn: '2026-02-01', open: 0 },
    { id: 'april-b', dueOn: '2026-04-01', open: 100 },
    { id: 'april-a', dueOn: '2026-04-01', open: 100 },
  ];

  it('settles the oldest debt first and in part where it runs out', () => {
    expect(allocatePayment(items, 350)).toEqual({
      allocations: [
        { id: 'march', amount: 200 },
        { id: 'april-a', amount: 100 },
        { id: 'april-b', amount: 50 },
      ],
      credit: 0,
    });
  });

  it('leaves a credit when all is paid', () => {
    expect(allocatePayment(items, 1000).credit).toBe(300);
    expect(allocatePayment([], 5)).toEqual({ allocations: [], credit: 5 });
    expect(() => allocatePayment(items, 0)).toThrow(/above zero/);
  });

  it('is spent to the cent and never pays an item more than is open', () => {
    const item = fc.record({
      id: fc.uuid(),
      dueOn: fc.integer({ min: 0, max: 400 }).map((days) => addDays('2026-01-01', days)),
      open: fc.nat(50_000),
    });
    const list = fc.uniqueArray(item, { selector: ({ id }) => id, maxLength: 12 });
    fc.assert(
      fc.property(list, fc.integer({ min: 1, max: 400_000 }), (open, amount) => {
        const { allocations, credit } = allocatePayment(open, amount);
        const spent = allocations.reduce((sum, part) => sum + part.amount, 0);
        expect(spent + credit).toBe(amount);
        for (const part of allocations) {
          expect(part.amount).toBeGreaterThan(0);
          expect(part.amount).toBeLessThanOrEqual(open.find(({ id }) => id === part.id)!.open);
        }
        const owed = open.reduce((sum, each) => sum + each.open, 0);
        expect(credit).toBe(Math.max(0, amount - owed));
      }),
    );
  });
});

describe('a late charge', () => {
  const terms = { principal: 100_000, annualBasisPoints: 1800 };

  it('counts the days of the calendar over 365, also in a leap year', () => {
    const charge = { ...terms, dayCount: 'actual_365' as const };
    expect(lateCharge({ ...charge, from: '2026-04-01', to: '2026-05-01' })).toBe(1479); // 1479.45
    expect(lateCharge({ ...charge, from: '2023-12-31', to: '2024-12-31' })).toBe(18049); // 366 days
  });

  it('counts months of thirty days over 360', () => {
    const charge = { ...terms, dayCount: '30_360' as const };
    expect(lateCharge({ ...charge, from: '2026-04-01', to: '2026-05-01' })).toBe(1500);
    expect(lateCharge({ ...charge, from: '2026-01-31', to: '2026-03-31' })).toBe(3000);
  });

  it('rounds once, at the end, without losing large amounts', () => {
    const from = '2026-01-01';
    const most = { principal: 2 ** 52, annualBasisPoints: 10_000, dayCount: 'actual_365' } as const;
    expect(lateCharge({ ...most, from, to: '2027-01-01' })).toBe(2 ** 52);
    const half = { principal: 5, annualBasisPoints: 1_000, dayCount: 'actual_365' } as const;
    expect(lateCharge({ ...half, from, to: '2027-01-01' })).toBe(1); // 0.5 of a cent
  });

  it('is nothing on the day itself and refuses what makes no sense', () => {
    const day = { from: '2026-04-01', to: '2026-04-01', dayCount: 'actual_365' } as const;
    expect(lateCharge({ ...terms, ...day })).toBe(0);
    expect(() => lateCharge({ ...terms, ...day, to: '2026-03-31' })).toThrow(/before/);
    expect(() => lateCharge({ ...terms, ...day, principal: -1 })).toThrow(/zero or more/);
    expect(() => lateCharge({ ...terms, ...day, annualBasisPoints: 1.5 })).toThrow(RangeError);
  });

  it('never runs backwards, however the dates fall', () => {
    const days = fc.integer({ min: 0, max: 2_000 });
    fc.assert(
      fc.property(
        days,
        days,
        fc.constantFrom('actual_365' as const, '30_360' as const),
        (a, b, basis) => {
          const from = addDays('2024-01-01', a);
          const fraction = yearFraction(from, addDays(from, b), basis);
          expect(fraction.days).toBeGreaterThanOrEqual(0);
          expect(Math.abs(fraction.days - b)).toBeLessThanOrEqual(3 + (b * 6) / 365);
        },
      ),
    );
  });
});
