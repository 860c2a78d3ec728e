import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Store = AnswerOf<'stores.show'>;
export type StoreSummary = AnswerOf<'stores.list'>['items'][number];
export type StoreFloor = AnswerOf<'stores.floor'>;
export type Bank = StoreFloor['banks'][number];
type Versioned = Pick<Store, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class StoresApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'stores.list'>) {
    return this.#api.call('stores.list', { query });
  }

  show(storeId: string) {
    return this.#api.call('stores.show', { params: { storeId } });
  }

  floor(storeId: string) {
    return this.#api.call('stores.floor', { params: { storeId } });
  }

  create(body: BodyOf<'stores.create'>, key: string) {
    return this.#api.call('stores.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'stores.change'>) {
    return this.#api.call('stores.change', { params: { storeId: id }, body, ifMatch: version });
  }

  end({ id, version }: Versioned) {
    return this.#api.call('stores.end', { params: { storeId: id }, ifMatch: version });
  }

  resume({ id, version }: Versioned) {
    return this.#api.call('stores.resume', { params: { storeId: id }, ifMatch: version });
  }

  addBank(storeId: string, body: BodyOf<'banks.create'>, key: string) {
    return this.#api.call('banks.create', { params: { storeId }, body, key });
  }

  changeBank({ id, version }: Pick<Bank, 'id' | 'version'>, body: BodyOf<'banks.change'>) {
    return this.#api.call('banks.change', { params: { bankId: id }, body, ifMatch: version });
  }
}
