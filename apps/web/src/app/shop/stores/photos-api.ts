import { inject, Injectable } from '@angular/core';
import { Api } from '../../core/api/api';

@Injectable({ providedIn: 'root' })
export class PhotosApi {
  readonly #api = inject(Api);

  ofStore(storeId: string) {
    return this.#api.call('files.list', { query: { ownerKind: 'store', ownerId: storeId } });
  }

  /** With an id of our own, so that sending it again after no answer adds it once. */
  add(storeId: string, id: string, file: File) {
    const upload = new FormData();
    upload.set('id', id);
    upload.set('ownerKind', 'store');
    upload.set('ownerId', storeId);
    upload.set('file', file);
    return this.#api.call('files.add', {
      body: { ownerKind: 'store', ownerId: storeId },
      upload,
    });
  }
}
