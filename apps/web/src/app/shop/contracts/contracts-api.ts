import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Contract = AnswerOf<'contracts.show'>;
export type ContractItem = AnswerOf<'contracts.list'>['items'][number];
export type ContractState = ContractItem['state'];
export type RulePreview = AnswerOf<'contracts.preview'>;
export type Round = AnswerOf<'rounds.list'>['items'][number];
export type Closures = AnswerOf<'closures.show'>;
export type Terms = BodyOf<'contracts.change'>;
type Versioned = Pick<Contract, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class ContractsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'contracts.list'>) {
    return this.#api.call('contracts.list', { query });
  }

  show(contractId: string) {
    return this.#api.call('contracts.show', { params: { contractId } });
  }

  preview(query: QueryOf<'contracts.preview'>) {
    return this.#api.call('contracts.preview', { query });
  }

  create(body: BodyOf<'contracts.create'>, key: string) {
    return this.#api.call('contracts.create', { body, key });
  }

  change({ id, version }: Versioned, body: Terms) {
    return this.#api.call('contracts.change', {
      params: { contractId: id },
      body,
      ifMatch: version,
    });
  }

  end({ id, version }: Versioned, endsOn: string) {
    return this.#api.call('contracts.end', {
      params: { contractId: id },
      body: { endsOn },
      ifMatch: version,
    });
  }

  rounds(query: QueryOf<'rounds.list'>) {
    return this.#api.call('rounds.list', { query });
  }

  closures() {
    return this.#api.call('closures.show');
  }

  changeClosures(version: number, body: BodyOf<'closures.change'>) {
    return this.#api.call('closures.change', { body, ifMatch: version });
  }
}
