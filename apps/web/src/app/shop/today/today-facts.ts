import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type Permission } from '@lib/contracts/web';
import { catchError, forkJoin, map, type Observable, of } from 'rxjs';
import { Api } from '../../core/api/api';
import { Session } from '../../core/session/session';

/** What the day is judged by. What may not be seen, or did not load, is absent. */
export interface TodayFacts {
  readonly calls?: AnswerOf<'calls.list'>;
  readonly rulings?: AnswerOf<'rulings.waiting'>;
  readonly unticketed?: AnswerOf<'visits.list'>;
  readonly day?: AnswerOf<'visits.daySheet'>;
  readonly close?: AnswerOf<'statements.closePreview'>;
  readonly runs?: AnswerOf<'statements.runs'>;
  readonly failedMails?: AnswerOf<'deliveries.list'>;
  readonly uncertainMails?: AnswerOf<'deliveries.list'>;
  readonly overdue?: AnswerOf<'receivables.list'>;
  readonly notUp?: AnswerOf<'machines.list'>;
  readonly imports?: AnswerOf<'imports.list'>;
  readonly subscription?: AnswerOf<'subscription.show'>;
  readonly invitations?: AnswerOf<'invitations.list'>;
  readonly shop?: AnswerOf<'shop.show'>;
  /** How many of them did not load. */
  readonly missing: number;
}

const failed = Symbol('failed');

@Injectable({ providedIn: 'root' })
export class TodayApi {
  readonly #api = inject(Api);
  readonly #session = inject(Session);

  facts(): Observable<TodayFacts> {
    const one = { limit: 1 };
    return forkJoin({
      calls: this.#ask('calls.read', () =>
        this.#api.call('calls.list', { query: { state: 'open', limit: 5 } }),
      ),
      rulings: this.#ask('rulings.read', () => this.#api.call('rulings.waiting', { query: one })),
      unticketed: this.#ask('tickets.sign_off', () =>
        this.#api.call('visits.list', { query: { state: 'unticketed', ...one } }),
      ),
      day: this.#ask('visits.plan', () => this.#api.call('visits.daySheet')),
      close: this.#ask('statements.close', () => this.#api.call('statements.closePreview')),
      runs: this.#ask('statements.close', () => this.#api.call('statements.runs', { query: one })),
      failedMails: this.#mails('failed'),
      uncertainMails: this.#mails('uncertain'),
      overdue: this.#ask('ledger.read', () =>
        this.#api.call('receivables.list', { query: { overdue: 'true', ...one } }),
      ),
      notUp: this.#ask('machines.read', () =>
        this.#api.call('machines.list', { query: { state: 'not_up', ...one } }),
      ),
      imports: this.#ask('imports.run', () =>
        this.#api.call('imports.list', { query: { limit: 10 } }),
      ),
      subscription: this.#ask('subscription.read', () => this.#api.call('subscription.show')),
      invitations: this.#ask('invitations.manage', () =>
        this.#api.call('invitations.list', { query: { state: 'run_out', ...one } }),
      ),
      shop: this.#ask('settings.read', () => this.#api.call('shop.show')),
    }).pipe(map(withoutFailures));
  }

  #mails(state: 'failed' | 'uncertain') {
    return this.#ask('deliveries.read', () =>
      this.#api.call('deliveries.list', { query: { state, limit: 1 } }),
    );
  }

  /** One part that fails must not keep the others from being seen. */
  #ask<A>(
    permission: Permission,
    call: () => Observable<A>,
  ): Observable<A | undefined | typeof failed> {
    if (!this.#session.may(permission)) return of(undefined);
    return call().pipe(catchError(() => of(failed as typeof failed)));
  }
}

type Loaded<R> = { [K in keyof R]?: Exclude<R[K], typeof failed | undefined> };

function withoutFailures<R extends object>(answers: R): Loaded<R> & { missing: number } {
  const entries = Object.entries(answers);
  const loaded = entries.filter(([, answer]) => answer !== failed && answer !== undefined);
  const missing = entries.filter(([, answer]) => answer === failed).length;
  return { ...(Object.fromEntries(loaded) as Loaded<R>), missing };
}
