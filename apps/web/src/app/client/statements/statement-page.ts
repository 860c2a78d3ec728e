import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { moneyText } from '@lib/ui/format/money';
import { MoneyText } from '@lib/ui/format/money-text';
import { Reading } from '@lib/ui/format/reading';
import { DayPipe } from '@lib/ui/format/time-pipes';
import { monthText } from '@lib/ui/format/times';
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { Callout } from '@lib/ui/notes/callout';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { StatementPdf } from '../../core/documents/statement-pdf';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { PayButton } from '../payments/pay-button';
import { balanceRows } from './balance-rows';
import { StatedVisit } from './stated-visit';
import { monthInWords } from './statement-sums';
import { type Statement, StatementsApi } from './statements-api';

/** A statement: read in a minute, paid in another. */
@Component({
  selector: 'tw-statement-page',
  imports: [
    Callout,
    DayPipe,
    LoadNote,
    MoneyText,
    PageHead,
    PayButton,
    SectionHead,
    StatedVisit,
    StatementPdf,
    TicketCard,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './statement-page.html',
  styleUrl: './statement-page.scss',
})
export class StatementPage {
  readonly #api = inject(StatementsApi);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);

  readonly statementId = input.required<string>();

  protected readonly statement = rxResource({
    params: () => this.statementId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly rows = balanceRows;

  constructor() {
    reloadOn(this.statement, 'statement', 'payment');
    effect(() => {
      if (this.statement.hasValue()) this.#titles.name(this.heading(this.statement.value()));
    });
  }

  protected heading({ month, storeName }: Statement): string {
    return `${storeName}, ${monthText(month, this.#reading.locale())}`;
  }

  protected words({ visits }: Statement): string {
    return `${monthInWords(visits)}.`;
  }

  protected payLabel({ toPay, currency, name }: Statement): string {
    return `Pay ${moneyText(toPay, currency, this.#reading.locale())} for statement ${name}`;
  }

  protected failing({ checks }: Statement): Statement['checks'] {
    return checks.filter(({ holds }) => !holds);
  }
}
