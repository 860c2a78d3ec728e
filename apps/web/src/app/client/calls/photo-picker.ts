import { ChangeDetectionStrategy, Component, model, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { counted } from '@lib/ui/words/words';
import { v7 } from 'uuid';
import { shrinkPhoto } from '../../core/photos/shrink-photo';
import { type CallPhoto } from './calls-api';

/** Photos of the fault, made smaller on the device, so that they go out on a weak signal. */
@Component({
  selector: 'tw-photo-picker',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <input
      #picker
      class="tw-unseen"
      type="file"
      accept="image/*"
      multiple
      tabindex="-1"
      aria-hidden="true"
      (change)="add(picker)"
    />
    <button matButton="outlined" type="button" (click)="picker.click()">
      {{ photos().length > 0 ? 'Add another photo' : 'Add a photo' }}
    </button>
    <span role="status">
      @if (busy()) {
        Making it smaller
      } @else if (photos().length > 0) {
        {{ counted(photos().length, 'photo') }} to send
      }
    </span>
    @if (photos().length > 0) {
      <button matButton type="button" (click)="photos.set([])">Send none</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.5rem 0.75rem;
    }
  `,
})
export class PhotoPicker {
  readonly photos = model<readonly CallPhoto[]>([]);

  protected readonly counted = counted;
  protected readonly busy = signal(false);

  protected async add(picker: HTMLInputElement): Promise<void> {
    const files = [...(picker.files ?? [])];
    // Else the same file chosen again would be no change.
    picker.value = '';
    this.busy.set(true);
    for (const file of files) {
      const content = await shrinkPhoto(file);
      this.photos.update((photos) => [
        ...photos,
        { id: v7(), name: `fault-${photos.length + 1}.jpg`, content },
      ]);
    }
    this.busy.set(false);
  }
}
