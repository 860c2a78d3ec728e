import { type LineKind } from '../words/trade';

/**
 * A tax in force from a day on, at a place, for one kind of line.
 *
 * Places are paths: a rate at `MN` also holds at `MN/Hennepin`, and one at the empty path holds
 * everywhere. So state and local taxes are rows of their own and are added.
 */
export interface TaxRate {
  place: string;
  kind: LineKind;
  /** Hundredths of a percent, with up to three decimals: 887.5 is 8.875 %. */
  basisPoints: number;
  /** First trade day it holds. A later row with the same place and kind replaces it. */
  validFrom: string;
}

/** Where and until when a client pays no tax. */
export interface Exemption {
  /** First and last trade day; null for open ends. */
  from: string | null;
  until: string | null;
  /** Kinds of line; null for all. */
  kinds: readonly LineKind[] | null;
}

/**
 * Whether tax is rounded on each line or once per rate on the whole document. A seller chooses one
 * way (Streamlined Sales and Use Tax Agreement, section 324).
 */
export type TaxRounding = 'line' | 'invoice';
