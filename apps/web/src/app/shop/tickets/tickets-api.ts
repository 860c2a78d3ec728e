import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Ticket = AnswerOf<'tickets.show'>;
export type TicketItem = AnswerOf<'tickets.list'>['items'][number];
export type TicketPreview = AnswerOf<'tickets.preview'>;
export type TicketJob = Ticket['jobs'][number];
export type TicketLine = TicketJob['lines'][number];

@Injectable({ providedIn: 'root' })
export class TicketsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'tickets.list'>) {
    return this.#api.call('tickets.list', { query });
  }

  show(ticketId: string) {
    return this.#api.call('tickets.show', { params: { ticketId } });
  }

  preview(visitId: string) {
    return this.#api.call('tickets.preview', { params: { visitId } });
  }

  /** The total that was looked at goes along: another one by now is refused. */
  signOff(visitId: string, total: number, key: string) {
    return this.#api.call('tickets.signOff', { params: { visitId }, body: { total }, key });
  }
}
