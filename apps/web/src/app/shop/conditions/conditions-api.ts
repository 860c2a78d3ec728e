import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Condition = AnswerOf<'conditions.list'>['items'][number];
type Versioned = Pick<Condition, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class ConditionsApi {
  readonly #api = inject(Api);

  list(storeId: string, show: 'open' | 'cleared' | 'all') {
    return this.#api.call('conditions.list', { params: { storeId }, query: { show } });
  }

  create(body: BodyOf<'conditions.create'>, key: string) {
    return this.#api.call('conditions.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'conditions.change'>) {
    return this.#api.call('conditions.change', {
      params: { conditionId: id },
      body,
      ifMatch: version,
    });
  }

  clear({ id, version }: Versioned) {
    return this.#api.call('conditions.clear', { params: { conditionId: id }, ifMatch: version });
  }
}
