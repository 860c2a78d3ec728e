import { ageing, lateCharge, yearFraction } from '@lib/domain';

describe('30/360, bond basis', () => {
  /** Source: the printed table of the convention's year fractions (30/360, ISDA 2006, 4.16(f)). */
  it.each([
    ['2006-02-28', '2006-08-31', 0.508333333],
    ['2006-08-31', '2007-02-28', 0.494444444],
    ['2007-08-31', '2008-02-29', 0.497222222],
  ])('%s to %s is %d of a year', (from, to, fraction) => {
    const { days, daysInYear } = yearFraction(from, to, '30_360');
    expect(days / daysInYear).toBeCloseTo(fraction, 9);
    // At 100 % of a million dollars a year the charge is the fraction itself, to the cent.
    const charge = lateCharge({
      principal: 100_000_000,
      annualBasisPoints: 10_000,
      from,
      to,
      dayCount: '30_360',
    });
    expect(charge).toBe(Math.round((days * 100_000_000) / 360));
    expect(charge / 100_000_000).toBeCloseTo(fraction, 8);
  });

  it('is principal x rate x days / 365 on actual days', () => {
    // 1,000.00 at 12 % for 45 days: 1000 x 0.12 x 45 / 365 = 14.79.
    const terms = { principal: 100_000, annualBasisPoints: 1_200, dayCount: 'actual_365' } as const;
    expect(lateCharge({ ...terms, from: '2026-01-15', to: '2026-03-01' })).toBe(1_479);
  });
});

describe('ageing by days past due', () => {
  /** Source: the buckets of accounting practice: current, 1-30, 31-60, 61-90, over 90. */
  it('puts each item where a printed report has it', () => {
    const due = (dueOn: string, open: number) => ({ id: dueOn, dueOn, open });
    const items = [
      due('2026-06-30', 1),
      due('2026-06-29', 10),
      due('2026-05-31', 100),
      due('2026-05-30', 1_000),
      due('2026-05-01', 10_000),
      due('2026-04-30', 100_000),
      due('2026-04-01', 1_000_000),
      due('2026-03-31', 10_000_000),
    ];
    expect(ageing(items, '2026-06-30')).toEqual({
      current: 1,
      days1To30: 110,
      days31To60: 11_000,
      days61To90: 1_100_000,
      over90: 10_000_000,
      total: 11_111_111,
    });
  });
});
