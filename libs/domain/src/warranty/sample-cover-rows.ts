import { type RulingRow } from './ruling-row';
import {
  labourLine,
  partLine,
  sampleCase,
  sampleEarlierJob,
  samplePart,
  tripLine,
} from './sample-case';
import { hinge } from './sample-fault-rows';

const covering = { name: 'C-12', labour: true, parts: true, trip: true, machineKinds: null };
const ourLock = sampleEarlierJob({ parts: [samplePart()] });
const oldLock = sampleEarlierJob({ signedOffOn: '2030-11-07', parts: [samplePart()] });
const oldRepair = sampleEarlierJob({ signedOffOn: '2031-02-04' });
const sameFault = sampleEarlierJob({ component: 'drain', symptom: 'wont_lock' });

/** Supplier, shop warranty, callback, contract, the bare mark. */
export const coverRows: RulingRow[] = [
  [
    'a defective part within the supplier’s warranty on it',
    partLine,
    sampleCase(
      { cause: 'defective_part' },
      {
        earlierJobs: [
          sampleEarlierJob({ parts: [samplePart({ supplierWarrantyUntil: '2031-05-06' })] }),
        ],
      },
    ),
    'supplier',
    'supplier_warranty_on_part',
    'goes through',
  ],
  [
    'a defective part within the maker’s warranty on the machine',
    partLine,
    sampleCase({ cause: 'defective_part' }, { machineSupplierWarrantyUntil: '2031-12-31' }),
    'supplier',
    'supplier_warranty_on_machine',
    'goes through',
  ],
  [
    'a defective part that an earlier job brought about',
    partLine,
    sampleCase(
      { cause: 'defective_part', causedBy: hinge },
      { machineSupplierWarrantyUntil: '2031-12-31' },
    ),
    'supplier',
    'supplier_warranty_on_machine',
    'goes through',
  ],
  [
    'the labour for it',
    labourLine,
    sampleCase({ cause: 'defective_part' }, { machineSupplierWarrantyUntil: '2031-12-31' }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'a defective part of ours, the supplier’s warranty over',
    partLine,
    sampleCase(
      { cause: 'defective_part' },
      {
        earlierJobs: [
          sampleEarlierJob({ parts: [samplePart({ supplierWarrantyUntil: '2031-05-05' })] }),
        ],
      },
    ),
    'shop',
    'part_in_warranty',
    'goes through',
  ],
  [
    'a part of ours on the last day of its class',
    partLine,
    sampleCase(
      {},
      { earlierJobs: [sampleEarlierJob({ signedOffOn: '2030-11-07', parts: [samplePart()] })] },
    ),
    'shop',
    'part_in_warranty',
    'goes through',
  ],
  [
    'a part of ours a day after',
    partLine,
    sampleCase(
      {},
      { earlierJobs: [sampleEarlierJob({ signedOffOn: '2030-11-06', parts: [samplePart()] })] },
    ),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'a part whose class has no days of its own',
    { ...partLine, part: { partId: null, category: 'pump', source: 'van' } },
    sampleCase(
      { component: 'pump' },
      {
        earlierJobs: [
          sampleEarlierJob({
            signedOffOn: '2031-03-06',
            parts: [samplePart({ partId: null, category: 'pump' })],
          }),
        ],
      },
    ),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'a part whose predecessor was the store’s own',
    partLine,
    sampleCase(
      {},
      { earlierJobs: [sampleEarlierJob({ parts: [samplePart({ source: 'storeroom' })] })] },
    ),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'labour on the last day',
    labourLine,
    sampleCase({}, { earlierJobs: [sampleEarlierJob({ signedOffOn: '2031-02-05' })] }),
    'shop',
    'labour_in_warranty',
    'goes through',
  ],
  [
    'labour a day after',
    labourLine,
    sampleCase({}, { earlierJobs: [oldRepair] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'the trip with labour in warranty',
    tripLine,
    sampleCase({}, { earlierJobs: [ourLock] }),
    'shop',
    'labour_in_warranty',
    'goes through',
  ],
  [
    'labour on another component',
    labourLine,
    sampleCase({ component: 'pump' }, { earlierJobs: [ourLock] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'labour on another machine',
    labourLine,
    sampleCase({ machineId: 'machine-5' }, { earlierJobs: [ourLock] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'labour after work that was left unfinished',
    labourLine,
    sampleCase({}, { earlierJobs: [sampleEarlierJob({ result: 'unfinished' })] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'labour in warranty above the limit',
    { ...labourLine, list: 100_01 },
    sampleCase({}, { earlierJobs: [ourLock] }),
    'shop',
    'labour_in_warranty',
    'asks',
  ],
  [
    'the same fault within the window',
    labourLine,
    sampleCase({}, { earlierJobs: [sameFault] }),
    'shop',
    'callback',
    'asks',
  ],
  [
    'a part for it that nobody warrants',
    partLine,
    sampleCase({}, { earlierJobs: [sameFault] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'the same fault after the window',
    labourLine,
    sampleCase(
      {},
      { earlierJobs: [sampleEarlierJob({ ...sameFault, signedOffOn: '2031-04-21' })] },
    ),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'the same fault, last time nothing was found',
    tripLine,
    sampleCase({}, { earlierJobs: [sampleEarlierJob({ ...sameFault, result: 'nothing_found' })] }),
    'shop',
    'callback',
    'asks',
  ],
  [
    'the same fault, left open and said so',
    labourLine,
    sampleCase({}, { earlierJobs: [sampleEarlierJob({ ...sameFault, result: 'made_safe' })] }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'labour under contract',
    labourLine,
    sampleCase({}, { contract: covering }),
    'contract',
    'contract_covers',
    'goes through',
  ],
  [
    'parts that the contract leaves out',
    partLine,
    sampleCase({}, { contract: { ...covering, parts: false } }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'a trip that the contract leaves out',
    tripLine,
    sampleCase({}, { contract: { ...covering, trip: false } }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'a kind of machine that the contract leaves out',
    labourLine,
    sampleCase({}, { contract: { ...covering, machineKinds: ['dryer'] } }),
    'store',
    'nothing_applies',
    'goes through',
  ],
  [
    'warranty before contract',
    labourLine,
    sampleCase({}, { earlierJobs: [ourLock], contract: covering }),
    'shop',
    'labour_in_warranty',
    'goes through',
  ],
  [
    'the tech’s word where the record is silent',
    labourLine,
    sampleCase({ mark: 'shop_warranty' }),
    'shop',
    'mark_has_no_record',
    'asks',
  ],
  [
    'the tech’s word against the record: labour',
    labourLine,
    sampleCase({ mark: 'shop_warranty' }, { earlierJobs: [oldRepair] }),
    'store',
    'mark_contradicted',
    'asks',
  ],
  [
    'the tech’s word against the record: a part',
    partLine,
    sampleCase(
      { mark: 'shop_warranty' },
      { earlierJobs: [oldLock], rules: { partDaysByCategory: { door: 120 } } },
    ),
    'store',
    'mark_contradicted',
    'asks',
  ],
  [
    'the tech’s word borne out',
    labourLine,
    sampleCase({ mark: 'shop_warranty' }, { earlierJobs: [ourLock] }),
    'shop',
    'labour_in_warranty',
    'goes through',
  ],
  ['anything else', labourLine, sampleCase(), 'store', 'nothing_applies', 'goes through'],
];
