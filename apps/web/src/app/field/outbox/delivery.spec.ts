import { Problem, type ProblemKind } from '../../core/api/problem';
import { type ActResult, type Courier, deliverVisit } from './delivery';
import { type Act, type LocalAct } from './local-act';

let made = 0;
function local(kind: string, payload: object = { jobId: 'job' }): LocalAct {
  const id = `act-${++made}`;
  const act = { id, kind, at: '2031-05-06T10:30:00Z', payload } as unknown as Act;
  const rest = { state: 'waiting', reason: '', answeredAt: null } as const;
  return { id, order: made, visitId: 'visit', act, ...rest };
}

const photo = (attachmentId: string) => local('photo', { jobId: 'job', attachmentId });
const problem = (kind: ProblemKind, status: number, detail?: string) =>
  new Problem(kind, status, 'Title', detail);

/** A server that notes what arrives, in order, and answers as it is told. */
class Server implements Courier {
  readonly arrived: string[] = [];
  answer: (acts: Act[]) => ActResult[] = (acts) =>
    acts.map(({ id }) => ({ id, outcome: 'stored', reason: null }));
  uploading: (photoId: string) => void = () => undefined;

  record(_visitId: string, acts: Act[]): Promise<ActResult[]> {
    return Promise.resolve().then(() => {
      const results = this.answer(acts);
      this.arrived.push(acts.map(({ kind }) => kind).join('+'));
      return results;
    });
  }

  upload(photoId: string): Promise<void> {
    return Promise.resolve().then(() => {
      this.uploading(photoId);
      this.arrived.push(`upload ${photoId}`);
    });
  }
}

class Kept {
  readonly sent: string[] = [];
  readonly reasons = new Map<string, string>();

  taken(ids: readonly string[]): Promise<void> {
    this.sent.push(...ids);
    return Promise.resolve();
  }

  refused(ids: readonly string[], reason: string): Promise<void> {
    for (const id of ids) this.reasons.set(id, reason);
    return Promise.resolve();
  }
}

describe('delivering the acts of a visit', () => {
  let server: Server;
  let kept: Kept;

  beforeEach(() => {
    server = new Server();
    kept = new Kept();
  });

  it('sends words first, then photos, and ends the visit last', async () => {
    const acts = [
      local('arrived', {}),
      local('job_opened', { jobId: 'job', machineId: 'machine' }),
      photo('p1'),
      local('finding', { jobId: 'job', words: 'Lock burnt out' }),
      local('left', {}),
      photo('p2'),
      local('signed_off', {}),
    ];
    expect(await deliverVisit(acts, server, kept)).toBeUndefined();
    expect(server.arrived).toEqual([
      'arrived+job_opened+finding',
      'upload p1',
      'photo',
      'upload p2',
      'photo',
      'left+signed_off',
    ]);
    expect([...kept.sent].sort()).toEqual(acts.map(({ id }) => id).sort());
  });

  it('takes a repeated act for sent, and keeps a refused one with the reason', async () => {
    const acts = [local('arrived', {}), local('cause'), local('action')];
    server.answer = ([first, second, third]) => [
      { id: first?.id ?? '', outcome: 'repeated', reason: null },
      { id: second?.id ?? '', outcome: 'refused', reason: 'The visit is completed.' },
      { id: third?.id ?? '', outcome: 'stored', reason: null },
    ];
    await deliverVisit(acts, server, kept);
    expect(kept.sent).toEqual([acts[0]?.id, acts[2]?.id]);
    expect(kept.reasons.get(acts[1]?.id ?? '')).toBe('The visit is completed.');
  });

  it.each([
    ['no answer', problem('no-answer', 0)],
    ['a fault of the server', problem('internal', 500)],
    ['an ended session', problem('not-signed-in', 401)],
    ['too many requests', problem('too-many-requests', 429)],
    ['a paused shop', problem('shop-paused', 403)],
  ])('keeps everything waiting after %s', async (_, held) => {
    server.answer = () => {
      throw held;
    };
    const acts = [local('arrived', {}), photo('p1'), local('left', {})];
    expect(await deliverVisit(acts, server, kept)).toBe(held);
    expect(kept.sent).toEqual([]);
    expect(kept.reasons.size).toBe(0);
    expect(server.arrived).toEqual([]);
  });

  it('does not end the visit while a photo is still to come', async () => {
    server.uploading = () => {
      throw problem('no-answer', 0);
    };
    const acts = [local('cause'), photo('p1'), local('left', {})];
    expect((await deliverVisit(acts, server, kept))?.kind).toBe('no-answer');
    expect(server.arrived).toEqual(['cause']);
    expect(kept.sent).toEqual([acts[0]?.id]);
  });

  it('finds the one act that cannot be read, and sends the others', async () => {
    const acts = ['cause', 'action', 'bad', 'minutes', 'finding'].map((kind) => local(kind));
    server.answer = (sent) => {
      if (sent.some(({ kind }) => (kind as string) === 'bad')) {
        throw new Problem('invalid-request', 422, 'Some values are not right', undefined, [
          { pointer: '/acts/0/payload/words', detail: 'is too long' },
        ]);
      }
      return sent.map(({ id }) => ({ id, outcome: 'stored', reason: null }));
    };
    expect(await deliverVisit(acts, server, kept)).toBeUndefined();
    const bad = acts[2]?.id ?? '';
    expect(kept.sent).toEqual(acts.map(({ id }) => id).filter((id) => id !== bad));
    expect([...kept.reasons]).toEqual([[bad, 'Some values are not right: is too long.']]);
  });

  it('says so once for all when the visit was given to somebody else', async () => {
    server.answer = () => {
      throw problem('not-found', 404);
    };
    const acts = [local('arrived', {}), local('cause')];
    expect(await deliverVisit(acts, server, kept)).toBeUndefined();
    expect(new Set(kept.reasons.values())).toEqual(
      new Set(['This visit is no longer yours, or is not there any more.']),
    );
    expect(kept.reasons.size).toBe(2);
  });

  it('keeps a photo the server does not take, and goes on', async () => {
    server.uploading = (id) => {
      if (id === 'p1') throw problem('unsupported-content', 415, 'Only JPEG, PNG and WebP.');
    };
    const acts = [photo('p1'), photo('p2'), local('left', {})];
    expect(await deliverVisit(acts, server, kept)).toBeUndefined();
    expect(kept.reasons.get(acts[0]?.id ?? '')).toBe('Only JPEG, PNG and WebP.');
    expect(kept.sent).toEqual([acts[1]?.id, acts[2]?.id]);
  });

  it('sends a long day in several requests', async () => {
    const acts = Array.from({ length: 250 }, () => local('cause'));
    await deliverVisit(acts, server, kept);
    expect(server.arrived.map((words) => words.split('+').length)).toEqual([100, 100, 50]);
  });
});
