import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Contract = AnswerOf<'contracts.show'>;
export type ContractItem = AnswerOf<'contracts.list'>['items'][number];

@Injectable({ providedIn: 'root' })
export class ContractsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'contracts.list'>) {
    return this.#api.call('contracts.list', { query });
  }

  show(contractId: string) {
    return this.#api.call('contracts.show', { params: { contractId } });
  }

  rounds(contractId: string, query: QueryOf<'rounds.list'>) {
    return this.#api.call('rounds.list', { query: { ...query, contractId } });
  }
}
