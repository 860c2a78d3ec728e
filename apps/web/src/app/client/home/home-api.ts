import { inject, Injectable } from '@angular/core';
import { type AnswerOf } from '@lib/contracts/web';
import { forkJoin, map, of } from 'rxjs';
import { Api } from '../../core/api/api';
import { Session } from '../../core/session/session';

export type StoreSummary = AnswerOf<'stores.list'>['items'][number];
export type MachineSummary = AnswerOf<'machines.list'>['items'][number];
export type VisitItem = AnswerOf<'visits.list'>['items'][number];
export type Call = AnswerOf<'calls.list'>['items'][number];
export type Balance = AnswerOf<'balances.list'>['items'][number];

export interface HomeFacts {
  readonly stores: readonly StoreSummary[];
  /** Machines that stand still or run with a fault. */
  readonly notUp: readonly MachineSummary[];
  /** Visits to come, the next one first. */
  readonly visits: readonly VisitItem[];
  /** Calls that are not done. */
  readonly calls: readonly Call[];
  /** Null for who sees no money. */
  readonly balances: readonly Balance[] | null;
}

const most = 100;

@Injectable({ providedIn: 'root' })
export class HomeApi {
  readonly #api = inject(Api);
  readonly #session = inject(Session);

  /** All that the home page says at once, so that nothing on it moves when a part comes later. */
  facts() {
    const items = <T>({ items }: { items: T }) => items;
    return forkJoin({
      stores: this.#api.call('stores.list', { query: { limit: most } }).pipe(map(items)),
      notUp: this.#api
        .call('machines.list', { query: { state: 'not_up', limit: most } })
        .pipe(map(items)),
      visits: this.#api
        .call('visits.list', { query: { state: 'live', sort: 'plannedOn', limit: most } })
        .pipe(map(items)),
      calls: this.#api
        .call('calls.list', { query: { state: 'live', limit: most } })
        .pipe(map(items)),
      balances: this.#session.may('statements.read')
        ? this.#api.call('balances.list', { query: { limit: most } }).pipe(map(items))
        : of(null),
    });
  }

  openItems(storeIds: readonly string[]) {
    if (storeIds.length === 0) return of([]);
    const shown = storeIds.map((storeId) => this.#api.call('stores.show', { params: { storeId } }));
    return forkJoin(shown).pipe(map((stores) => stores.flatMap((store) => store.openItems)));
  }

  lastVisits(limit: number) {
    return this.#api
      .call('visits.list', { query: { state: 'completed', sort: '-plannedOn', limit } })
      .pipe(map(({ items }) => items));
  }

  visit(visitId: string) {
    return this.#api.call('visits.show', { params: { visitId } });
  }
}
