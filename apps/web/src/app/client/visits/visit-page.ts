import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { ticketName } from '@lib/domain/words/document-name';
import { Reading } from '@lib/ui/format/reading';
import { ClockPipe, DayPipe, InstantPipe } from '@lib/ui/format/time-pipes';
import { dayText } from '@lib/ui/format/times';
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { wordFor } from '@lib/ui/words/words';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { faultText } from '../calls/call-words';
import { moneyWords } from '../money-words';
import { testedBy, testMoneyWords } from './proof';
import { VisitJob } from './visit-job';
import { type Visit, VisitsApi } from './visits-api';

/** One visit for an owner who was not there: in a sentence, then machine by machine. */
@Component({
  selector: 'tw-visit-page',
  imports: [
    ClockPipe,
    DayPipe,
    InstantPipe,
    LoadNote,
    PageHead,
    RouterLink,
    SectionHead,
    TicketCard,
    VisitJob,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-page.html',
  styles: `
    [stub] span {
      display: block;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    .number {
      display: block;
      font-size: 1.25rem;
      font-weight: 600;
    }
    .words {
      font-size: 1.125rem;
      font-weight: 500;
    }
    p {
      margin: 0 0 0.5rem;
      overflow-wrap: anywhere;
    }
    ul {
      margin: 0;
      padding-inline-start: 1.25rem;
    }
    .calls {
      padding: 0;
      list-style: none;
    }
  `,
})
export class VisitPage {
  readonly #api = inject(VisitsApi);
  readonly #money = moneyWords();
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly fault = faultText;
  protected readonly ticketName = ticketName;

  readonly visitId = input.required<string>();

  protected readonly visit = rxResource({
    params: () => this.visitId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly testMoney = computed(() =>
    this.visit.hasValue() ? testMoneyWords(testedBy(this.visit.value().jobList), this.#money) : '',
  );

  constructor() {
    reloadOn(this.visit, 'visit', 'files');
    effect(() => {
      if (this.visit.hasValue()) this.#titles.name(`Visit ${this.visit.value().number}`);
    });
  }

  protected sub({ plannedOn, state }: Visit): string {
    return `${dayText(plannedOn, this.#reading.locale())} · ${wordFor(state)}`;
  }
}
