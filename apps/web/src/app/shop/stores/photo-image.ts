import { ChangeDetectionStrategy, Component, effect, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type Photo, PhotosApi } from './photos-api';

/** A small photo. It is fetched with the session's token, which an image's address cannot carry. */
@Component({
  selector: 'tw-photo-image',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (address(); as source) {
      <img [src]="source" [alt]="photo().name" />
    }
  `,
  styles: `
    :host {
      display: block;
      aspect-ratio: 4 / 3;
      background: var(--tw-hairline);
    }
    img {
      display: block;
      inline-size: 100%;
      block-size: 100%;
      object-fit: cover;
    }
  `,
})
export class PhotoImage {
  readonly #api = inject(PhotosApi);
  readonly photo = input.required<Photo>();

  readonly #file = rxResource({
    params: () => this.photo().id,
    stream: ({ params }) => this.#api.content(params, 'small'),
  });
  protected readonly address = signal<string | undefined>(undefined);

  constructor() {
    effect((onCleanup) => {
      if (!this.#file.hasValue()) return;
      const address = URL.createObjectURL(this.#file.value().content);
      this.address.set(address);
      onCleanup(() => URL.revokeObjectURL(address));
    });
  }
}
