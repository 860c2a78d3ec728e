import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { from, map } from 'rxjs';
import { PhotoView } from '../../core/photos/photo-view';
import { shrinkPhoto } from '../../core/photos/shrink-photo';
import { type SheetJob } from '../kept/kept';
import { Outbox } from '../outbox/outbox';
import { FieldVisit } from '../sheets/field-visit';

/** Photos of the job: proof for the owner who was not there. */
@Component({
  selector: 'tw-job-photos',
  imports: [MatButton, PhotoView],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (photos().length > 0) {
      <ul>
        @for (photo of photos(); track photo.id) {
          <li>
            <tw-photo
              [fileId]="photo.id"
              [name]="'photo ' + ($index + 1) + ' of ' + job().machine.bay"
              [content]="photo.content"
            />
            @if (photo.waiting) {
              <span class="tw-soft">waiting</span>
            }
          </li>
        }
      </ul>
    }
    @if (!closed()) {
      <div class="tw-row">
        <input
          #camera
          class="tw-unseen"
          type="file"
          accept="image/*"
          capture="environment"
          tabindex="-1"
          aria-hidden="true"
          (change)="add(camera)"
        />
        <input
          #album
          class="tw-unseen"
          type="file"
          accept="image/*"
          multiple
          tabindex="-1"
          aria-hidden="true"
          (change)="add(album)"
        />
        <button matButton="outlined" type="button" (click)="camera.click()">Take a photo</button>
        <button matButton="outlined" type="button" (click)="album.click()">
          {{ busy() ? 'Making it smaller' : 'From the phone' }}
        </button>
      </div>
    }
  `,
  styles: `
    ul {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(6.5rem, 1fr));
      gap: 0.5rem;
      margin: 0 0 0.5rem;
      padding: 0;
      list-style: none;
    }
    li span {
      font-size: 0.875rem;
    }
  `,
})
export class JobPhotos {
  readonly #outbox = inject(Outbox);
  readonly #visit = inject(FieldVisit);
  readonly job = input.required<SheetJob>();
  readonly closed = input(false);
  protected readonly busy = signal(false);

  /** Photos named on this device for the job, sent or not. */
  readonly #own = computed(() =>
    this.#outbox
      .acts()
      .filter(({ act }) => act.kind === 'photo' && act.payload.jobId === this.job().id)
      .map(({ act, state }) => ({
        id: act.kind === 'photo' ? act.payload.attachmentId : '',
        waiting: state === 'waiting',
      })),
  );
  readonly #contents = rxResource({
    params: () => this.#own().map(({ id }) => id),
    stream: ({ params }) =>
      from(Promise.all(params.map((id) => this.#outbox.photo(id)))).pipe(
        map((kept) => new Map(kept.flatMap((photo) => (photo ? [[photo.id, photo.content]] : [])))),
      ),
    defaultValue: new Map<string, Blob>(),
  });
  protected readonly photos = computed(() => {
    const known = new Set(this.job().photos.map(({ id }) => id));
    const contents = this.#contents.hasValue() ? this.#contents.value() : new Map<string, Blob>();
    return [
      ...this.job().photos.map(({ id }) => ({ id, waiting: false, content: contents.get(id) })),
      ...this.#own()
        .filter(({ id }) => !known.has(id))
        .map((photo) => ({ ...photo, content: contents.get(photo.id) })),
    ];
  });

  protected async add(picker: HTMLInputElement): Promise<void> {
    const files = [...(picker.files ?? [])];
    picker.value = '';
    this.busy.set(true);
    try {
      for (const [index, file] of files.entries()) {
        await this.#outbox.recordPhoto({
          visitId: this.#visit.id,
          jobId: this.job().id,
          name: `${this.job().machine.bay}-${this.photos().length + index + 1}.jpg`,
          content: await shrinkPhoto(file),
        });
      }
    } finally {
      this.busy.set(false);
    }
  }
}
