import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { Session } from '../../core/session/session';
import { PhotosApi } from './photos-api';

/** The head of a section of photos, from which one who may can add another to what they show. */
@Component({
  selector: 'tw-photos-head',
  imports: [MatButton, SectionHead],
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
    <p role="alert">{{ problem() }}</p>
  `,
  styles: `
    p {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class PhotosHead {
  readonly #api = inject(PhotosApi);
  protected readonly session = inject(Session);

  readonly ownerKind = input.required<'call' | 'store'>();
  readonly ownerId = input.required<string>();
  readonly added = output<void>();
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected async add(picker: HTMLInputElement): Promise<void> {
    const file = picker.files?.[0];
    if (!file || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      const owner = { ownerKind: this.ownerKind(), ownerId: this.ownerId() };
      await firstValueFrom(this.#api.add(owner, v7(), file));
      this.added.emit();
    } catch (problem) {
      this.problem.set(`${file.name} was not added. ${problemText(problem)}`);
    } finally {
      picker.value = '';
      this.busy.set(false);
    }
  }
}
