import {
  type EarlierJob,
  type FittedPart,
  type JobToRule,
  type LineToRule,
  type RulingContext,
  type WarrantyRules,
} from './case';

/** Invented rules, lines and jobs for the specs of this folder. The work is done on 6 May 2031. */
const sampleRules: WarrantyRules = {
  labourDays: 90,
  partDays: 60,
  partDaysByCategory: { door: 180 },
  excludedCauses: ['misuse', 'vandalism', 'supply'],
  callbackDays: 14,
  nothingFoundBearer: 'store',
  confirmAbove: 100_00,
};

export const labourLine: LineToRule = {
  lineKey: 'job:now:labour',
  kind: 'labour',
  description: 'Labour on A-04',
  list: 62_00,
  cost: 16_20,
};

export const tripLine: LineToRule = { ...labourLine, lineKey: 'job:now:trip', kind: 'trip' };
export const accessLine: LineToRule = { ...labourLine, lineKey: 'job:now:access', kind: 'access' };

export const partLine: LineToRule = {
  ...labourLine,
  lineKey: 'job:now:part:use-1',
  kind: 'part',
  description: 'Door lock',
  part: { partId: 'door-lock', category: 'door', source: 'van' },
};

export function samplePart(changes: Partial<FittedPart> = {}): FittedPart {
  return {
    partId: 'door-lock',
    category: 'door',
    description: 'door lock',
    source: 'van',
    supplierWarrantyUntil: null,
    ...changes,
  };
}

/** Twelve days before, on the same machine, with no part. */
export function sampleEarlierJob(changes: Partial<EarlierJob> = {}): EarlierJob {
  return {
    jobId: 'then',
    ticketNumber: '0398/2',
    signedOffOn: '2031-04-24',
    machineId: 'machine-4',
    component: 'door',
    symptom: 'door_open',
    result: 'put_right',
    parts: [],
    ...changes,
  };
}

export function sampleCase(
  job: Partial<JobToRule> = {},
  changes: Partial<Omit<RulingContext, 'job' | 'rules'>> & { rules?: Partial<WarrantyRules> } = {},
): RulingContext {
  const { rules, ...rest } = changes;
  return {
    rules: { ...sampleRules, ...rules },
    job: {
      jobId: 'now',
      machineId: 'machine-4',
      machineKind: 'front_loader',
      on: '2031-05-06',
      cause: 'wear',
      result: 'put_right',
      component: 'door',
      symptom: 'wont_lock',
      mark: 'none',
      markedBy: 'Imre',
      causedBy: null,
      ...job,
    },
    earlierJobs: [],
    machineSupplierWarrantyUntil: null,
    contract: null,
    currency: 'USD',
    locale: 'en-US',
    ...rest,
  };
}

/** A contract that covers all the work on every machine. */
export const covering = { name: 'C-12', labour: true, parts: true, trip: true, machineKinds: null };

export const ourLock = sampleEarlierJob({ parts: [samplePart()] });
/** On the last day of the warranty on parts of doors. */
export const oldLock = sampleEarlierJob({ signedOffOn: '2030-11-07', parts: [samplePart()] });
/** A day past the warranty on labour. */
export const oldRepair = sampleEarlierJob({ signedOffOn: '2031-02-04' });
/** Another component, but what fails now was its symptom then: a callback. */
export const sameFault = sampleEarlierJob({ component: 'drain', symptom: 'wont_lock' });
