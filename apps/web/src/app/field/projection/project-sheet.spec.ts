import { cautionsFor } from '@lib/domain/cautions/cautions';
import { type SheetJob } from '../kept/kept';
import { type Act, type ActKind, type PayloadOf } from '../outbox/local-act';
import { projectSheet } from './project-sheet';
import { sampleSheet } from './sample-sheet';

let minute = 0;
function act<K extends ActKind>(kind: K, payload: PayloadOf<K>): Act {
  const at = new Date(Date.UTC(2031, 4, 6, 15, 30 + minute++)).toISOString();
  return { id: `act ${minute}`, kind, at, payload } as unknown as Act;
}

const opened = () =>
  act('job_opened', {
    jobId: 'job',
    machineId: 'machine-4',
    callId: 'call',
    symptom: 'wont_lock',
  });
const after = (...acts: Act[]) => projectSheet(sampleSheet, acts, 'Imre');
const jobAfter = (...acts: Act[]) => after(opened(), ...acts).jobs[0] as SheetJob;
const codes = cautionsFor('top_loader', 'electric').map(({ code }) => code);

describe('what was recorded on the device, shown over the kept visit', () => {
  beforeEach(() => (minute = 0));

  it('changes nothing of the kept visit itself', () => {
    const before = JSON.stringify(sampleSheet);
    after(act('arrived', {}), opened(), act('job_dropped', { jobId: 'job' }));
    expect(JSON.stringify(sampleSheet)).toBe(before);
  });

  it('begins a visit by arriving, or by the first job', () => {
    expect(after(act('arrived', {})).visit).toMatchObject({
      state: 'in_process',
      arrivedAt: '2031-05-06T15:30:00.000Z',
    });
    expect(after(opened()).visit).toMatchObject({ state: 'in_process', arrivedAt: null });
    const first = act('arrived', {});
    const twice = after(first, act('arrived', {}));
    expect(twice.visit.arrivedAt).toBe(first.at);
  });

  it('ends it by leaving and signing off', () => {
    const { visit } = after(act('arrived', {}), act('left', {}), act('signed_off', {}));
    expect(visit).toMatchObject({ state: 'completed', leftAt: '2031-05-06T15:31:00.000Z' });
  });

  it('opens one job on a machine, however often', () => {
    const again = act('job_opened', { jobId: 'other', machineId: 'machine-4' });
    const next = act('job_opened', { jobId: 'next', machineId: 'machine-3' });
    const elsewhere = act('job_opened', { jobId: 'lost', machineId: 'machine of another store' });
    const { jobs } = after(opened(), opened(), again, elsewhere, next);
    expect(jobs.map(({ id, position }) => [id, position])).toEqual([
      ['job', 1],
      ['next', 2],
    ]);
    expect(jobs[0]).toMatchObject({ callId: 'call', symptom: 'wont_lock' });
  });

  it('adds ticked cautions up, and notes when the last one was ticked', () => {
    const [first, ...rest] = codes as [string, ...string[]];
    const some = jobAfter(act('cautions_ticked', { jobId: 'job', cautions: [first] }));
    expect(some.shop).toMatchObject({ cautions: [first], cautionsAt: null });
    const last = act('cautions_ticked', { jobId: 'job', cautions: [first, ...rest] });
    const all = jobAfter(
      act('cautions_ticked', { jobId: 'job', cautions: [first] }),
      last,
      act('cautions_ticked', { jobId: 'job', cautions: [first] }),
    );
    expect(all.shop?.cautions).toEqual(codes);
    expect(all.shop?.cautionsAt).toBe(last.at);
  });

  it('shows the last word on each thing', () => {
    const job = jobAfter(
      act('finding', { jobId: 'job', code: 'burnt', category: 'door', words: 'Lock burnt out' }),
      act('finding', { jobId: 'job', code: 'burnt', words: 'Lock burnt out, latch off centre' }),
      act('cause', { jobId: 'job', cause: 'wear' }),
      act('cause', { jobId: 'job', cause: 'shop_error' }),
      act('action', { jobId: 'job', words: 'Lock fitted' }),
      act('minutes', { jobId: 'job', minutes: 20 }),
      act('minutes', { jobId: 'job', minutes: 35, accessMinutes: 20 }),
      act('test_cycle', { jobId: 'job', cycles: 1, coins: 8, amount: 200 }),
    );
    expect(job).toMatchObject({
      finding: 'Lock burnt out, latch off centre',
      category: null,
      cause: 'shop_error',
      action: 'Lock fitted',
      testCycles: 1,
      testAmount: 200,
      shop: { minutes: 35, accessMinutes: 20, afterHoursMinutes: 0 },
    });
  });

  it('counts a repeated part once, and takes a removed one away', () => {
    const used = (partUseId: string) =>
      act('part_used', { jobId: 'job', partUseId, description: 'Door lock', source: 'van' });
    const job = jobAfter(
      used('a'),
      used('b'),
      used('a'),
      act('part_removed', { jobId: 'job', partUseId: 'b' }),
    );
    expect(job.parts).toEqual([
      expect.objectContaining({ id: 'a', quantityMilli: 1000, source: 'van' }),
    ]);
  });

  it('names the job that brought it about', () => {
    const mark = act('warranty_marked', {
      jobId: 'job',
      mark: 'own_mistake',
      words: 'Hinge fitted crooked',
      causedByJobId: 'hinge job',
    });
    expect(jobAfter(mark).shop).toMatchObject({
      mark: 'own_mistake',
      markedBy: 'Imre',
      causedBy: { jobId: 'hinge job', reference: '0398/2', words: 'Hinge fitted' },
    });
  });

  it('says in one act that nothing was found', () => {
    const found = act('nothing_found', {
      jobId: 'job',
      minutes: 10,
      cycles: 1,
      coins: 8,
      amount: 200,
    });
    expect(jobAfter(found)).toMatchObject({
      cause: 'nothing_found',
      result: 'nothing_found',
      machineState: 'up',
      testCoins: 8,
      doneAt: found.at,
      shop: { minutes: 10 },
    });
  });

  it('draws the machine as it was left', () => {
    const done = act('job_done', { jobId: 'job', result: 'made_safe', machineState: 'locked_out' });
    const sheet = after(opened(), done);
    expect(sheet.machines.map(({ state }) => state)).toEqual(['down', 'locked_out']);
    expect(sheet.jobs[0]).toMatchObject({ result: 'made_safe', machineState: 'locked_out' });
  });

  it('hands over and works off open items', () => {
    const words = 'Order the long hose';
    const { openItems } = after(
      act('open_item_done', { openItemId: 'item' }),
      act('handed_over', { openItemId: 'new', machineId: 'machine-3', words }),
      act('handed_over', { openItemId: 'new', machineId: 'machine-3', words }),
    );
    expect(openItems).toHaveLength(2);
    expect(openItems[0]?.doneAt).toBe('2031-05-06T15:30:00.000Z');
    expect(openItems[1]).toMatchObject({ words, machine: { bay: 'A-03' }, visitId: 'visit' });
  });

  it('comes to the same when the acts are shown over a visit that has them already', () => {
    const acts = [
      opened(),
      act('cautions_ticked', { jobId: 'job', cautions: codes }),
      act('part_used', { jobId: 'job', partUseId: 'a', description: 'Lock', source: 'van' }),
      act('minutes', { jobId: 'job', minutes: 35 }),
      act('job_done', { jobId: 'job', result: 'put_right', machineState: 'up' }),
    ];
    const once = after(...acts);
    expect(projectSheet(once, acts, 'Imre')).toEqual(once);
  });
});
