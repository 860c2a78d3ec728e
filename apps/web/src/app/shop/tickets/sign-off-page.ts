import { ChangeDetectionStrategy, Component, effect, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { Callout, LoadNote, MoneyText, PageHead, problemText, TicketCard } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Intent } from '../../core/api/intent';
import { isProblem } from '../../core/api/problem';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { moneyWords } from '../money/money-words';
import { ticketWords } from './line-words';
import { TicketLines } from './ticket-lines';
import { type TicketPreview, TicketsApi } from './tickets-api';

/** The ticket of a visit before it is signed off: looked at once more, then never changed. */
@Component({
  selector: 'tw-sign-off-page',
  imports: [Callout, LoadNote, MatButton, MoneyText, PageHead, RouterLink, TicketCard, TicketLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sign-off-page.html',
  styleUrl: './sign-off-page.scss',
})
export class SignOffPage {
  readonly #api = inject(TicketsApi);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  readonly #money = moneyWords();
  protected readonly session = inject(Session);
  readonly visitId = input.required<string>();

  protected readonly preview = rxResource({
    params: () => this.visitId(),
    stream: ({ params }) => this.#api.preview(params),
  });
  readonly #intent = new Intent();
  protected readonly busy = signal(false);
  protected readonly problem = signal('');
  protected readonly ticketWords = ticketWords;

  constructor() {
    reloadOn(this.preview, 'ruling', 'visit');
    effect(() => {
      // Other figures are another ticket: a repeat must not pass for the first one.
      if (this.preview.hasValue()) this.#intent.renew();
    });
  }

  protected async signOff(preview: TicketPreview): Promise<void> {
    // Such a button can be reached and read though it is disabled, and so it can be pressed.
    if (this.busy() || preview.blockers.length > 0) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      const call = this.#api.signOff(this.visitId(), preview.total, this.#intent.key);
      const ticket = await firstValueFrom(call);
      this.#messages.say(
        `Ticket ${ticket.name} for ${ticket.store.name} is signed off at ${this.#money(ticket.total)}.`,
      );
      await this.#router.navigate(['/shop/tickets', ticket.id]);
    } catch (problem) {
      this.problem.set(problemText(problem));
      if (isProblem(problem, 'conflict')) this.preview.reload();
    } finally {
      this.busy.set(false);
    }
  }
}
