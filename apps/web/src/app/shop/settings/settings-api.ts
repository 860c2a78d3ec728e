import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type ShopSettings = AnswerOf<'shop.show'>;

@Injectable({ providedIn: 'root' })
export class SettingsApi {
  readonly #api = inject(Api);

  show() {
    return this.#api.call('shop.show');
  }

  change(version: number, body: BodyOf<'shop.change'>) {
    return this.#api.call('shop.change', { body, ifMatch: version });
  }

  finishSetUp() {
    return this.#api.call('settings.finishSetUp');
  }

  cardAccount() {
    return this.#api.call('payments.connection');
  }

  connectCards() {
    return this.#api.call('payments.connect');
  }
}
