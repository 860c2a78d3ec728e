import { TestBed } from '@angular/core/testing';
import { type OperationId } from '@lib/contracts/web';
import { EMPTY, type Observable, of, throwError } from 'rxjs';
import { Api } from '../core/api/api';
import { Problem } from '../core/api/problem';
import { Live } from '../core/live/live';

interface Asked {
  readonly id: OperationId;
  readonly sent: Sent;
}

interface Sent {
  readonly params?: Record<string, string>;
  readonly query?: Record<string, unknown>;
  readonly body?: unknown;
  readonly ifMatch?: number;
}

/** An answer, a refusal, or what makes one of what was asked. */
export type Answer = object | ((sent: Sent) => object);

/**
 * A server for pages that load what they show: it answers each operation at once, as the spec says,
 * and remembers what was asked. (A page over a server that lets it wait is never stable.)
 */
export class AnsweringApi {
  readonly asked: Asked[] = [];

  private constructor(readonly answers: Partial<Record<OperationId, Answer>>) {}

  /** Call it before the page is opened. */
  static provide(answers: Partial<Record<OperationId, Answer>>): AnsweringApi {
    const api = new AnsweringApi(answers);
    TestBed.overrideProvider(Api, { useValue: api });
    // Nothing changes meanwhile, and nobody listens for an hour.
    TestBed.overrideProvider(Live, { useValue: { of: () => EMPTY, events: EMPTY } });
    return api;
  }

  /** What was sent with an operation, each time it was asked. */
  sent(id: OperationId): readonly Sent[] {
    return this.asked.filter((asked) => asked.id === id).map(({ sent }) => sent);
  }

  call(id: OperationId, sent: Sent = {}): Observable<object> {
    this.asked.push({ id, sent });
    const answer = this.answers[id];
    if (!answer) return throwError(() => new Error(`The spec has no answer for ${id}`));
    const given = typeof answer === 'function' ? (answer as (sent: Sent) => object)(sent) : answer;
    return given instanceof Problem ? throwError(() => given) : of(given);
  }

  callWith(_context: unknown, id: OperationId, sent?: Sent): Observable<object> {
    return this.call(id, sent);
  }
}

/** A page of a list that has no other. */
export function onePage(items: readonly object[]): object {
  return { items, next: null, count: { value: items.length, capped: false } };
}
