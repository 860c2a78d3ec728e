import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Ageing = AnswerOf<'receivables.list'>;
export type AgeingRow = Ageing['items'][number];
export type Buckets = Ageing['totals'];

@Injectable({ providedIn: 'root' })
export class ReceivablesApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'receivables.list'>) {
    return this.#api.call('receivables.list', { query });
  }
}
