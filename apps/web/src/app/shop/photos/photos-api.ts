import { inject, Injectable } from '@angular/core';
import { type BodyOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

type PhotoOwner = Pick<BodyOf<'files.add'>, 'ownerKind' | 'ownerId'>;

@Injectable({ providedIn: 'root' })
export class PhotosApi {
  readonly #api = inject(Api);

  ofStore(storeId: string) {
    return this.#api.call('files.list', { query: { ownerKind: 'store', ownerId: storeId } });
  }

  /** With an id of our own, so that sending it again after no answer adds it once. */
  add({ ownerKind, ownerId }: PhotoOwner, id: string, file: File) {
    const upload = new FormData();
    upload.set('id', id);
    upload.set('ownerKind', ownerKind);
    upload.set('ownerId', ownerId);
    upload.set('file', file);
    return this.#api.call('files.add', { body: { ownerKind, ownerId }, upload });
  }
}
