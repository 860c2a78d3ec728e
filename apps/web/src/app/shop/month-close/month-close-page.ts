import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  counted,
  dayIn,
  EmptyNote,
  instantText,
  LoadNote,
  MonthPipe,
  monthText,
  PageHead,
  problemText,
  Reading,
} from '@lib/ui';
import { filter, firstValueFrom, interval } from 'rxjs';
import { Intent } from '../../core/api/intent';
import { isProblem } from '../../core/api/problem';
import { Confirm } from '../../core/confirm/confirm';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { moneyWords } from '../money/money-words';
import { CloseTable } from './close-table';
import { consequenceWords } from './close-words';
import { ClosedMonths } from './closed-months';
import { MonthCloseApi, type Preview } from './month-close-api';
import { monthsLater } from './months';
import { RunProgress } from './run-progress';
import { atWork } from './run-words';
import { UnfinishedList } from './unfinished-list';

/** Should the live stream be cut off, progress is still asked for now and then. */
const askAgain = 3_000;

/**
 * One sheet, read downwards: what is unfinished, what each store's statement would say, and the
 * button. Pressed, the same sheet shows how far it is, also after a reload or from another desk,
 * because what it shows is the server's run and nothing this page remembers.
 */
@Component({
  selector: 'tw-month-close-page',
  imports: [
    ClosedMonths,
    CloseTable,
    EmptyNote,
    LoadNote,
    MatButton,
    MonthPipe,
    PageHead,
    RouterLink,
    RunProgress,
    UnfinishedList,
  ],
  templateUrl: './month-close-page.html',
  styleUrl: './month-close-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MonthClosePage {
  readonly #api = inject(MonthCloseApi);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  readonly #money = moneyWords();
  readonly #intent = new Intent();
  protected readonly session = inject(Session);

  /** Of the address; the month that is due without one. */
  readonly month = input<string>();

  protected readonly preview = rxResource({
    params: () => ({ month: this.month() }),
    stream: ({ params }) => this.#api.preview(params.month),
  });
  protected readonly run = rxResource({
    params: () =>
      this.preview.hasValue() ? (this.preview.value().run?.id ?? undefined) : undefined,
    stream: ({ params }) => this.#api.run(params),
  });
  protected readonly busy = signal(false);

  readonly #name = computed(() =>
    this.preview.hasValue() ? monthText(this.preview.value().month, this.#reading.locale()) : '',
  );
  protected readonly heading = computed(() => {
    const state = this.preview.hasValue() ? this.#state() : undefined;
    if (!state) return `Close ${this.#name()}`;
    return state === 'done' ? `${this.#name()} is closed` : `Closing ${this.#name()}`;
  });
  readonly #state = computed(() => {
    if (this.run.hasValue()) return this.run.value().state;
    return this.preview.hasValue() ? this.preview.value().run?.state : undefined;
  });
  protected readonly sub = computed(() => {
    if (!this.preview.hasValue()) return '';
    const { stores, dueAt, run } = this.preview.value();
    const at = dueAt && instantText(dueAt, this.#reading.locale(), this.#reading.zone());
    const due = run ? '' : at ? `, closes by itself on ${at}` : ', closes when you say so';
    return counted(stores.length, 'store') + due;
  });
  protected readonly consequence = computed(() =>
    this.preview.hasValue() ? consequenceWords(this.preview.value(), this.#money) : '',
  );
  readonly #thisMonth = computed(() => dayIn(this.#reading.zone(), new Date()).slice(0, 7));
  protected readonly hasLater = computed(
    () => this.preview.hasValue() && this.preview.value().month < this.#thisMonth(),
  );
  protected readonly obstacle = computed(() =>
    this.hasLater()
      ? 'A later month is closed already, and what came before stands on it.'
      : `${this.#name()} is not over. This is what it would say so far.`,
  );

  constructor() {
    reloadOn(this.preview, 'statement-run', 'visit', 'ruling', 'ticket', 'payment', 'contacts');
    reloadOn(this.run, 'statement-run', 'delivery');
    interval(askAgain)
      .pipe(
        filter(() => this.run.hasValue() && atWork(this.run.value())),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.run.reload());
    effect(() => {
      if (this.preview.hasValue()) this.#titles.name(this.heading());
    });
  }

  protected other(by: number): string {
    return this.preview.hasValue() ? monthsLater(this.preview.value().month, by) : '';
  }

  protected async close(preview: Preview): Promise<void> {
    if (this.busy()) return;
    const agreed = await this.#confirm.ask({
      heading: `Close ${this.#name()}?`,
      consequence: consequenceWords(preview, this.#money),
      action: `Close ${this.#name()}`,
      stay: 'Not yet',
    });
    if (!agreed) return;
    this.busy.set(true);
    try {
      const run = await firstValueFrom(this.#api.close(preview.month, this.#intent.key));
      this.#intent.renew();
      this.preview.update((shown) => shown && { ...shown, run: { id: run.id, state: run.state } });
      this.#messages.say(`${this.#name()} is being closed. You can follow it here.`);
    } catch (problem) {
      if (!isProblem(problem) || !problem.unanswered) this.#intent.renew();
      this.#messages.say(problemText(problem));
      this.preview.reload();
    } finally {
      this.busy.set(false);
    }
  }
}
