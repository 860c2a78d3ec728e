import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { InstantPipe, LoadNote, problemText, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { reloadOn } from '../../core/live/reload-on';
import { PhotoView } from '../../core/photos/photo-view';
import { Session } from '../../core/session/session';
import { PhotosApi } from './photos-api';

/** Photos of a store: the way in, the back of the machines, where the valves are. */
@Component({
  selector: 'tw-store-photos',
  imports: [InstantPipe, LoadNote, MatButton, PhotoView, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Photos">
      @if (mayAdd()) {
        <input
          #picker
          class="tw-unseen"
          type="file"
          accept="image/jpeg,image/png,image/webp"
          tabindex="-1"
          aria-hidden="true"
          (change)="add(picker)"
        />
        <button
          matButton="outlined"
          type="button"
          [disabled]="busy()"
          disabledInteractive
          (click)="picker.click()"
        >
          {{ busy() ? 'Sending' : 'Add a photo' }}
        </button>
      }
    </tw-section-head>
    <p class="alarm" role="alert">{{ problem() }}</p>
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
    .alarm {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class StorePhotos {
  readonly #api = inject(PhotosApi);
  readonly #session = inject(Session);

  readonly storeId = input.required<string>();

  protected readonly photos = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#api.ofStore(params),
  });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');
  protected readonly mayAdd = computed(() => this.#session.mayChange('files.add'));

  constructor() {
    reloadOn(this.photos, 'files');
  }

  protected async add(picker: HTMLInputElement): Promise<void> {
    const file = picker.files?.[0];
    if (!file || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      await firstValueFrom(this.#api.add(this.storeId(), v7(), file));
      this.photos.reload();
    } catch (problem) {
      this.problem.set(`${file.name} was not added. ${problemText(problem)}`);
    } finally {
      picker.value = '';
      this.busy.set(false);
    }
  }
}
