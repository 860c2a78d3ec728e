import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { MoneyText } from '@lib/ui/format/money-text';
import { DayPipe, MonthPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { EMPTY, finalize, switchMap } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { followPayment } from './follow-payment';
import { PayButton } from './pay-button';
import { type Payable, type Payment, PaymentsApi } from './payments-api';

/** One payment; after the card page the browser comes back here, and it is followed to its end. */
@Component({
  selector: 'tw-payment-page',
  imports: [
    DayPipe,
    LoadNote,
    MoneyText,
    MonthPipe,
    PageHead,
    PayButton,
    RouterLink,
    SectionHead,
    TicketCard,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './payment-page.html',
  styles: `
    [stub] span {
      display: block;
      color: var(--tw-soft);
    }
    .amount {
      display: block;
      font-size: 1.25rem;
      font-weight: 600;
      text-align: start;
    }
    .words {
      font-size: 1.125rem;
      font-weight: 500;
    }
    p {
      margin: 0 0 0.5rem;
    }
    .after {
      margin-block-start: 1rem;
    }
    ul {
      padding-inline-start: 1.25rem;
    }
  `,
})
export class PaymentPage {
  readonly #api = inject(PaymentsApi);
  readonly #session = inject(Session);
  readonly #titles = inject(Titles);

  readonly paymentId = input.required<string>();
  /** Of the address, when the person turned back on the card page: `?cancelled=1`. */
  readonly cancelled = input<string>();

  protected readonly payment = rxResource({
    params: () => this.paymentId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly turnedBack = computed(() => this.cancelled() !== undefined);
  protected readonly waiting = signal(false);

  /** The payment to follow: asked for by card, and the person did not turn back. */
  readonly #followed = computed(() => {
    if (!this.payment.hasValue() || this.turnedBack()) return undefined;
    const { id, method, state } = this.payment.value();
    return method === 'card' && state === 'asked' ? id : undefined;
  });

  constructor() {
    reloadOn(this.payment, 'payment');
    effect(() => {
      if (this.payment.hasValue()) this.#titles.name(this.heading(this.payment.value()));
    });
    toObservable(this.#followed)
      .pipe(
        switchMap((id) => (id ? this.#follow(id) : EMPTY)),
        takeUntilDestroyed(),
      )
      .subscribe(({ payment }) => {
        if (payment) this.payment.set(payment);
      });
  }

  protected heading({ state }: Payment): string {
    if (state === 'succeeded') return 'Paid';
    return state === 'asked' && !this.turnedBack() ? 'Payment begun' : 'Not paid';
  }

  /** What can be paid once more; nothing while this one may still come through. */
  protected again({ state, statementId, storeId, balance }: Payment): Payable | undefined {
    if (balance <= 0 || !this.#session.mayChange('payments.pay')) return undefined;
    if (state === 'succeeded' || (state === 'asked' && !this.turnedBack())) return undefined;
    return statementId ? { statementId } : { storeId };
  }

  #follow(id: string) {
    this.waiting.set(true);
    return followPayment(() => this.#api.check(id)).pipe(finalize(() => this.waiting.set(false)));
  }
}
