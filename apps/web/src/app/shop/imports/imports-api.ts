import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Import = AnswerOf<'imports.show'>;
export type ImportRow = AnswerOf<'imports.rows'>['items'][number];
export type ImportKind = Import['kind'];
export type RowOutcome = ImportRow['outcome'];
type Versioned = Pick<Import, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class ImportsApi {
  readonly #api = inject(Api);

  /** With an id of our own, so that sending it again after no answer is the same import. */
  start(id: string, kind: ImportKind, file: File) {
    const upload = new FormData();
    upload.set('id', id);
    upload.set('kind', kind);
    upload.set('file', file);
    return this.#api.call('imports.start', { body: { id, kind }, upload });
  }

  list(query: QueryOf<'imports.list'>) {
    return this.#api.call('imports.list', { query });
  }

  show(importId: string) {
    return this.#api.call('imports.show', { params: { importId } });
  }

  rows(importId: string, query: QueryOf<'imports.rows'>) {
    return this.#api.call('imports.rows', { params: { importId }, query });
  }

  apply({ id, version }: Versioned) {
    return this.#api.call('imports.apply', { params: { importId: id }, ifMatch: version });
  }

  discard({ id, version }: Versioned) {
    return this.#api.call('imports.discard', { params: { importId: id }, ifMatch: version });
  }

  template(kind: ImportKind) {
    return this.#api.file('imports.template', { params: { kind } });
  }
}
