import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Delivery = AnswerOf<'deliveries.list'>['items'][number];
export type Decision = BodyOf<'deliveries.decide'>['decision'];

@Injectable({ providedIn: 'root' })
export class DeliveriesApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'deliveries.list'>) {
    return this.#api.call('deliveries.list', { query });
  }

  decide({ id, version }: Pick<Delivery, 'id' | 'version'>, decision: Decision) {
    return this.#api.call('deliveries.decide', {
      params: { deliveryId: id },
      body: { decision },
      ifMatch: version,
    });
  }
}
