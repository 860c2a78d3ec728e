import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { map } from 'rxjs';
import { Api } from '../../core/api/api';

export type Payment = AnswerOf<'payments.show'>;
export type PaymentItem = AnswerOf<'payments.list'>['items'][number];
export type PaymentMethod = PaymentItem['method'];
export type PaymentState = PaymentItem['state'];
export type StoreBalance = AnswerOf<'balances.list'>['items'][number];

@Injectable({ providedIn: 'root' })
export class PaymentsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'payments.list'>) {
    return this.#api.call('payments.list', { query });
  }

  show(paymentId: string) {
    return this.#api.call('payments.show', { params: { paymentId } });
  }

  record(body: BodyOf<'payments.record'>, key: string) {
    return this.#api.call('payments.record', { body, key });
  }

  balanceOf(storeId: string) {
    return this.#api
      .call('balances.list', { query: { storeId } })
      .pipe(map(({ items }) => items[0]));
  }
}
