import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Payment = AnswerOf<'payments.show'>;
export type PaymentItem = AnswerOf<'payments.list'>['items'][number];
/** What is paid: a statement with what is open before it, or the whole balance of a store. */
export type Payable = BodyOf<'payments.startCard'>;

@Injectable({ providedIn: 'root' })
export class PaymentsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'payments.list'>) {
    return this.#api.call('payments.list', { query });
  }

  show(paymentId: string) {
    return this.#api.call('payments.show', { params: { paymentId } });
  }

  startCard(body: Payable) {
    return this.#api.call('payments.startCard', { body });
  }

  check(paymentId: string) {
    return this.#api.call('payments.check', { params: { paymentId } });
  }
}
