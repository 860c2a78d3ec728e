import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { PhotoView } from '../../core/photos/photo-view';

interface StripPhoto {
  readonly id: string;
  readonly name: string;
}

/** Photos side by side, each opening in full. */
@Component({
  selector: 'tw-photo-strip',
  imports: [PhotoView],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (photo of photos(); track photo.id) {
      <tw-photo [fileId]="photo.id" [name]="photo.name" />
    }
  `,
  styles: `
    :host {
      position: relative;
      z-index: 1;
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(5.5rem, 1fr));
      gap: 0.5rem;
      max-inline-size: 32rem;
      margin-block: 0.5rem;
    }
  `,
})
export class PhotoStrip {
  readonly photos = input.required<readonly StripPhoto[]>();
}
