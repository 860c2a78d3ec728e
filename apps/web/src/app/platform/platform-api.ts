import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../core/api/api';

export type ShopItem = AnswerOf<'platform.shops'>['items'][number];
export type Shop = AnswerOf<'platform.shop'>;
export type Plan = AnswerOf<'platform.plans'>['items'][number];
export type Mail = AnswerOf<'platform.mails'>['items'][number];
export type AuditRow = AnswerOf<'platform.audit'>['items'][number];
export type CardEvent = AnswerOf<'platform.cardEvents'>['items'][number];
export type Queue = AnswerOf<'platform.queues'>['items'][number];

@Injectable({ providedIn: 'root' })
export class PlatformApi {
  readonly #api = inject(Api);

  shops(query: QueryOf<'platform.shops'>) {
    return this.#api.call('platform.shops', { query });
  }

  shop(shopId: string) {
    return this.#api.call('platform.shop', { params: { shopId } });
  }

  changePlan(shopId: string, body: BodyOf<'platform.changePlan'>) {
    return this.#api.call('platform.changePlan', { params: { shopId }, body });
  }

  pause(shopId: string, note: string) {
    return this.#api.call('platform.pause', { params: { shopId }, body: { note } });
  }

  resume(shopId: string, note: string) {
    return this.#api.call('platform.resume', { params: { shopId }, body: { note } });
  }

  cancel(shopId: string, note: string) {
    return this.#api.call('platform.cancel', { params: { shopId }, body: { note } });
  }

  plans() {
    return this.#api.call('platform.plans');
  }

  createPlan(body: BodyOf<'platform.createPlan'>) {
    return this.#api.call('platform.createPlan', { body });
  }

  editPlan({ id, version }: Pick<Plan, 'id' | 'version'>, body: BodyOf<'platform.editPlan'>) {
    return this.#api.call('platform.editPlan', {
      params: { planId: id },
      body,
      ifMatch: version,
    });
  }

  queues() {
    return this.#api.call('platform.queues');
  }

  mails(query: QueryOf<'platform.mails'>) {
    return this.#api.call('platform.mails', { query });
  }

  decideMail(mailId: string, decision: 'arrived' | 'send_again') {
    return this.#api.call('platform.decideMail', { params: { mailId }, body: { decision } });
  }

  audit(query: QueryOf<'platform.audit'>) {
    return this.#api.call('platform.audit', { query });
  }

  cardEvents(query: QueryOf<'platform.cardEvents'>) {
    return this.#api.call('platform.cardEvents', { query });
  }
}
