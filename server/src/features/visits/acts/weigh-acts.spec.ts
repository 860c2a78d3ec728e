import fc from 'fast-check';
import { actAt, gasDryer, idOf, sampleFacts, ticked, washer, zoe } from './sample-visit';
import { type DatedAct } from './visit-record';
import { weighActs } from './weigh-acts';

const jobId = idOf(100);
const whole = (): DatedAct[] => [
  actAt(0, 'arrived', {}),
  actAt(1, 'job_opened', { jobId, machineId: washer }),
  ticked(2, jobId),
  actAt(3, 'finding', { jobId, words: 'Leaks.' }),
  actAt(4, 'cause', { jobId, cause: 'wear' }),
  actAt(5, 'minutes', { jobId, minutes: 20 }),
  actAt(6, 'minutes', { jobId, minutes: 30 }),
  actAt(7, 'job_done', { jobId, result: 'put_right', machineState: 'up' }),
  actAt(8, 'signed_off', {}),
];

describe('acts that arrive', () => {
  it('are laid in the order they happened, in whatever order they come', () => {
    const acts = whole();
    const inOrder = weighActs(sampleFacts(), [], acts);
    fc.assert(
      fc.property(fc.shuffledSubarray(acts, { minLength: acts.length }), (shuffled) => {
        const { record, refused, accepted } = weighActs(sampleFacts(), [], shuffled);
        expect(record).toEqual(inOrder.record);
        expect(refused.size).toBe(0);
        expect(accepted.map((dated) => dated.act.id)).toEqual(acts.map((dated) => dated.act.id));
      }),
    );
  });

  it('come to the same record however they are split into deliveries', () => {
    const acts = whole();
    const atOnce = weighActs(sampleFacts(), [], acts).record;
    fc.assert(
      fc.property(fc.nat(acts.length), (cut) => {
        const first = weighActs(sampleFacts(), [], acts.slice(0, cut));
        const second = weighActs(sampleFacts(), first.accepted, acts.slice(cut));
        expect(second.record).toEqual(atOnce);
      }),
    );
  });

  it('fall into place when they are older than what is stored', () => {
    const late = actAt(5.5, 'minutes', { jobId, minutes: 99 }, zoe);
    const { record, accepted } = weighActs(sampleFacts(), whole(), [late]);
    expect(accepted).toEqual([late]);
    // The later word of 30 minutes stands.
    expect(record.jobs.get(jobId)?.minutes).toBe(30);
  });

  it('may tell of another machine after the visit was completed', () => {
    const other = idOf(101);
    const late = [
      actAt(3, 'job_opened', { jobId: other, machineId: gasDryer }, zoe),
      actAt(6, 'nothing_found', { jobId: other, minutes: 10, cycles: 1, coins: 0 }, zoe),
    ];
    const { record, refused } = weighActs(sampleFacts(), whole(), late);
    expect(refused.size).toBe(0);
    expect(record.jobs.get(other)?.result).toBe('nothing_found');
    expect(record.completedAt).not.toBeNull();
  });

  it('are refused one by one, and the others go on', () => {
    const wrong = actAt(1.5, 'minutes', { jobId: idOf(7), minutes: 5 });
    const { accepted, refused } = weighActs(sampleFacts(), [], [...whole(), wrong]);
    expect([...refused]).toEqual([[wrong.act.id, 'There is no such job.']]);
    expect(accepted).toHaveLength(whole().length);
  });

  it('are refused when later acts rest on what they would undo', () => {
    const drop = actAt(2.5, 'job_dropped', { jobId });
    const stored = whole().slice(0, 5);
    expect([...weighActs(sampleFacts(), stored, [drop]).refused.values()]).toEqual([
      'Later acts of this visit rest on it.',
    ]);
  });

  it.each([
    [{ ticket: 'T-0042' }, /^Ticket T-0042 is signed off/],
    [{ cancelled: true }, /^The visit was cancelled/],
    [{ latest: Date.parse('2031-05-06T09:00:30Z') }, /clock of the device/],
    [{ takenIds: new Set([jobId]) }, /^The job belongs to another visit/],
  ])('are refused whatever they say: %j', (facts, why) => {
    const { refused, accepted } = weighActs(sampleFacts(facts), [], whole().slice(1, 2));
    expect(accepted).toEqual([]);
    expect([...refused.values()][0]).toMatch(why);
  });

  it('never overturn what was stored, even when a machine was taken out since', () => {
    const stored = whole();
    const { record, refused } = weighActs(sampleFacts({ machines: new Map() }), stored, [
      actAt(9, 'left', {}),
    ]);
    expect(refused.size).toBe(0);
    expect(record.jobs.get(jobId)?.result).toBe('put_right');
  });
});
