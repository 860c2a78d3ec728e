import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type StoreSummary = AnswerOf<'stores.list'>['items'][number];
export type Store = AnswerOf<'stores.show'>;

@Injectable({ providedIn: 'root' })
export class FloorsApi {
  readonly #api = inject(Api);

  stores(query: QueryOf<'stores.list'> = {}) {
    return this.#api.call('stores.list', { query });
  }

  store(storeId: string) {
    return this.#api.call('stores.show', { params: { storeId } });
  }

  floor(storeId: string) {
    return this.#api.call('stores.floor', { params: { storeId } });
  }
}
