import { type Edition } from './edition';
import { type JobToPrice, type PartToPrice, type VisitToPrice } from './visit';

/** Invented prices and jobs for the specs of this folder. */
export const sampleEdition: Edition = {
  labour: {
    normalPerHour: 120_00,
    afterHoursPerHour: 180_00,
    minimumMinutes: 30,
    incrementMinutes: 15,
  },
  access: { bill: 'beyond_allowance', allowanceMinutes: 5 },
  trips: [{ label: 'everywhere', amount: 95_00 }],
  markup: {
    bands: [
      { fromUnitCost: 0, basisPoints: 10_000 },
      { fromUnitCost: 20_00, basisPoints: 5_000 },
      { fromUnitCost: 100_00, basisPoints: 2_500 },
    ],
    step: 5,
    rounding: 'nearest',
  },
  partPrices: [{ partId: 'door-lock', unitPrice: 64_00 }],
  nothingFound: 'bill_minimum',
};

export function sampleJob(jobId: string, changes: Partial<JobToPrice> = {}): JobToPrice {
  return {
    jobId,
    machine: jobId,
    minutes: 0,
    afterHoursMinutes: 0,
    accessMinutes: 0,
    result: 'put_right',
    parts: [],
    labourCostPerHour: 36_00,
    ...changes,
  };
}

export function samplePart(changes: Partial<PartToPrice> = {}): PartToPrice {
  return {
    partUseId: 'use-1',
    description: 'Inlet valve',
    quantityMilli: 1_000,
    unitCost: 21_33,
    source: 'van',
    ...changes,
  };
}

export function sampleVisit(
  jobs: JobToPrice[],
  changes: Partial<Omit<VisitToPrice, 'edition'>> & { edition?: Partial<Edition> } = {},
): VisitToPrice {
  const { edition, ...rest } = changes;
  return {
    edition: { ...sampleEdition, ...edition },
    store: {},
    jobs,
    tripCost: 20_00,
    currency: 'USD',
    locale: 'en-US',
    ...rest,
  };
}
