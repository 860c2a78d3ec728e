import { type JobResult, type LineKind, type PartSource } from '../words/trade';
import { type ClientOverrides, type Edition } from './edition';

/** A visit as it was worked, with all that its price depends on. */
export interface VisitToPrice {
  edition: Edition;
  overrides?: ClientOverrides | null;
  store: StorePosition;
  /** The machines worked on, in the order they are to stand on the ticket. */
  jobs: readonly JobToPrice[];
  /** What the trip cost the shop itself, in minor units. */
  tripCost: number;
  /** ISO 4217, for the words of the reasons. */
  currency: string;
  /** Language of the amounts in the reasons; `en` unless given. */
  locale?: string;
}

/** Where the store lies, for the trip rules. */
export interface StorePosition {
  place?: string | null;
  zone?: string | null;
  metres?: number | null;
}

export interface JobToPrice {
  jobId: string;
  /** Bay or name of the machine, as it is to stand on the ticket: "A-04". */
  machine: string;
  /** Work in normal hours, without access minutes. */
  minutes: number;
  afterHoursMinutes: number;
  /** Extra minutes to reach the machine and close it in again. */
  accessMinutes: number;
  result: JobResult;
  parts: readonly PartToPrice[];
  /** What 60 minutes of this tech cost the shop. */
  labourCostPerHour: number;
}

export interface PartToPrice {
  partUseId: string;
  /** Without one, only the markup prices it. */
  partId?: string | null;
  description: string;
  /** Thousandths; at least 1. */
  quantityMilli: number;
  /** What one costs the shop. */
  unitCost: number;
  /** A unit price agreed for this use, before any other. */
  fixedPrice?: number | null;
  source: PartSource;
}

/** What a quantity counts: pieces (and trips), or minutes priced by the hour. */
export type LineUnit = 'each' | 'minute';

/** Thousandths of the unit that the unit price is for (price base quantity, EN 16931 BT-149). */
export const PRICE_BASE_MILLI: Readonly<Record<LineUnit, number>> = {
  each: 1_000,
  minute: 60_000,
};

/** A line of a visit, priced before anybody rules who bears it. */
export interface PricedLine {
  /** The same for the same work however often the visit is priced: `job:<id>:labour`. */
  lineKey: string;
  jobId: string;
  kind: Extract<LineKind, 'trip' | 'labour' | 'access' | 'part'>;
  description: string;
  unit: LineUnit;
  /** Thousandths of the unit. */
  quantityMilli: number;
  /** For one piece, or for 60 minutes. */
  unitPrice: number;
  /** What the client's agreement takes off. */
  discount: number;
  /** What the line is worth: quantity x unit price - discount. */
  list: number;
  /** What it cost the shop itself. */
  cost: number;
  /** How the figure came about, in plain words. */
  reasons: string[];
}
