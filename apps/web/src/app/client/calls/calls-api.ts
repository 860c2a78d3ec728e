import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Call = AnswerOf<'calls.show'>;
export type CallItem = AnswerOf<'calls.list'>['items'][number];
export type Report = BodyOf<'calls.report'>;

@Injectable({ providedIn: 'root' })
export class CallsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'calls.list'>) {
    return this.#api.call('calls.list', { query });
  }

  show(callId: string) {
    return this.#api.call('calls.show', { params: { callId } });
  }

  report(body: Report, key: string) {
    return this.#api.call('calls.report', { body, key });
  }

  withdraw({ id, version }: Pick<Call, 'id' | 'version'>) {
    return this.#api.call('calls.withdraw', {
      params: { callId: id },
      body: {},
      ifMatch: version,
    });
  }

  /** With an id of our own, so that sending it again after no answer adds it once. */
  addPhoto(callId: string, { id, name, content }: CallPhoto) {
    const upload = new FormData();
    upload.set('id', id);
    upload.set('ownerKind', 'call');
    upload.set('ownerId', callId);
    upload.set('file', content, name);
    return this.#api.call('files.add', { body: { ownerKind: 'call', ownerId: callId }, upload });
  }
}

/** A photo chosen on this device, not sent yet. */
export interface CallPhoto {
  readonly id: string;
  readonly name: string;
  readonly content: Blob;
}
