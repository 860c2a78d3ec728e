import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { map } from 'rxjs';
import { Api } from '../../core/api/api';

export type Subscription = AnswerOf<'subscription.show'>;
export type Plan = AnswerOf<'subscription.plans'>['items'][number];
export type Usage = Subscription['usage'][number];
export type SubscriptionEvent = Subscription['events'][number];
export type Consent = AnswerOf<'consents.give'>;
export type AuditRow = AnswerOf<'audit.list'>['items'][number];

@Injectable({ providedIn: 'root' })
export class SubscriptionApi {
  readonly #api = inject(Api);

  show() {
    return this.#api.call('subscription.show');
  }

  plans() {
    return this.#api.call('subscription.plans').pipe(map(({ items }) => items));
  }

  choose(planId: string) {
    return this.#api.call('subscription.choose', { body: { planId } });
  }

  /** Asks the card payment service, e.g. right after the card page. */
  check() {
    return this.#api.call('subscription.check');
  }

  consents() {
    return this.#api.call('consents.list').pipe(map(({ items }) => items));
  }

  giveConsent(hours: number, key: string) {
    return this.#api.call('consents.give', { body: { hours }, key });
  }

  withdrawConsent(consentId: string) {
    return this.#api.call('consents.withdraw', { params: { consentId } });
  }

  audit(query: QueryOf<'audit.list'>) {
    return this.#api.call('audit.list', { query });
  }
}
