import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Contact = AnswerOf<'contacts.list'>['items'][number];
type Versioned = Pick<Contact, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class ContactsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'contacts.list'>) {
    return this.#api.call('contacts.list', { query });
  }

  create(body: BodyOf<'contacts.create'>, key: string) {
    return this.#api.call('contacts.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'contacts.change'>) {
    return this.#api.call('contacts.change', { params: { contactId: id }, body, ifMatch: version });
  }

  end({ id, version }: Versioned) {
    return this.#api.call('contacts.end', { params: { contactId: id }, ifMatch: version });
  }

  resume({ id, version }: Versioned) {
    return this.#api.call('contacts.resume', { params: { contactId: id }, ifMatch: version });
  }
}
