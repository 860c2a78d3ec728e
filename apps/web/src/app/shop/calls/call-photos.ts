import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { PhotoView } from '../../core/photos/photo-view';
import { PhotosHead } from '../photos/photos-head';
import { type Call } from './calls-api';

/** What a caller sent, or the office added from a message. */
@Component({
  selector: 'tw-call-photos',
  imports: [PhotosHead, PhotoView],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-photos-head ownerKind="call" [ownerId]="call().id" (added)="added.emit()" />
    <ul>
      @for (photo of call().photos; track photo.id) {
        <li><tw-photo [fileId]="photo.id" [name]="photo.name" /></li>
      } @empty {
        <li class="tw-soft">None yet.</li>
      }
    </ul>
  `,
  styles: `
    ul {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(9rem, 1fr));
      gap: 0.75rem;
      margin: 0;
      padding: 0;
      list-style: none;
    }
  `,
})
export class CallPhotos {
  readonly call = input.required<Call>();
  readonly added = output<void>();
}
