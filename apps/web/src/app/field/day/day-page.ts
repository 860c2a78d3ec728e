import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  Callout,
  dayIn,
  DayPipe,
  dayText,
  EmptyNote,
  InstantPipe,
  PageHead,
  ProblemNote,
  Reading,
} from '@lib/ui';
import { auditTime } from 'rxjs';
import { type Problem } from '../../core/api/problem';
import { Live } from '../../core/live/live';
import { type Sheet } from '../kept/kept';
import { OutboxLine } from '../outbox/outbox-line';
import { PartBook } from '../parts/part-book';
import { Sheets } from '../sheets/sheets';
import { daysOn } from './near-days';
import { VisitTicket } from './visit-ticket';

/** The tech's day: their visits in order, and those nobody has yet. */
@Component({
  selector: 'tw-day-page',
  imports: [
    Callout,
    DayPipe,
    EmptyNote,
    InstantPipe,
    MatButton,
    OutboxLine,
    PageHead,
    ProblemNote,
    RouterLink,
    VisitTicket,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './day-page.html',
  styleUrl: './day-page.scss',
})
export class DayPage {
  readonly #sheets = inject(Sheets);
  readonly #reading = inject(Reading);
  /** The day, from the address; today without one. */
  readonly on = input<string>();

  protected readonly today = computed(() => dayIn(this.#reading.zone(), new Date()));
  protected readonly shown = computed(() => this.on() ?? this.today());
  protected readonly heading = computed(() =>
    this.shown() === this.today() ? 'Today' : dayText(this.shown(), this.#reading.locale()),
  );
  protected readonly before = computed(() => daysOn(this.shown(), -1));
  protected readonly after = computed(() => daysOn(this.shown(), 1));
  protected readonly problem = signal<Problem | undefined>(undefined);
  protected readonly day = computed(() => this.#sheets.day(this.shown()));

  readonly #visits = computed(() =>
    (this.day()?.visitIds ?? [])
      .map((id) => this.#sheets.sheet(id))
      .filter((sheet): sheet is Sheet => sheet !== undefined && sheet.visit.state !== 'cancelled'),
  );
  protected readonly own = computed(() => this.#visits().filter(({ visit }) => visit.tech));
  protected readonly unplaced = computed(() => this.#visits().filter(({ visit }) => !visit.tech));

  constructor() {
    effect(() => {
      this.shown();
      untracked(() => void this.load());
    });
    void inject(PartBook).takeAlong();
    inject(Live)
      .of('visit')
      .pipe(auditTime(1_000), takeUntilDestroyed())
      .subscribe(() => void this.load());
  }

  protected async load(): Promise<void> {
    const on = this.shown();
    const problem = await this.#sheets.openDay(on);
    if (on === this.shown()) this.problem.set(problem);
  }
}
