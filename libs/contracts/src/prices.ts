import { z } from 'zod';
import { bearer, cause, lineKind } from './enums';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { id, line, words } from './text';
import { amount, basisPoints, day, instant, minutes } from './values';

/** Up to three decimals, because rates as fine as 8.875 % are levied. */
const taxBasisPoints = z
  .number()
  .min(0)
  .max(100_000)
  .refine((v) => Math.abs(Math.round(v * 1000) / 1000 - v) < 1e-9, {
    error: 'is finer than a thousandth of a basis point',
  });

const tripRule = z.strictObject({
  /** As the statement's reader knows it: "Town", "Up to 40 km". */
  label: line(60),
  amount,
  /** Holds for stores of this tax place, ... */
  place: line(80).nullish(),
  /** ... of this trip place, ... */
  zone: line(80).nullish(),
  /** ... and up to this distance. One that names nothing holds for every store. */
  upToMetres: z.int().min(1).max(2_000_000).nullish(),
});

const markupBand = z.strictObject({ fromUnitCost: amount, basisPoints });

const taxRate = z.strictObject({
  /** A path; a rate at `MN` also holds at `MN/Hennepin`, and one at the empty path everywhere. */
  place: line(80, 0),
  kind: lineKind,
  basisPoints: taxBasisPoints,
  validFrom: day,
});

const warrantyDays = z.int().min(0).max(3650);

/** Of parts, with a warranty of their own. */
const mostCategories = 200;

/** What the shop promises, and what it wants to look at itself. */
export const warrantyRules = z.strictObject({
  labourDays: warrantyDays,
  partDays: warrantyDays,
  partDaysByCategory: z
    .record(line(40), warrantyDays)
    .refine((days) => Object.keys(days).length <= mostCategories, {
      error: `names at most ${mostCategories} categories`,
    })
    .meta({ maxProperties: mostCategories }),
  /** Causes the store bears even within warranty. */
  excludedCauses: z.array(cause).max(9),
  /** Days within which a return for the same fault is the shop's own; 0 for none. */
  callbackDays: z.int().min(0).max(365),
  nothingFoundBearer: bearer,
  /** A line the store does not bear needs the owner above this list value. */
  confirmAbove: amount,
});

/**
 * All a visit is priced, taxed and ruled by: complete in itself, amounts in minor units of the
 * shop's currency. It is read back as it was written, whatever the settings say by then.
 */
export const priceBook = z
  .strictObject({
    labour: z.strictObject({
      /** Price of 60 minutes in normal hours, and after hours. */
      normalPerHour: amount,
      afterHoursPerHour: amount,
      minimumMinutes: minutes,
      incrementMinutes: z.int().min(1).max(240),
    }),
    /** Whether the extra minutes are billed that it takes to reach a boxed-in machine. */
    access: z.strictObject({
      bill: z.enum(['never', 'all', 'beyond_allowance']),
      allowanceMinutes: minutes,
    }),
    trips: z.array(tripRule).min(1).max(50),
    /** What a trip costs the shop itself, for absorbed work. */
    tripCost: amount,
    markup: z.strictObject({
      bands: z.array(markupBand).min(1).max(20),
      step: z.int().min(1).max(1_000_000),
      rounding: z.enum(['nearest', 'up']),
    }),
    /** Prices that override the markup, by part. */
    partPrices: z.array(z.strictObject({ partId: id, unitPrice: amount })).max(2000),
    nothingFound: z.enum(['bill_minimum', 'bill_trip_share_only', 'free']),
    taxes: z.strictObject({
      rates: z.array(taxRate).max(500),
      rounding: z.enum(['line', 'invoice']),
    }),
    warranty: warrantyRules,
  })
  .refine((book) => book.trips.some((t) => !t.place && !t.zone && !t.upToMetres), {
    path: ['trips'],
    error: 'needs one rule that holds for every store',
  })
  .refine((book) => book.markup.bands.some((band) => band.fromUnitCost === 0), {
    path: ['markup', 'bands'],
    error: 'needs a band from 0 on',
  })
  .refine((book) => allDiffer(book.markup.bands.map((band) => band.fromUnitCost)), {
    path: ['markup', 'bands'],
    error: 'has two bands from the same cost on',
  })
  .refine((book) => allDiffer(book.partPrices.map((price) => price.partId)), {
    path: ['partPrices'],
    error: 'has two prices for one part',
  })
  .refine(
    (book) =>
      allDiffer(book.taxes.rates.map((r) => JSON.stringify([r.place, r.kind, r.validFrom]))),
    { path: ['taxes', 'rates'], error: 'has two rates for one place, kind and day' },
  );

export type PriceBook = z.infer<typeof priceBook>;

function allDiffer(values: readonly (string | number)[]): boolean {
  return new Set(values).size === values.length;
}

export const editionSummary = z.object({
  id,
  number: z.int(),
  validFrom: day,
  note: z.string(),
  /** In force today. */
  inForce: z.boolean(),
  createdAt: instant,
});
export const edition = editionSummary.extend({ book: priceBook });

export const priceOperations = defineOperations({
  'editions.list': {
    method: 'GET',
    path: '/api/editions',
    summary: 'Editions of the price book, the latest first',
    permission: 'prices.read',
    query: listQuery({ sort: ['-validFrom'] }).omit({ q: true }),
    answer: listOf(editionSummary),
  },
  'editions.show': {
    method: 'GET',
    path: '/api/editions/:editionId',
    summary: 'One edition of the price book',
    permission: 'prices.read',
    params: z.strictObject({ editionId: id }),
    answer: edition,
  },
  'prices.inForce': {
    method: 'GET',
    path: '/api/price-book',
    summary: 'The edition in force on a day',
    permission: 'prices.read',
    query: z.strictObject({
      /** Default: today, on the shop's clock. */
      on: day.optional(),
    }),
    answer: edition,
    problems: ['not-found'],
  },
  'editions.create': {
    method: 'POST',
    path: '/api/editions',
    summary: 'Put a new edition in force from a day on; editions are never changed',
    permission: 'prices.change',
    body: z.strictObject({
      /** Today or later; earlier only while no ticket is signed off. */
      validFrom: day,
      note: words(500).default(''),
      book: priceBook,
    }),
    answer: edition,
  },
});
