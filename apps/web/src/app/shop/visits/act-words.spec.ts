import { actWords, withTicksTogether } from './act-words';
import { type Visit, type VisitAct } from './visits-api';

const visit = { jobList: [{ id: 'job', machine: { bay: 'A-04' } }] } as unknown as Visit;
const act = (kind: string, payload: Record<string, unknown> = {}): VisitAct => ({
  id: 'act',
  kind,
  at: '2031-05-06T15:30:00Z',
  receivedAt: '2031-05-06T15:30:01Z',
  by: 'Imre',
  payload,
});

describe('the record of a visit in words', () => {
  it('names the machine of a job’s act', () => {
    const found = act('finding', { jobId: 'job', code: 'burnt', words: 'Lock burnt out' });
    expect(actWords(found, visit)).toEqual({ bay: 'A-04', words: 'Found: burnt, Lock burnt out' });
    expect(actWords(act('arrived'), visit)).toEqual({ bay: null, words: 'Arrived' });
    expect(actWords(act('cause', { jobId: 'dropped', cause: 'wear' }), visit).bay).toBeNull();
  });

  it.each([
    [
      'minutes',
      { minutes: 35, accessMinutes: 20, afterHoursMinutes: 0 },
      'Took: 35 min, 20 min to get at it',
    ],
    [
      'part_used',
      { description: 'Door lock', quantityMilli: 2000, source: 'van' },
      'Fitted: 2 × Door lock, from van',
    ],
    [
      'part_used',
      { partId: 'x', source: 'shelf' },
      'Fitted: 1 × part of the price book, from shelf',
    ],
    ['test_cycle', { cycles: 1, coins: 8 }, 'Tested: 1 cycle, 8 coins'],
    [
      'warranty_marked',
      { mark: 'own_mistake', words: 'Hinge crooked' },
      'Marked as own mistake: Hinge crooked',
    ],
    ['warranty_marked', { mark: 'none' }, 'Took the warranty mark off'],
    [
      'job_done',
      { result: 'made_safe', machineState: 'locked_out' },
      'Done: made safe, left locked out',
    ],
    ['signed_off', { receivedBy: 'Noor' }, 'Signed off, received by Noor'],
    ['cautions_ticked', { cautions: ['isolate'] }, 'Ticked 1 caution'],
    ['kind_of_a_later_version', {}, 'kind of a later version'],
  ])('%s', (kind, payload, words) => {
    expect(actWords(act(kind, payload), visit).words).toBe(words);
  });

  it('puts ticks that follow one another together, and no others', () => {
    const tick = (jobId: string, caution: string) =>
      act('cautions_ticked', { jobId, cautions: [caution] });
    const acts = [
      act('arrived'),
      tick('job', 'isolate'),
      tick('job', 'prove_dead'),
      tick('other', 'isolate'),
      act('cause', { jobId: 'job', cause: 'wear' }),
      tick('job', 'let_cool'),
    ];
    const counts = withTicksTogether(acts).map(({ kind, payload }) => [
      kind,
      (payload['cautions'] as unknown[] | undefined)?.length,
    ]);
    expect(counts).toEqual([
      ['arrived', undefined],
      ['cautions_ticked', 2],
      ['cautions_ticked', 1],
      ['cause', undefined],
      ['cautions_ticked', 1],
    ]);
  });
});
