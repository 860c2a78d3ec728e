import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { anAnswer } from '../../testing/session';
import { Session } from '../session/session';
import { Live, type LiveEvent } from './live';
import { EventReader } from './sse';

describe('EventReader', () => {
  it('reads events wherever the pieces end', () => {
    const reader = new EventReader();
    const text =
      'retry: 2000\n: following\n\nevent: visit\ndata: {"kind":"visit",\ndata: "id":"v1"}\n\n';
    const events = [...text].flatMap((letter) => reader.read(letter));
    expect(events).toEqual([{ event: 'visit', data: '{"kind":"visit",\n"id":"v1"}' }]);
  });

  it('reads lines however they end, and fields with and without a blank', () => {
    const reader = new EventReader();
    expect(reader.read('data:a\r\ndata: b\r\n\r\nevent\n\ndata: c\n\n')).toEqual([
      { event: 'message', data: 'a\nb' },
      { event: 'message', data: 'c' },
    ]);
  });
});

describe('Live', () => {
  const originals = { fetch: globalThis.fetch, random: Math.random };
  const asked: (string | null)[] = [];
  let answers: (() => Promise<Response>)[];

  /** The test world has no streams; this is as much of one as is read. */
  const streamOf = (...pieces: string[]) => ({
    getReader: () => ({
      read: () => {
        const piece = pieces.shift();
        const value = piece === undefined ? undefined : new Uint8Array(Buffer.from(piece));
        return Promise.resolve({ done: piece === undefined, value });
      },
    }),
  });
  const answer = (status: number, ...pieces: string[]) =>
    Promise.resolve({ ok: status < 300, status, body: streamOf(...pieces) } as unknown as Response);

  beforeEach(() => {
    jest.useFakeTimers();
    asked.length = 0;
    Math.random = () => 0.5;
    globalThis.fetch = (_url, options) => {
      asked.push(new Map(Object.entries(options?.headers ?? {})).get('Authorization') ?? null);
      return answers.shift()?.() ?? new Promise(() => undefined);
    };
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting()],
    });
    TestBed.inject(Session).take(anAnswer());
  });

  afterEach(() => {
    jest.useRealTimers();
    Object.assign(globalThis, { fetch: originals.fetch });
    Math.random = originals.random;
  });

  it('tells what changed, once for all who follow, with the token', async () => {
    answers = [
      () =>
        answer(200, 'data: {"kind":"visit","id":"v1"}\n\n', 'data: {"kind":"call","id":"c1"}\n\n'),
    ];
    const visits: LiveEvent[] = [];
    const all: LiveEvent[] = [];
    const live = TestBed.inject(Live);
    live.of('visit').subscribe((event) => visits.push(event));
    live.events.subscribe((event) => all.push(event));
    await jest.advanceTimersByTimeAsync(10);
    expect(visits).toEqual([{ kind: 'visit', id: 'v1' }]);
    expect(all).toHaveLength(2);
    expect(asked).toEqual(['Bearer token-1']);
  });

  it('connects again after a break, and says that something may have been missed', async () => {
    answers = [
      () => answer(200),
      () => Promise.reject(new TypeError('no network')),
      () => answer(503),
      () => answer(200),
    ];
    const visits: LiveEvent[] = [];
    const following = TestBed.inject(Live)
      .of('visit')
      .subscribe((event) => visits.push(event));
    await jest.advanceTimersByTimeAsync(1_000);
    expect(visits).toEqual([]);
    await jest.advanceTimersByTimeAsync(2_000 + 4_000);
    expect(visits).toEqual([{ kind: 'missed', id: null }]);
    following.unsubscribe();
    const before = asked.length;
    await jest.advanceTimersByTimeAsync(120_000);
    expect(asked).toHaveLength(before);
  });
});
