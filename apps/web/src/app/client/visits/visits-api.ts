import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Visit = AnswerOf<'visits.show'>;
export type VisitItem = AnswerOf<'visits.list'>['items'][number];
export type Job = Visit['jobList'][number];

@Injectable({ providedIn: 'root' })
export class VisitsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'visits.list'>) {
    return this.#api.call('visits.list', { query });
  }

  show(visitId: string) {
    return this.#api.call('visits.show', { params: { visitId } });
  }
}
