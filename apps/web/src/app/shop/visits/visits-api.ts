import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Visit = AnswerOf<'visits.show'>;
export type VisitItem = AnswerOf<'visits.list'>['items'][number];
export type VisitJob = Visit['jobList'][number];
export type VisitAct = AnswerOf<'acts.list'>['items'][number];
type Versioned = Pick<Visit, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class VisitsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'visits.list'>) {
    return this.#api.call('visits.list', { query });
  }

  show(visitId: string) {
    return this.#api.call('visits.show', { params: { visitId } });
  }

  acts(visitId: string) {
    return this.#api.call('acts.list', { params: { visitId } });
  }

  daySheet(on?: string) {
    return this.#api.call('visits.daySheet', { query: on ? { on } : {} });
  }

  plan(body: BodyOf<'visits.plan'>, key: string) {
    return this.#api.call('visits.plan', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'visits.change'>) {
    return this.#api.call('visits.change', { params: { visitId: id }, body, ifMatch: version });
  }

  confirm({ id, version }: Versioned) {
    return this.#api.call('visits.confirm', { params: { visitId: id }, ifMatch: version });
  }

  cancel({ id, version }: Versioned, words: string) {
    return this.#api.call('visits.cancel', {
      params: { visitId: id },
      body: { words },
      ifMatch: version,
    });
  }
}
