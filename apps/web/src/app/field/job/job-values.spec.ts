import { type SheetJob } from '../kept/kept';
import { projectSheet } from '../projection/project-sheet';
import { sampleSheet } from '../projection/sample-sheet';
import { type Act } from '../outbox/local-act';
import { entriesFor, jobValues, type JobValues } from './job-values';

const opened = {
  kind: 'job_opened',
  at: '2031-05-06T15:30:00Z',
  payload: { jobId: 'job', machineId: 'machine-4' },
} as Act;
const sheet = projectSheet(sampleSheet, [opened], 'Imre');
const job = sheet.jobs[0] as SheetJob;

function entries(change: Partial<JobValues>, touched = Object.keys(change)) {
  const names = new Set(touched as (keyof JobValues)[]);
  return entriesFor(job, { ...jobValues(job), ...change }, names);
}

describe('what a job’s page records', () => {
  it('is nothing while nothing was changed', () => {
    expect(entries({})).toEqual([]);
    expect(entries({ finding: '', minutes: 0, mark: 'none' })).toEqual([]);
  });

  it('is one act for what belongs together', () => {
    expect(entries({ code: 'burnt', category: 'door', finding: ' Lock burnt out ' })).toEqual([
      {
        kind: 'finding',
        payload: { jobId: 'job', code: 'burnt', category: 'door', words: 'Lock burnt out' },
      },
    ]);
    expect(entries({ minutes: 25, accessMinutes: 20 })).toEqual([
      {
        kind: 'minutes',
        payload: { jobId: 'job', minutes: 25, afterHoursMinutes: 0, accessMinutes: 20 },
      },
    ]);
  });

  it('leaves alone what the person did not touch, whatever the page still shows', () => {
    expect(entries({ action: 'Lock fitted', minutes: 99 }, ['action'])).toEqual([
      { kind: 'action', payload: { jobId: 'job', words: 'Lock fitted' } },
    ]);
  });

  it('takes an emptied amount for none', () => {
    expect(entries({ cycles: 2, amount: null })).toEqual([
      { kind: 'test_cycle', payload: { jobId: 'job', cycles: 2, coins: 0, amount: 0 } },
    ]);
  });

  it('comes to what was entered when shown over the visit', () => {
    const entered: JobValues = {
      code: 'burnt',
      category: 'door',
      finding: 'Lock burnt out',
      cause: 'shop_error',
      action: 'Lock fitted',
      minutes: 35,
      afterHoursMinutes: 5,
      accessMinutes: 20,
      cycles: 1,
      coins: 8,
      amount: 200,
      mark: 'own_mistake',
      markWords: 'Hinge fitted crooked',
      causedByJobId: 'hinge job',
    };
    const acts = entries(entered).map((entry) => ({ ...entry, at: opened.at }) as Act);
    const after = projectSheet(sheet, acts, 'Imre').jobs[0] as SheetJob;
    expect(jobValues(after)).toEqual(entered);
  });
});
