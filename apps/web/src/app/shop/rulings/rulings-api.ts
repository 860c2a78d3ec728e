import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Rulings = AnswerOf<'rulings.show'>;
export type RulingJob = Rulings['jobs'][number];
export type RulingLine = RulingJob['lines'][number];
export type WaitingVisit = AnswerOf<'rulings.waiting'>['items'][number];

@Injectable({ providedIn: 'root' })
export class RulingsApi {
  readonly #api = inject(Api);

  waiting(query: QueryOf<'rulings.waiting'>) {
    return this.#api.call('rulings.waiting', { query });
  }

  show(visitId: string) {
    return this.#api.call('rulings.show', { params: { visitId } });
  }

  confirm(visitId: string, body: BodyOf<'rulings.confirm'>, key: string) {
    return this.#api.call('rulings.confirm', { params: { visitId }, body, key });
  }

  overrule(visitId: string, body: BodyOf<'rulings.overrule'>, key: string) {
    return this.#api.call('rulings.overrule', { params: { visitId }, body, key });
  }
}
