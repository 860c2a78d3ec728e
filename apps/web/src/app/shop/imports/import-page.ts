import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { Callout, InstantPipe, LoadNote, PageHead, ProgressLine, wordFor } from '@lib/ui';
import { filter, firstValueFrom, interval } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { ImportRows } from './import-rows';
import { effectWords, runs, stateWords } from './import-words';
import { type Import, ImportsApi } from './imports-api';

/** Should the live stream be cut off, progress is still asked for now and then. */
const askAgain = 3_000;

/** One sent file: how far it is, what its rows would do, and the decision to apply all or nothing. */
@Component({
  selector: 'tw-import-page',
  imports: [
    Callout,
    ImportRows,
    InstantPipe,
    LoadNote,
    MatButton,
    PageHead,
    ProgressLine,
    RouterLink,
  ],
  templateUrl: './import-page.html',
  styles: `
    section {
      margin-block-end: 1.5rem;
    }
    tw-callout p {
      margin-block-end: 0.5rem;
    }
    tw-callout p:last-child {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportPage {
  readonly #api = inject(ImportsApi);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  readonly #titles = inject(Titles);

  readonly importId = input.required<string>();

  protected readonly sent = rxResource({
    params: () => this.importId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly runs = runs;
  protected readonly stateWords = stateWords;
  protected readonly effectWords = effectWords;
  protected readonly running = computed(() => this.sent.hasValue() && runs(this.sent.value()));
  /** Rows are worth showing once all of them were checked. */
  protected readonly hasRows = computed(
    () =>
      this.sent.hasValue() &&
      ['checked', 'applying', 'applied', 'discarded'].includes(this.sent.value().state),
  );
  protected readonly progress = computed(() =>
    this.sent.hasValue() && this.sent.value().state === 'applying' ? 'applied' : 'checked',
  );

  constructor() {
    reloadOn(this.sent, 'imports');
    interval(askAgain)
      .pipe(
        filter(() => this.running()),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.sent.reload());
    effect(() => {
      if (this.sent.hasValue()) this.#titles.name(`Import of ${this.sent.value().fileName}`);
    });
  }

  protected async apply(sent: Import): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: `Apply ${sent.fileName}?`,
      consequence: `It makes ${effectWords(sent)}. Every row is applied, or none.`,
      action: 'Apply all rows',
      stay: 'Not yet',
    });
    if (!agreed) return;
    this.sent.set(await firstValueFrom(this.#api.apply(sent)));
  }

  protected async discard(sent: Import): Promise<void> {
    await firstValueFrom(this.#api.discard(sent));
    this.#messages.say(`${sent.fileName} was put away. It changed nothing.`);
    await this.#router.navigate(['/shop/imports']);
  }

  /** Where to see what it brought. */
  protected placeOf({ kind }: Import): string {
    return `/shop/${kind}`;
  }

  protected sub(sent: Import): string {
    return `${wordFor(sent.kind)}, ${stateWords(sent)}`;
  }
}
