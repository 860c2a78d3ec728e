import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Part = AnswerOf<'parts.show'>;
type Versioned = Pick<Part, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class PartsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'parts.list'>) {
    return this.#api.call('parts.list', { query });
  }

  categories() {
    return this.#api.call('parts.categories');
  }

  show(partId: string) {
    return this.#api.call('parts.show', { params: { partId } });
  }

  create(body: BodyOf<'parts.create'>, key: string) {
    return this.#api.call('parts.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'parts.change'>) {
    return this.#api.call('parts.change', { params: { partId: id }, body, ifMatch: version });
  }

  end({ id, version }: Versioned) {
    return this.#api.call('parts.end', { params: { partId: id }, ifMatch: version });
  }

  resume({ id, version }: Versioned) {
    return this.#api.call('parts.resume', { params: { partId: id }, ifMatch: version });
  }
}
