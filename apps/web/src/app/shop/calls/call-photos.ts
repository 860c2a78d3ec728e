import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { PhotoView } from '../../core/photos/photo-view';
import { Session } from '../../core/session/session';
import { type Call, CallsApi } from './calls-api';

/** What a caller sent, or the office added from a message. */
@Component({
  selector: 'tw-call-photos',
  imports: [MatButton, PhotoView, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Photos">
      @if (session.mayChange('files.add')) {
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
    <p class="problem" role="alert">{{ problem() }}</p>
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
    .problem {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class CallPhotos {
  readonly #api = inject(CallsApi);
  protected readonly session = inject(Session);

  readonly call = input.required<Call>();
  readonly added = output<void>();
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected async add(picker: HTMLInputElement): Promise<void> {
    const file = picker.files?.[0];
    if (!file || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      await firstValueFrom(this.#api.addPhoto(this.call().id, v7(), file));
      this.added.emit();
    } catch (problem) {
      this.problem.set(`${file.name} was not added. ${problemText(problem)}`);
    } finally {
      picker.value = '';
      this.busy.set(false);
    }
  }
}
