import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { InstantPipe, LoadNote } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { PhotoView } from '../../core/photos/photo-view';
import { PhotosApi } from '../photos/photos-api';
import { PhotosHead } from '../photos/photos-head';

/** Photos of a store: the way in, the back of the machines, where the valves are. */
@Component({
  selector: 'tw-store-photos',
  imports: [InstantPipe, LoadNote, PhotosHead, PhotoView],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-photos-head ownerKind="store" [ownerId]="storeId()" (added)="photos.reload()" />
    @if (photos.hasValue()) {
      <ul>
        @for (photo of photos.value().items; track photo.id) {
          <li>
            <tw-photo [fileId]="photo.id" [name]="photo.name" />
            <span class="tw-soft">{{ photo.addedAt | twInstant }}</span>
          </li>
        } @empty {
          <li class="none tw-soft">The way in, the valves, the back of a bank: none yet.</li>
        }
      </ul>
    } @else {
      <tw-load-note [of]="photos" />
    }
  `,
  styles: `
    ul {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(9rem, 1fr));
      gap: 1rem;
      margin: 0;
      padding: 0;
      list-style: none;
    }
    .none {
      grid-column: 1 / -1;
    }
    span {
      font-size: 0.875rem;
    }
  `,
})
export class StorePhotos {
  readonly #api = inject(PhotosApi);

  readonly storeId = input.required<string>();

  protected readonly photos = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#api.ofStore(params),
  });

  constructor() {
    reloadOn(this.photos, 'files');
  }
}
