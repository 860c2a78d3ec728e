import {
  type Act,
  type Cause,
  type Energy,
  type FindingCode,
  type JobResult,
  type MachineKind,
  type MachineState,
  type PartSource,
  type Symptom,
  type WarrantyMark,
} from '@lib/contracts';

/** An act and who did it; `seq` orders acts of one instant as they came in. */
export interface DatedAct {
  act: Act;
  /** Milliseconds, by the device's clock. */
  at: number;
  seq: number;
  by: { membershipId: string; name: string };
}

export interface JobRecord {
  id: string;
  machineId: string;
  callId: string | null;
  symptom: Symptom | null;
  cautions: Set<string>;
  cautionsAt: number | null;
  finding: string;
  findingCode: FindingCode | null;
  category: string | null;
  cause: Cause | null;
  action: string;
  result: JobResult | null;
  machineState: MachineState | null;
  minutes: number;
  afterHoursMinutes: number;
  accessMinutes: number;
  testCycles: number;
  testCoins: number;
  testAmount: number;
  mark: WarrantyMark;
  markWords: string;
  markedBy: string;
  causedByJobId: string | null;
  /** Whose minutes they are. */
  membershipId: string;
  openedAt: number;
  doneAt: number | null;
}

export interface PartRecord {
  id: string;
  jobId: string;
  partId: string | null;
  description: string | null;
  unitCost: number | null;
  quantityMilli: number;
  source: PartSource;
}

export interface OpenItemRecord {
  id: string;
  machineId: string | null;
  words: string;
  at: number;
}

export interface TimeRecord {
  membershipId: string;
  arrivedAt: number;
  leftAt: number | null;
}

/** What the acts of a visit come to. */
export interface VisitRecord {
  started: boolean;
  arrivedAt: number | null;
  leftAt: number | null;
  completedAt: number | null;
  receivedBy: string | null;
  times: TimeRecord[];
  jobs: Map<string, JobRecord>;
  dropped: Set<string>;
  parts: Map<string, PartRecord>;
  openItems: Map<string, OpenItemRecord>;
  itemsDone: Map<string, number>;
  /** How machines were left, by the latest act that says so. */
  machineStates: Map<string, { state: MachineState; at: number; actId: string }>;
}

export function emptyRecord(): VisitRecord {
  return {
    started: false,
    arrivedAt: null,
    leftAt: null,
    completedAt: null,
    receivedBy: null,
    times: [],
    jobs: new Map(),
    dropped: new Set(),
    parts: new Map(),
    openItems: new Map(),
    itemsDone: new Map(),
    machineStates: new Map(),
  };
}

export interface MachineFact {
  bay: string;
  kind: MachineKind;
  energy: Energy;
  retired: boolean;
}

/** What an act may refer to, as it stands when the acts arrive. */
export interface VisitFacts {
  cancelled: boolean;
  /** Nothing can have happened later than this, whatever a device's clock says. */
  latest: number;
  /** The ticket's name once it is signed off. */
  ticket: string | null;
  /** Machines of the store. */
  machines: ReadonlyMap<string, MachineFact>;
  /** Calls of the store that can be worked on. */
  callIds: ReadonlySet<string>;
  partIds: ReadonlySet<string>;
  /** Completed jobs of the client's stores that may have caused something. */
  causeIds: ReadonlySet<string>;
  /** Ids that something else has already: jobs, part uses or open items of other visits. */
  takenIds: ReadonlySet<string>;
  /** Open items of the store. */
  openItemIds: ReadonlySet<string>;
  /** Photos the shop has, by what they belong to. */
  photoOwners: ReadonlyMap<string, string>;
  /** Jobs that somebody has ruled on or named as a cause: they cannot be dropped any more. */
  keptJobIds: ReadonlySet<string>;
}
