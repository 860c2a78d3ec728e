import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { counted, LoadNote, MonthPipe, PageHead, problemText, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { StatementPdf } from '../../core/documents/statement-pdf';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { OtherLines } from './other-lines';
import { StatedVisitTicket } from './stated-visit';
import { StatementChecks } from './statement-checks';
import { StatementMails } from './statement-mails';
import { StatementTicket } from './statement-ticket';
import { type Statement, StatementsApi } from './statements-api';

/** One statement: what is owed, why in plain words, to whom it went, and that it adds up. */
@Component({
  selector: 'tw-statement-page',
  imports: [
    LoadNote,
    MatButton,
    MonthPipe,
    OtherLines,
    PageHead,
    RouterLink,
    SectionHead,
    StatedVisitTicket,
    StatementChecks,
    StatementMails,
    StatementPdf,
    StatementTicket,
  ],
  templateUrl: './statement-page.html',
  styles: `
    .visits {
      display: grid;
      gap: 0.75rem;
      max-inline-size: 46rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatementPage {
  readonly #api = inject(StatementsApi);
  readonly #messages = inject(Messages);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly statementId = input.required<string>();

  protected readonly statement = rxResource({
    params: () => this.statementId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly mails = viewChild(StatementMails);
  protected readonly mailing = signal(false);

  constructor() {
    reloadOn(this.statement, 'statement', 'payment', 'delivery');
    effect(() => {
      if (!this.statement.hasValue()) return;
      const { name, storeName } = this.statement.value();
      this.#titles.name(`${name}, ${storeName}`);
    });
  }

  protected async mail({ id, name, storeName }: Statement): Promise<void> {
    if (this.mailing()) return;
    this.mailing.set(true);
    try {
      const { added } = await firstValueFrom(this.#api.mail(id));
      this.#messages.say(
        added
          ? `${name} for ${storeName} is being mailed to ${counted(added, 'person', 'people')}.`
          : `Everybody who gets statements of ${storeName} has been sent ${name} already.`,
      );
      this.mails()?.reload();
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.mailing.set(false);
    }
  }
}
