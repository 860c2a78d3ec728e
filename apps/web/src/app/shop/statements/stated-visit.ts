import { NgTemplateOutlet } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ticketName } from '@lib/domain/words/document-name';
import {
  BearerLabel,
  currencySign,
  DayPipe,
  MoneyText,
  moneyText,
  Reading,
  TicketCard,
} from '@lib/ui';
import { jobWords } from './job-words';
import { type StatedJob, type StatedVisit } from './statements-api';

/** One visit as it stands on a statement: a sentence first, the lines for who wants them. */
@Component({
  selector: 'tw-stated-visit',
  imports: [BearerLabel, DayPipe, MoneyText, NgTemplateOutlet, RouterLink, TicketCard],
  templateUrl: './stated-visit.html',
  styles: `
    :host {
      display: block;
    }
    .stub {
      display: flex;
      flex-direction: column;
      flex-wrap: wrap;
    }
    .amount {
      font-weight: 600;
      text-align: start;
    }
    p {
      margin: 0 0 0.25rem;
    }
    .words {
      font-weight: 500;
    }
    summary {
      padding-block: 0.25rem;
      color: var(--tw-carbon);
      cursor: pointer;
    }
    h3 {
      margin-block: 0.75rem 0;
    }
    h3 span {
      font-weight: 400;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatedVisitTicket {
  readonly #reading = inject(Reading);

  readonly visit = input.required<StatedVisit>();
  readonly currency = input.required<string>();

  protected readonly name = computed(() => ticketName(this.visit().ticketNumber));
  protected readonly sign = computed(() => currencySign(this.currency(), this.#reading.locale()));

  /** Templates in templates carry no types. */
  protected asLines(rows: unknown): StatedJob['lines'] {
    return rows as StatedJob['lines'];
  }

  protected jobWords(job: StatedJob): string {
    const money = (amount: number) => moneyText(amount, this.currency(), this.#reading.locale());
    return jobWords(job, money);
  }
}
