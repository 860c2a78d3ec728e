import fc from 'fast-check';
import { type Cause, type WarrantyMark } from '../words/trade';
import { otherOutcomes } from './outcomes';
import { proposeRuling } from './propose-ruling';
import { REASON_CODES } from './ruling';
import {
  accessLine,
  covering,
  labourLine,
  oldLock,
  oldRepair,
  ourLock,
  partLine,
  sameFault,
  sampleCase,
  sampleEarlierJob,
  tripLine,
} from './sample-case';
import { coverRows } from './sample-cover-rows';
import { faultRows, hinge } from './sample-fault-rows';

const rows = [...faultRows, ...coverRows];

describe('proposeRuling', () => {
  it.each(rows)('%s', (_, line, context, bearer, code, asks) => {
    const ruling = proposeRuling(line, context);
    expect(ruling.reasons.filter((reason) => reason.decides).map((each) => each.code)).toEqual([
      code,
    ]);
    expect(ruling.bearer).toBe(bearer);
    expect(ruling.needsConfirmation).toBe(asks === 'asks');
  });

  it('has an instance of every reason and every bearer in the table', () => {
    const seen = rows.flatMap(([, line, context]) =>
      proposeRuling(line, context).reasons.map((reason) => reason.code),
    );
    expect(new Set(seen)).toEqual(new Set(REASON_CODES));
    expect(new Set(rows.map(([, , , bearer]) => bearer)).size).toBe(5);
  });

  it('tells the lock burnt out by a crooked hinge as the owner reads it', () => {
    const { reasons } = proposeRuling(
      { ...partLine, list: 171_00 },
      sampleCase(
        { mark: 'own_mistake', markNote: 'hinge fitted crooked.', causedBy: hinge },
        { machineSupplierWarrantyUntil: '2031-12-31' },
      ),
    );
    expect(reasons.map((reason) => reason.words)).toEqual([
      'Imre marked it as our own mistake: hinge fitted crooked.',
      'It was brought about by an earlier job: ' +
        'hinge fitted, job 0398/2, signed off 12 days earlier on the same machine.',
      'Parts of class door are warranted 180 days from sign-off; ' +
        'job 0398/2 was signed off 12 days earlier.',
      'It failed through job 0398/2, so it follows that job.',
      'The maker’s warranty on the machine runs until 2031-12-31 ' +
        'but doesn’t apply: the cause is wear.',
      'Worth $171.00; above $100.00 the owner confirms.',
    ]);
  });

  it('gives the facts apart from the words', () => {
    const { reasons } = proposeRuling(labourLine, sampleCase({}, { earlierJobs: [ourLock] }));
    expect(reasons).toEqual([
      {
        code: 'labour_in_warranty',
        params: { ticket: '0398/2', days: 12, warranted: 90 },
        words:
          'Labour is warranted 90 days from sign-off; job 0398/2 was signed off 12 days earlier.',
        decides: true,
      },
    ]);
  });

  it('says by how much a warranty is over', () => {
    const { reasons } = proposeRuling(labourLine, sampleCase({}, { earlierJobs: [oldRepair] }));
    expect(reasons[0]?.words).toBe(
      'Labour is warranted 90 days from sign-off; ' +
        'job 0398/2 was signed off 91 days earlier, 1 day past that.',
    );
  });

  it('asks about a cause on another machine, and one out of warranty', () => {
    const elsewhere = sampleCase({
      causedBy: { ...hinge, machineId: 'machine-9', signedOffOn: '2030-05-06' },
    });
    const { reasons, needsConfirmation } = proposeRuling(labourLine, elsewhere);
    expect(reasons.map((reason) => reason.code)).toEqual([
      'causing_job_on_other_machine',
      'causing_job_out_of_warranty',
      'follows_causing_job',
    ]);
    expect(needsConfirmation).toBe(true);
  });

  it('weighs the latest of several earlier jobs', () => {
    const earlierJobs = [oldRepair, ourLock, sampleEarlierJob({ signedOffOn: '2031-05-07' })];
    const { reasons } = proposeRuling(labourLine, sampleCase({}, { earlierJobs }));
    expect(reasons[0]?.params['days']).toBe(12);
  });

  it('refuses a date that does not exist', () => {
    const earlierJobs = [sampleEarlierJob({ signedOffOn: '2031-02-30' })];
    expect(() => proposeRuling(labourLine, sampleCase({}, { earlierJobs }))).toThrow(RangeError);
  });

  const causes = fc.constantFrom<Cause>('wear', 'age', 'misuse', 'supply', 'defective_part');
  const marks = fc.constantFrom<WarrantyMark>('none', 'shop_warranty', 'own_mistake');
  const lines = fc.constantFrom(labourLine, tripLine, accessLine, partLine);
  const pasts = fc.subarray([ourLock, oldLock, oldRepair, sameFault]);
  const contracts = fc.constantFrom(null, covering, { ...covering, parts: false });
  const untils = fc.constantFrom(null, '2031-01-01', '2031-12-31');
  const causings = fc.constantFrom(null, hinge);

  it('always rests on exactly one reason, and an own mistake is never the store’s', () => {
    fc.assert(
      fc.property(
        fc.tuple(causes, marks, lines, pasts, contracts, untils, causings),
        ([cause, mark, line, earlierJobs, contract, machineSupplierWarrantyUntil, causedBy]) => {
          const ruling = proposeRuling(
            line,
            sampleCase(
              { cause, mark, causedBy },
              { earlierJobs, contract, machineSupplierWarrantyUntil },
            ),
          );
          expect(ruling.reasons.filter((reason) => reason.decides)).toHaveLength(1);
          if (mark === 'own_mistake') expect(ruling.bearer).toBe('shop');
          else if (cause === 'misuse' || cause === 'supply') expect(ruling.bearer).toBe('store');
        },
      ),
    );
  });
});

describe('otherOutcomes', () => {
  it('says what each bearer would mean in figures', () => {
    expect(otherOutcomes({ list: 171_00, cost: 88_10 })).toEqual([
      { bearer: 'store', charged: 171_00, ourCost: 0, claimed: 0 },
      { bearer: 'shop', charged: 0, ourCost: 88_10, claimed: 0 },
      { bearer: 'supplier', charged: 0, ourCost: 0, claimed: 88_10 },
      { bearer: 'contract', charged: 0, ourCost: 88_10, claimed: 0 },
      { bearer: 'goodwill', charged: 0, ourCost: 88_10, claimed: 0 },
    ]);
  });
});
