import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { DayPipe, InstantPipe, LoadNote, MoneyText, PageHead, TicketCard } from '@lib/ui';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { ticketWords } from './line-words';
import { TicketLines } from './ticket-lines';
import { TicketsApi } from './tickets-api';

/** A ticket as it was signed off. */
@Component({
  selector: 'tw-ticket-page',
  imports: [
    DayPipe,
    InstantPipe,
    LoadNote,
    MatButton,
    MoneyText,
    PageHead,
    RouterLink,
    TicketCard,
    TicketLines,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ticket-page.html',
  styleUrl: './ticket-page.scss',
})
export class TicketPage {
  readonly #api = inject(TicketsApi);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  readonly ticketId = input.required<string>();

  protected readonly ticket = rxResource({
    params: () => this.ticketId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly ticketWords = ticketWords;

  constructor() {
    effect(() => {
      if (this.ticket.hasValue()) this.#titles.name(`Ticket ${this.ticket.value().name}`);
    });
  }

  protected print(): void {
    window.print();
  }
}
