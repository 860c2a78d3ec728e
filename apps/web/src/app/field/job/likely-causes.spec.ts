import { type EarlierJob, type Sheet, type SheetJob } from '../kept/kept';
import { sampleSheet } from '../projection/sample-sheet';
import { likelyCauses } from './likely-causes';

const hinge = sampleSheet.earlierJobs[0] as EarlierJob;
const earlier = (jobId: string, change: Partial<EarlierJob>): EarlierJob => ({
  ...hinge,
  jobId,
  ...change,
});
const sheet: Sheet = {
  ...sampleSheet,
  earlierJobs: [
    earlier('elsewhere, same part', { machineId: 'machine-3', category: 'lock', on: '2031-05-05' }),
    earlier('same machine, long ago', { on: '2031-02-01', symptom: null }),
    earlier('elsewhere', { machineId: 'machine-3', category: 'pump', on: '2031-05-06' }),
    hinge,
    earlier('nothing found', { result: 'nothing_found' }),
  ],
};
const job = {
  machine: { id: 'machine-4' },
  category: 'lock',
  symptom: 'wont_open',
} as unknown as SheetJob;

describe('what may have brought a job about, without a signal', () => {
  const causes = likelyCauses(sheet, job);

  it('puts the likeliest first, and leaves out visits that found nothing', () => {
    expect(causes.map(({ jobId }) => jobId)).toEqual([
      'hinge job',
      'same machine, long ago',
      'elsewhere, same part',
      'elsewhere',
    ]);
  });

  it('says what speaks for each', () => {
    expect(causes[0]?.why).toEqual([
      'On the same machine',
      'The same fault was reported',
      '12 days earlier',
    ]);
    expect(causes[3]?.why).toContain('The same day');
  });
});
