import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Edition = AnswerOf<'editions.show'>;
export type PriceBook = Edition['book'];

@Injectable({ providedIn: 'root' })
export class PriceBookApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'editions.list'>) {
    return this.#api.call('editions.list', { query });
  }

  show(editionId: string) {
    return this.#api.call('editions.show', { params: { editionId } });
  }

  inForce(on?: string) {
    return this.#api.call('prices.inForce', { query: { on } });
  }

  create(body: BodyOf<'editions.create'>, key: string) {
    return this.#api.call('editions.create', { body, key });
  }
}
