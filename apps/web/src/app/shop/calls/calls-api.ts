import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Call = AnswerOf<'calls.show'>;
export type CallItem = AnswerOf<'calls.list'>['items'][number];
export type CallPhoto = Call['photos'][number];
type Versioned = Pick<Call, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class CallsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'calls.list'>) {
    return this.#api.call('calls.list', { query });
  }

  show(callId: string) {
    return this.#api.call('calls.show', { params: { callId } });
  }

  report(body: BodyOf<'calls.report'>, key: string) {
    return this.#api.call('calls.report', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'calls.change'>) {
    return this.#api.call('calls.change', { params: { callId: id }, body, ifMatch: version });
  }

  withdraw({ id, version }: Versioned, words: string) {
    return this.#api.call('calls.withdraw', {
      params: { callId: id },
      body: { words },
      ifMatch: version,
    });
  }
}
