/**
 * One dated version of a shop's price book, as far as a visit is priced from it (taxes stand in
 * `tax/`). All amounts are minor units of the shop's currency; all minutes are whole.
 */
export interface Edition {
  labour: LabourRates;
  access: AccessRule;
  trips: readonly TripRule[];
  markup: MarkupRule;
  /** Prices that override the markup, by part. */
  partPrices: readonly PartPrice[];
  nothingFound: NothingFoundRule;
}

export interface LabourRates {
  /** Price of 60 minutes in normal hours. */
  normalPerHour: number;
  /** Price of 60 minutes after hours. */
  afterHoursPerHour: number;
  /** Least labour billed for a visit; 0 for none. */
  minimumMinutes: number;
  /** Labour is billed in steps of so many minutes; at least 1. */
  incrementMinutes: number;
}

/**
 * Whether the extra minutes are billed that it takes to reach a boxed-in machine: not at all, all
 * of them, or those beyond an allowance per machine. They are billed to the minute.
 */
export interface AccessRule {
  bill: 'never' | 'all' | 'beyond_allowance';
  /** Per machine and visit; only for `beyond_allowance`. */
  allowanceMinutes: number;
}

/**
 * What a visit's trip costs. A rule holds for a store when all that it names agrees; of several,
 * the closest holds: place before zone before distance, then the nearer distance. One that names
 * nothing holds for every store.
 */
export interface TripRule {
  /** As the statement's reader knows it: "Town", "Up to 40 km". */
  label: string;
  amount: number;
  /** The store's tax place or town. */
  place?: string | null;
  /** The shop's own name for a part of its area. */
  zone?: string | null;
  /** Stores up to this distance, itself included, in metres. */
  upToMetres?: number | null;
}

/** Markup by bands of unit cost; a part's unit price is its cost with markup, in whole steps. */
export interface MarkupRule {
  bands: readonly MarkupBand[];
  /** Unit prices are multiples of this amount; 1 for every cent. */
  step: number;
  /** To the nearest step, or always to the next higher. */
  rounding: 'nearest' | 'up';
}

export interface MarkupBand {
  /** Holds for unit costs from here on, until the next band's start. */
  fromUnitCost: number;
  /** Added to the cost: 4000 is 40 %. */
  basisPoints: number;
}

export interface PartPrice {
  partId: string;
  unitPrice: number;
}

/**
 * What the store pays for a machine that ran faultlessly when tested.
 * - `bill_minimum`: its share of the trip, and its minutes of testing as labour, but never more
 *   than the labour minimum.
 * - `bill_trip_share_only`: its share of the trip.
 * - `free`: nothing; the trip is shared over the other machines.
 */
export type NothingFoundRule = 'bill_minimum' | 'bill_trip_share_only' | 'free';

/** What one client has agreed on; what is left out stands as in the edition. */
export interface ClientOverrides {
  normalPerHour?: number | null;
  afterHoursPerHour?: number | null;
  /** Instead of every band. Prices fixed by part still stand. */
  markupBasisPoints?: number | null;
  /** Instead of every trip rule. */
  tripAmount?: number | null;
  /** Off every line, 0 to 10000. */
  discountBasisPoints?: number | null;
}
