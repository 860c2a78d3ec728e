import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { problemText } from '@lib/ui/notes/problem-text';
import { firstValueFrom } from 'rxjs';
import { Api } from '../api/api';
import { openFile } from '../api/save-file';
import { Messages } from '../messages/messages';

/**
 * A photo of the shop, small; touched, it opens in full. It is fetched by hand because the browser's
 * own image loading carries no access token.
 */
@Component({
  selector: 'tw-photo',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button type="button" [attr.aria-label]="'Open ' + name()" (click)="open()">
      @if (address(); as url) {
        <img [src]="url" alt="" />
      } @else {
        <span>{{ failed() ? 'Not here yet' : '' }}</span>
      }
    </button>
  `,
  styles: `
    button {
      display: grid;
      place-items: center;
      inline-size: 100%;
      aspect-ratio: 4 / 3;
      min-block-size: 2.75rem;
      padding: 0;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
      color: var(--tw-soft);
      font: inherit;
      font-size: 0.875rem;
      overflow: hidden;
      cursor: pointer;
    }
    img {
      inline-size: 100%;
      block-size: 100%;
      object-fit: cover;
    }
  `,
})
export class PhotoView {
  readonly #api = inject(Api);
  readonly #messages = inject(Messages);

  readonly fileId = input.required<string>();
  /** What it is called by who cannot see it: "Photo of A-04, 6 May". */
  readonly name = input('the photo');
  /** The photo itself, where this device still has it. */
  readonly content = input<Blob>();

  protected readonly address = signal<string | undefined>(undefined);
  protected readonly failed = signal(false);

  constructor() {
    effect((onCleanup) => {
      const fileId = this.fileId();
      const content = this.content();
      let gone = false;
      onCleanup(() => (gone = true));
      void untracked(() => this.#load(fileId, content, () => gone));
    });
    inject(DestroyRef).onDestroy(() => this.#show(undefined));
  }

  protected async open(): Promise<void> {
    const content = this.content();
    if (content) {
      openFile({ name: this.name(), content });
      return;
    }
    try {
      openFile(
        await firstValueFrom(
          this.#api.file('files.show', {
            params: { fileId: this.fileId() },
            query: { size: 'full' },
          }),
        ),
      );
    } catch (problem) {
      this.#messages.say(problemText(problem));
    }
  }

  async #load(fileId: string, content: Blob | undefined, gone: () => boolean): Promise<void> {
    try {
      const shown =
        content ??
        (
          await firstValueFrom(
            this.#api.file('files.show', { params: { fileId }, query: { size: 'small' } }),
          )
        ).content;
      if (!gone()) this.#show(shown);
    } catch {
      if (!gone()) this.failed.set(true);
    }
  }

  #show(content: Blob | undefined): void {
    const before = this.address();
    if (before) URL.revokeObjectURL(before);
    this.address.set(content && URL.createObjectURL(content));
  }
}
