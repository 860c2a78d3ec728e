import { type Fault, imagined } from './faults';
import { type Random } from './random';
import { faultsOf, type DemoMachine, type DemoStore } from './set-up';

/** What will be found on one machine of a visit. */
export interface JobStory {
  machine: DemoMachine;
  fault: Fault | null;
  words: string;
  mark: 'none' | 'shop_warranty' | 'own_mistake';
  markWords: string;
  causedByJobId: string | null;
  cause: Fault['cause'] | 'shop_error' | 'defective_part';
  minutes: number;
  left: 'put_right' | 'unfinished' | 'made_safe';
}

/** A job of the past that a new fault can go back to. */
export interface PastJob {
  jobId: string;
  machineId: string;
  fault: Fault;
  day: Date;
}

const oneDay = 86_400_000;

/** Thinks up what a tech will find: mostly wear, and now and then an instance of each rule. */
export function thinkUpJob(
  store: DemoStore,
  past: readonly PastJob[],
  day: Date,
  taken: ReadonlySet<string>,
  random: Random,
): JobStory {
  const recent = past.filter((job) => {
    const age = (day.getTime() - job.day.getTime()) / oneDay;
    return age > 6 && age < 75 && !taken.has(job.machineId);
  });
  const earlier = recent.length > 0 && random.chance(0.22) ? random.pick(recent) : undefined;
  if (earlier) return comeBack(store, earlier, random.chance(0.45));
  const free = store.machines.filter((machine) => !taken.has(machine.id));
  const machine = random.pick(free.length ? free : store.machines);
  if (random.chance(0.16)) return nothingFound(machine, random);
  const fault = random.pick(faultsOf(machine));
  const supplied = machine.underSupplierWarranty && fault.part !== undefined;
  return {
    machine,
    fault,
    words: fault.reported,
    mark: 'none',
    markWords: '',
    causedByJobId: null,
    cause: supplied ? 'defective_part' : fault.cause,
    minutes: fault.minutes + random.below(4) * 5,
    left: random.chance(0.06) ? 'unfinished' : random.chance(0.03) ? 'made_safe' : 'put_right',
  };
}

/** The same machine again: our own mistake, or what we fitted did not last. */
export function comeBack(store: DemoStore, earlier: PastJob, ours: boolean): JobStory {
  const machine = store.machines.find((m) => m.id === earlier.machineId) as DemoMachine;
  return {
    machine,
    fault: earlier.fault,
    words: earlier.fault.reported,
    mark: ours ? 'own_mistake' : 'shop_warranty',
    markWords: ours ? 'We did not set it right the last time' : 'Fitted by us a few weeks ago',
    causedByJobId: ours ? earlier.jobId : null,
    cause: ours ? 'shop_error' : 'wear',
    minutes: earlier.fault.minutes,
    left: 'put_right',
  };
}

function nothingFound(machine: DemoMachine, random: Random): JobStory {
  return {
    machine,
    fault: null,
    words: random.pick(imagined),
    mark: 'none',
    markWords: '',
    causedByJobId: null,
    cause: 'wear',
    minutes: 10 + random.below(3) * 5,
    left: 'put_right',
  };
}

/** The part has come: what was left unfinished is put right. */
export function finishWork(machine: DemoMachine, random: Random): JobStory {
  const fault = random.pick(faultsOf(machine));
  return {
    machine,
    fault,
    words: fault.reported,
    mark: 'none',
    markWords: '',
    causedByJobId: null,
    cause: fault.cause,
    minutes: fault.minutes,
    left: 'put_right',
  };
}
