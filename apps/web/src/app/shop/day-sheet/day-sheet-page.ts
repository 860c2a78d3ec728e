import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { addDays } from '@lib/domain/calendar/trade-day';
import { counted, dayIn, dayText, EmptyNote, LoadNote, PageHead, Reading } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { crewChoices } from '../visits/crew-choices';
import { VisitsApi } from '../visits/visits-api';
import { AssignForm } from './assign-form';
import { DayRow } from './day-row';
import { DayTicket } from './day-ticket';
import { lineOf } from './lay-out-day';

/** A day by tech: who goes where and when, and what nobody goes to yet. */
@Component({
  selector: 'tw-day-sheet-page',
  imports: [AssignForm, DayRow, DayTicket, EmptyNote, LoadNote, MatButton, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './day-sheet-page.html',
  styleUrl: './day-sheet-page.scss',
})
export class DaySheetPage {
  readonly #api = inject(VisitsApi);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);
  protected readonly session = inject(Session);
  protected readonly crew = crewChoices();

  /** Of the address; today without one. */
  readonly on = input<string>();
  protected readonly today = computed(() => dayIn(this.#reading.zone(), new Date()));
  protected readonly shown = computed(() => this.on() ?? this.today());
  protected readonly before = computed(() => addDays(this.shown(), -1));
  protected readonly after = computed(() => addDays(this.shown(), 1));

  protected readonly sheet = rxResource({
    params: () => this.shown(),
    stream: ({ params }) => this.#api.daySheet(params),
  });
  protected readonly heading = computed(() => dayText(this.shown(), this.#reading.locale()));
  protected readonly sub = computed(() => {
    if (!this.sheet.hasValue()) return undefined;
    const { techs, unplaced, openCalls } = this.sheet.value();
    const visits = techs.reduce((sum, tech) => sum + tech.visits.length, 0) + unplaced.length;
    const calls = openCalls ? `, ${counted(openCalls, 'call')} without a visit` : '';
    return `${counted(visits, 'visit')}${calls}`;
  });
  protected readonly line = computed(() => {
    const sheet = this.sheet.hasValue() ? this.sheet.value() : undefined;
    const visits = sheet?.techs.flatMap((tech) => tech.visits) ?? [];
    return lineOf(visits, this.#reading.zone());
  });
  protected readonly hours = computed(() => {
    const { from, until } = this.line();
    return Array.from({ length: until - from }, (_, at) => from + at);
  });

  constructor() {
    reloadOn(this.sheet, 'visit', 'call');
  }

  protected goTo(event: Event): void {
    const on = (event.target as HTMLInputElement).value;
    if (on) void this.#router.navigate(['/shop/day-sheet'], { queryParams: { on } });
  }
}
