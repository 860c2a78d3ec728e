import { type IsoDate, type Month } from '../calendar/iso';

export type StatementLineKind =
  'ticket' | 'fee' | 'late_charge' | 'credit_note' | 'payment' | 'refund' | 'write_off';

/** The kinds that make up what a month cost; the others only settle it. */
export const chargeKinds: readonly StatementLineKind[] = ['ticket', 'fee', 'late_charge'];

/**
 * One line of a statement. Amounts in minor units of the statement's currency.
 * `total` is the line's effect on the balance, so payments, credit notes and write-offs are below
 * zero; `charged + tax = total` on charges and credit notes, and both are zero on the others.
 */
export interface StatementLine {
  kind: StatementLineKind;
  /** Id of the document behind the line. */
  id: string;
  date: IsoDate;
  /** The document's number as people see it: `T-0142`. */
  reference: string;
  /** In plain words, for an owner who was not there. */
  words: string;
  /** Bays or names of the machines worked on; empty when it is about none. */
  machines: string[];
  /** What the work would have cost at list prices, without tax. */
  list: number;
  charged: number;
  tax: number;
  total: number;
  /** List value of what the shop bore itself and charged nobody for, without tax. */
  borneByShop: number;
}

/** Sums of a statement, minor units. */
export interface StatementSums {
  list: number;
  /** Charges without tax. */
  charged: number;
  tax: number;
  /** Charges with tax: what the statement posts to the store's balance. */
  total: number;
  borneByShop: number;
  /** Credit notes and write-offs, above zero. */
  credited: number;
  /** Payments less refunds, above zero when more was paid than given back. */
  paid: number;
}

/** A statement as it was sent: never recomputed, whatever prices do later. */
export interface StatementSnapshot {
  number: string;
  /** Creditor reference for the payer's bank, ISO 11649. */
  reference: string;
  currency: string;
  store: StatementStore;
  period: Month;
  date: IsoDate;
  dueOn: IsoDate;
  /** The last statement's closing, minor units. */
  opening: number;
  lines: StatementLine[];
  sums: StatementSums;
  /** `opening + sums.total - sums.credited - sums.paid`, minor units; below zero is in credit. */
  closing: number;
}

export interface StatementStore {
  id: string;
  name: string;
  clientName?: string;
  address?: string[];
}
