import { type PriceBook } from './price-book-api';

/** For specs: a small book in which every kind of line stands once. */
export const sampleBook: PriceBook = {
  labour: {
    normalPerHour: 9500,
    afterHoursPerHour: 14000,
    minimumMinutes: 30,
    incrementMinutes: 15,
  },
  access: { bill: 'beyond_allowance', allowanceMinutes: 10 },
  trips: [
    { label: 'Trip', amount: 6500 },
    { label: 'Town', amount: 4000, zone: 'Town' },
  ],
  tripCost: 3000,
  markup: {
    bands: [
      { fromUnitCost: 0, basisPoints: 10000 },
      { fromUnitCost: 2500, basisPoints: 6000 },
    ],
    step: 5,
    rounding: 'up',
  },
  partPrices: [{ partId: 'p1', unitPrice: 1999 }],
  nothingFound: 'bill_minimum',
  taxes: {
    rates: [{ place: 'MN', kind: 'part', basisPoints: 687.5, validFrom: '2031-01-01' }],
    rounding: 'invoice',
  },
  warranty: {
    labourDays: 30,
    partDays: 90,
    partDaysByCategory: { door: 180 },
    excludedCauses: ['misuse', 'vandalism'],
    callbackDays: 14,
    nothingFoundBearer: 'store',
    confirmAbove: 10000,
  },
};
