import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Callout, counted, problemText, ProgressLine } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { MonthCloseApi, type Run } from './month-close-api';
import { RunMails } from './run-mails';
import { atWork, barOf, firstBatchWords, leftWords } from './run-words';

/** How far a close is, what went wrong in it, and the way to hold it or to go on. */
@Component({
  selector: 'tw-run-progress',
  imports: [Callout, MatButton, ProgressLine, RouterLink, RunMails],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>{{ heading() }}</h2>
    @let shown = bar();
    @if (run().state !== 'done' || run().mails.total > run().mails.sent) {
      <tw-progress-line
        [label]="shown.label"
        [word]="shown.word"
        [done]="shown.done"
        [of]="shown.of"
        [aside]="shown.aside"
        [rest]="left()"
      />
    } @else {
      <p>
        {{ counted(run().stores, 'statement') }} made, {{ counted(run().mails.sent, 'mail') }}
        sent.
      </p>
    }
    @if (run().firstChecked.checks) {
      <p class="first tw-soft" [class.alarm]="run().firstChecked.agree < run().firstChecked.checks">
        {{ firstBatch() }}
      </p>
    }
    @if (run().problem; as problem) {
      <tw-callout tone="alarm">{{ problem }}</tw-callout>
    }
    @for (store of run().failedStores; track store.storeId) {
      <p class="failed">
        <a [routerLink]="['/shop/stores', store.storeId]">{{ store.storeName }}</a>:
        {{ store.error || 'its statement could not be made' }}
      </p>
    }
    @if (session.mayChange('statements.close')) {
      <div class="actions">
        @if (atWork(run())) {
          <button matButton="outlined" type="button" [disabled]="busy()" (click)="hold()">
            Hold
          </button>
        }
        @if (run().state === 'held') {
          <button matButton="filled" type="button" [disabled]="busy()" (click)="goOn()">
            Go on
          </button>
        }
        @if (run().state === 'failed') {
          <button matButton="filled" type="button" [disabled]="busy()" (click)="goOn()">
            Try these stores again
          </button>
        }
      </div>
    }
    @if (atWork(run())) {
      <p class="tw-soft">You can leave this page; it goes on by itself.</p>
    }
    <tw-run-mails [run]="run()" />
  `,
  styles: `
    h2 {
      margin-block: 0 0.5rem;
    }
    p {
      margin-block: 0.5rem;
    }
    .first {
      font-size: 0.875rem;
    }
    .alarm,
    .failed {
      color: var(--tw-alarm);
    }
    .actions {
      display: flex;
      gap: 0.5rem;
      margin-block: 0.75rem;
    }
    .actions:empty {
      display: none;
    }
  `,
})
export class RunProgress {
  readonly #api = inject(MonthCloseApi);
  readonly #messages = inject(Messages);
  protected readonly session = inject(Session);

  readonly run = input.required<Run>();
  readonly changed = output<Run>();

  protected readonly atWork = atWork;
  protected readonly counted = counted;
  protected readonly busy = signal(false);
  protected readonly bar = computed(() => barOf(this.run()));
  protected readonly left = computed(() =>
    atWork(this.run()) ? leftWords(this.run().secondsLeft) : undefined,
  );
  protected readonly firstBatch = computed(() => firstBatchWords(this.run()));
  protected readonly heading = computed(() => {
    switch (this.run().state) {
      case 'building':
        return 'Making statements';
      case 'sending':
        return 'Sending';
      case 'held':
        return 'Held';
      case 'failed':
        return 'Not finished';
      case 'done':
        return 'Closed';
    }
  });

  protected hold(): Promise<void> {
    return this.#steer('hold', 'Held: nothing more is made or mailed until you go on.');
  }

  protected goOn(): Promise<void> {
    return this.#steer('goOn', 'It goes on from where it was.');
  }

  async #steer(act: 'hold' | 'goOn', text: string): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      this.changed.emit(await firstValueFrom(this.#api[act](this.run().id)));
      this.#messages.say(text);
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.busy.set(false);
    }
  }
}
