import {
  type Bearer,
  type Cause,
  type JobResult,
  type LineKind,
  type MachineKind,
  type PartSource,
  type WarrantyMark,
} from '../words/trade';

/** What a shop promises, and what it wants to look at itself. Days count from sign-off. */
export interface WarrantyRules {
  /** Days the shop's labour is warranted; the last day is included. 0 for none. */
  labourDays: number;
  /** Days a fitted part is warranted, where its category has no days of its own. */
  partDays: number;
  partDaysByCategory: Readonly<Record<string, number>>;
  /** Causes the store bears even within warranty; usually misuse, vandalism, supply. */
  excludedCauses: readonly Cause[];
  /** Days within which a return for the same fault is the shop's own; 0 for none. */
  callbackDays: number;
  /** Who bears a line of a machine that ran faultlessly when tested. */
  nothingFoundBearer: Bearer;
  /** A line the store doesn't bear needs the owner above this list value, in minor units. */
  confirmAbove: number;
}

/** A priced line, with what the ruling needs to know of its part. */
export interface LineToRule {
  lineKey: string;
  kind: LineKind;
  description: string;
  /** What the line is worth, in minor units. */
  list: number;
  /** What it cost the shop itself. */
  cost: number;
  /** For a part: the one fitted now, in place of the one that failed. */
  part?: { partId: string | null; category: string | null; source: PartSource } | null;
}

/** The job the line belongs to. */
export interface JobToRule {
  jobId: string;
  machineId: string;
  machineKind: MachineKind;
  /** The trade day of the work. */
  on: string;
  cause: Cause;
  result: JobResult;
  /** What failed, by the shop's part categories: `door`, `pump`. */
  component: string | null;
  /** What was reported, by the shop's list of symptoms. */
  symptom: string | null;
  mark: WarrantyMark;
  /** The tech's name and words, for the reasons. */
  markedBy: string;
  markNote?: string | null;
  /** The earlier job that the tech says brought this one about. */
  causedBy: CausingJob | null;
}

export interface CausingJob {
  jobId: string;
  /** Ticket and position as people quote it: `0398/2`. */
  ticketNumber: string;
  signedOffOn: string;
  machineId: string;
  /** What was done then: "hinge fitted". */
  work?: string | null;
  /**
   * Who answers for what follows from that job. The shop, unless that job was itself ruled to be
   * somebody else's, as when a supplier's defective part brought both about.
   */
  bearer?: Bearer | null;
}

/** A signed-off job on the same machine. */
export interface EarlierJob {
  jobId: string;
  ticketNumber: string;
  signedOffOn: string;
  machineId: string;
  component: string | null;
  symptom: string | null;
  result: JobResult;
  parts: readonly FittedPart[];
}

export interface FittedPart {
  partId: string | null;
  category: string | null;
  description: string;
  /** The shop warrants what it supplied, not the store's own spares. */
  source: PartSource;
  /** Last day of the supplier's warranty on this piece. */
  supplierWarrantyUntil: string | null;
}

/** A maintenance contract in force on the day of the work. */
export interface ContractCoverage {
  /** Number or name, for the reasons. */
  name: string;
  labour: boolean;
  parts: boolean;
  trip: boolean;
  /** Kinds of machine covered; null for all. */
  machineKinds: readonly MachineKind[] | null;
}

export interface RulingContext {
  rules: WarrantyRules;
  job: JobToRule;
  /** Signed-off jobs, in any order; those on other machines are passed over. */
  earlierJobs: readonly EarlierJob[];
  /** Last day of the maker's warranty on the machine's parts. */
  machineSupplierWarrantyUntil: string | null;
  contract: ContractCoverage | null;
  /** ISO 4217, for the words of the reasons. */
  currency: string;
  /** Language of the amounts in the reasons; `en` unless given. */
  locale?: string;
}
