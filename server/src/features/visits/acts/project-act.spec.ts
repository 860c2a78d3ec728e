import { type DatedAct, emptyRecord, type VisitFacts, type VisitRecord } from './visit-record';
import { projectAct } from './project-act';
import { actAt, gasDryer, idOf, imre, sampleFacts, ticked, washer, zoe } from './sample-visit';

const jobId = idOf(100);
const opened = (minute = 1) => actAt(minute, 'job_opened', { jobId, machineId: washer });

function project(acts: DatedAct[], facts: VisitFacts = sampleFacts()) {
  const record = emptyRecord();
  const refusals = acts.map((act) => projectAct(record, act, facts, false));
  return { record, refusals, last: refusals.at(-1) };
}

function jobOf(record: VisitRecord) {
  return record.jobs.get(jobId);
}

describe('what an act does to the record of a visit', () => {
  it('arrives once for each person, and leaves', () => {
    const { record } = project([
      actAt(0, 'arrived', {}),
      actAt(1, 'arrived', {}),
      actAt(5, 'arrived', {}, zoe),
      actAt(60, 'left', {}),
      actAt(70, 'left', {}, zoe),
    ]);
    const minute = (m: number) => Date.parse('2031-05-06T09:00:00Z') + m * 60_000;
    expect(record.times).toEqual([
      { membershipId: imre.membershipId, arrivedAt: minute(0), leftAt: minute(60) },
      { membershipId: zoe.membershipId, arrivedAt: minute(5), leftAt: minute(70) },
    ]);
    expect(record).toMatchObject({ arrivedAt: minute(0), leftAt: minute(70), started: true });
  });

  it('does not let anybody leave who has not come', () => {
    expect(project([actAt(0, 'left', {})]).last).toBe('You have not arrived on this visit.');
  });

  it('records a job from its finding to how the machine is left', () => {
    const { record, refusals } = project([
      opened(),
      ticked(2, jobId),
      actAt(3, 'finding', { jobId, code: 'blocked', category: 'Inlet', words: 'Grit.' }),
      actAt(4, 'cause', { jobId, cause: 'supply' }),
      actAt(5, 'action', { jobId, words: 'Cleaned.' }),
      actAt(6, 'minutes', { jobId, minutes: 25, accessMinutes: 5 }),
      actAt(7, 'test_cycle', { jobId, cycles: 2, coins: 12, amount: 300 }),
      actAt(8, 'job_done', { jobId, result: 'put_right', machineState: 'up' }),
      actAt(9, 'signed_off', { receivedBy: 'Ines' }),
    ]);
    expect(refusals.filter(Boolean)).toEqual([]);
    expect(jobOf(record)).toMatchObject({
      finding: 'Grit.',
      findingCode: 'blocked',
      category: 'inlet',
      cause: 'supply',
      action: 'Cleaned.',
      minutes: 25,
      accessMinutes: 5,
      testCoins: 12,
      result: 'put_right',
      machineState: 'up',
    });
    expect(record.machineStates.get(washer)).toMatchObject({ state: 'up' });
    expect(record).toMatchObject({ receivedBy: 'Ines' });
    expect(record.completedAt).not.toBeNull();
  });

  it('says all of nothing found in one act, and needs no cautions for it', () => {
    const { record, last } = project([
      opened(),
      actAt(2, 'nothing_found', { jobId, minutes: 10, cycles: 1, coins: 8, amount: 200 }),
    ]);
    expect(last).toBeUndefined();
    expect(jobOf(record)).toMatchObject({
      cause: 'nothing_found',
      result: 'nothing_found',
      machineState: 'up',
      minutes: 10,
      testCycles: 1,
      testAmount: 200,
    });
  });

  it.each([
    ['finding', { jobId, words: 'Leaks.' }],
    ['action', { jobId, words: 'Seal replaced.' }],
    ['part_used', { jobId, partUseId: idOf(200), description: 'Seal', source: 'van' }],
  ] as const)('keeps the covers on until the cautions are ticked: %s', (kind, payload) => {
    const before = project([opened(), actAt(2, kind, payload)]);
    expect(before.last).toMatch(/^Tick the cautions for A-01 first: \d+ left\.$/);
    const some = actAt(2, 'cautions_ticked', { jobId, cautions: ['isolate', 'lock_and_tag'] });
    expect(project([opened(), some, actAt(3, kind, payload)]).last).toMatch(/Tick the cautions/);
    expect(project([opened(), ticked(2, jobId), actAt(3, kind, payload)]).last).toBeUndefined();
  });

  it('asks for the cautions of the machine’s own kind and energy', () => {
    const onGas = actAt(1, 'job_opened', { jobId, machineId: gasDryer });
    const found = actAt(3, 'finding', { jobId, words: 'Burner out.' });
    // A washer's cautions name no gas cock and no hot surface.
    expect(project([onGas, ticked(2, jobId), found]).last).toBe(
      'Tick the cautions for A-02 first: 2 left.',
    );
  });

  it('adds cautions up over several acts', () => {
    const all = ticked(2, jobId).act.payload as { cautions: string[] };
    const { record, last } = project([
      opened(),
      ...all.cautions.map((code, i) =>
        actAt(2 + i, 'cautions_ticked', { jobId, cautions: [code] }),
      ),
      actAt(20, 'finding', { jobId, words: 'Leaks.' }),
    ]);
    expect(last).toBeUndefined();
    expect(jobOf(record)?.cautionsAt).not.toBeNull();
  });

  it('takes minutes as all so far, and whose they are', () => {
    const acts = [
      opened(),
      actAt(2, 'minutes', { jobId, minutes: 20 }),
      actAt(3, 'minutes', { jobId, minutes: 35 }, zoe),
    ];
    const fromTheOffice = project(acts).record;
    expect(jobOf(fromTheOffice)).toMatchObject({ minutes: 35, membershipId: imre.membershipId });
    const there = project([actAt(0, 'arrived', {}, zoe), ...acts]).record;
    expect(jobOf(there)).toMatchObject({ minutes: 35, membershipId: zoe.membershipId });
  });

  it('opens one job on a machine', () => {
    const second = actAt(2, 'job_opened', { jobId: idOf(101), machineId: washer });
    expect(project([opened(), second]).last).toBe('A-01 has a job on this visit already.');
    const facts = sampleFacts({ machines: new Map() });
    expect(project([opened()], facts).last).toBe('The machine is not of this store.');
  });

  it('drops a job with its parts, and opens the machine again', () => {
    const { record, refusals } = project([
      opened(),
      ticked(2, jobId),
      actAt(3, 'part_used', { jobId, partUseId: idOf(200), description: 'Belt', source: 'van' }),
      actAt(4, 'job_dropped', { jobId }),
      actAt(5, 'job_opened', { jobId: idOf(101), machineId: washer }),
      actAt(6, 'minutes', { jobId, minutes: 5 }),
    ]);
    expect(refusals).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
      undefined,
      'The job was dropped.',
    ]);
    expect(record.parts.size).toBe(0);
    expect([...record.jobs.keys()]).toEqual([idOf(101)]);
  });

  it('keeps a job that somebody ruled on', () => {
    const facts = sampleFacts({ keptJobIds: new Set([jobId]) });
    expect(project([opened(), actAt(2, 'job_dropped', { jobId })], facts).last).toMatch(/stands/);
  });

  it('takes a part off again, but only from its own job', () => {
    const partUseId = idOf(200);
    const used = [
      opened(),
      ticked(2, jobId),
      actAt(3, 'part_used', { jobId, partUseId, description: 'Belt', source: 'van' }),
    ];
    const { record, last } = project([...used, actAt(4, 'part_removed', { jobId, partUseId })]);
    expect([last, record.parts.size]).toEqual([undefined, 0]);
    const other = actAt(4, 'part_removed', { jobId, partUseId: idOf(201) });
    expect(project([...used, other]).last).toBe('The part is not written down on this job.');
    const unknown = actAt(4, 'part_used', {
      jobId,
      partUseId: idOf(202),
      partId: idOf(300),
      source: 'van',
    });
    expect(project([...used, unknown]).last).toBe('The part is not in the price book.');
  });

  it('links a mark to an earlier job, and to no other', () => {
    const marked = (causedByJobId: string) =>
      actAt(2, 'warranty_marked', { jobId, mark: 'own_mistake', words: 'crooked', causedByJobId });
    const facts = sampleFacts({ causeIds: new Set([idOf(50)]) });
    const { record } = project([opened(), marked(idOf(50))], facts);
    expect(jobOf(record)).toMatchObject({
      mark: 'own_mistake',
      markWords: 'crooked',
      markedBy: 'Imre',
      causedByJobId: idOf(50),
    });
    expect(project([opened(), marked(idOf(51))], facts).last).toBe('There is no such earlier job.');
    expect(project([opened(), marked(jobId)], facts).last).toMatch(/itself/);
  });

  it.each([
    ['put_right', 'down', /A-01 cannot be put right and down/],
    ['made_safe', 'up', /A-01 cannot be made safe and up/],
    ['put_right', 'up', /Say first what the cause was on A-01/],
  ] as const)('refuses what cannot be: %s and %s', (result, machineState, why) => {
    expect(project([opened(), actAt(2, 'job_done', { jobId, result, machineState })]).last).toMatch(
      why,
    );
  });

  it('completes no visit with a machine left open', () => {
    expect(project([opened(), actAt(2, 'signed_off', {})]).last).toBe('A-01 has no result yet.');
  });

  it('hands over and settles open items', () => {
    const openItemId = idOf(400);
    const facts = sampleFacts({ openItemIds: new Set([idOf(401)]) });
    const { record, refusals } = project(
      [
        actAt(1, 'handed_over', { openItemId, machineId: washer, words: 'Order a seal.' }),
        actAt(2, 'open_item_done', { openItemId: idOf(401) }),
        actAt(3, 'open_item_done', { openItemId: idOf(402) }),
      ],
      facts,
    );
    expect(refusals).toEqual([undefined, undefined, 'There is no such open item at this store.']);
    expect(record.openItems.get(openItemId)).toMatchObject({ words: 'Order a seal.' });
    expect([...record.itemsDone.keys()]).toEqual([idOf(401)]);
  });

  it('refuses a photo of something else', () => {
    const facts = sampleFacts({ photoOwners: new Map([[idOf(500), idOf(999)]]) });
    const photo = actAt(2, 'photo', { jobId, attachmentId: idOf(500) });
    expect(project([opened(), photo], facts).last).toBe('The photo belongs to something else.');
    expect(project([opened(), photo]).last).toBeUndefined();
  });

  it('leaves the record as it was when it refuses', () => {
    const acts = [opened(), actAt(2, 'finding', { jobId, words: 'Leaks.' })];
    const { record } = project(acts);
    expect(record).toEqual(project(acts.slice(0, 1)).record);
  });
});
