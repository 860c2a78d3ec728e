import { type PriceBook } from '@lib/contracts';
import { minorDigits } from '@lib/domain';

/**
 * How many units of a currency an hour of work costs for each dollar it would cost in the United
 * States, by order of magnitude. The figures only give a new shop something to change: they need
 * not follow the exchange rate.
 */
const unitsPerDollar: ReadonlyMap<string, number> = new Map([
  ['BRL', 5],
  ['CLP', 900],
  ['COP', 4000],
  ['CZK', 20],
  ['DKK', 7],
  ['HUF', 350],
  ['IDR', 15000],
  ['INR', 80],
  ['ISK', 140],
  ['JPY', 150],
  ['KRW', 1300],
  ['MXN', 18],
  ['NOK', 10],
  ['PHP', 55],
  ['PLN', 4],
  ['SEK', 10],
  ['THB', 35],
  ['TRY', 35],
  ['VND', 25000],
  ['ZAR', 18],
]);

/** A price book that a shop can start with and is meant to change. Without taxes: they are local. */
export function firstBook(currency: string): PriceBook {
  const minor = 10 ** minorDigits(currency);
  const money = (dollars: number) =>
    Math.round(dollars * (unitsPerDollar.get(currency) ?? 1) * minor);
  return {
    labour: {
      normalPerHour: money(95),
      afterHoursPerHour: money(140),
      minimumMinutes: 30,
      incrementMinutes: 15,
    },
    access: { bill: 'beyond_allowance', allowanceMinutes: 10 },
    trips: [{ label: 'Trip', amount: money(65) }],
    tripCost: money(30),
    markup: {
      bands: [
        { fromUnitCost: 0, basisPoints: 10_000 },
        { fromUnitCost: money(25), basisPoints: 6_000 },
        { fromUnitCost: money(100), basisPoints: 4_000 },
        { fromUnitCost: money(400), basisPoints: 2_500 },
      ],
      step: Math.max(1, Math.round(money(1) / 20)),
      rounding: 'up',
    },
    partPrices: [],
    nothingFound: 'bill_minimum',
    taxes: { rates: [], rounding: 'invoice' },
    warranty: {
      labourDays: 30,
      partDays: 90,
      partDaysByCategory: {},
      excludedCauses: ['misuse', 'vandalism', 'supply'],
      callbackDays: 14,
      nothingFoundBearer: 'store',
      confirmAbove: money(100),
    },
  };
}
