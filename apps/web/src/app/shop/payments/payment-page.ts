import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import {
  Callout,
  DayPipe,
  InstantPipe,
  LoadNote,
  MoneyText,
  MonthPipe,
  PageHead,
  TicketCard,
} from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { methodWords, nameOf, paymentStateWords } from './payment-words';
import { PaymentsApi } from './payments-api';

/** One payment: how it came, and which statements it settled. */
@Component({
  selector: 'tw-payment-page',
  imports: [
    Callout,
    DayPipe,
    InstantPipe,
    LoadNote,
    MoneyText,
    MonthPipe,
    PageHead,
    RouterLink,
    TicketCard,
  ],
  templateUrl: './payment-page.html',
  styles: `
    tw-ticket {
      max-inline-size: 46rem;
    }
    .stub {
      display: flex;
      flex-direction: column;
      flex-wrap: wrap;
      gap: 0.125rem 0.75rem;
    }
    .number {
      font-size: 1.125rem;
    }
    .amount {
      margin-block-start: 0.75rem;
      font-size: 1.375rem;
      font-weight: 600;
      text-align: start;
    }
    h2 {
      margin-block: 0 0.5rem;
    }
    .written {
      margin: 1rem 0 0;
    }
    h2 ~ h2 {
      margin-block-start: 1.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaymentPage {
  readonly #api = inject(PaymentsApi);
  readonly #titles = inject(Titles);

  readonly paymentId = input.required<string>();

  protected readonly nameOf = nameOf;
  protected readonly methodWords = methodWords;
  protected readonly paymentStateWords = paymentStateWords;
  protected readonly payment = rxResource({
    params: () => this.paymentId(),
    stream: ({ params }) => this.#api.show(params),
  });

  constructor() {
    reloadOn(this.payment, 'payment');
    effect(() => {
      if (!this.payment.hasValue()) return;
      const payment = this.payment.value();
      this.#titles.name(`${nameOf(payment)}, ${payment.storeName}`);
    });
  }
}
