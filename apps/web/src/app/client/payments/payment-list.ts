import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MoneyText } from '@lib/ui/format/money-text';
import { DayPipe, InstantPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { ChoiceFilter } from '@lib/ui/list/choice-filter';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { LabelPipe } from '@lib/ui/words/words';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money-words';
import { type PaymentItem, PaymentsApi } from './payments-api';

type State = '' | PaymentItem['state'];

/** What was paid, and what became of each payment by card. */
@Component({
  selector: 'tw-payment-list',
  imports: [
    ChoiceFilter,
    DayPipe,
    InstantPipe,
    LabelPipe,
    ListShell,
    MoneyText,
    PageHead,
    RouterLink,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Payments" />
    <tw-list-shell
      [list]="payments"
      searchLabel="Search by store"
      empty="What you pay by card, and what the shop writes down of transfers, stands here."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="Show"
        any="All"
        [options]="states"
        [value]="payments.filters().state"
        (chosen)="narrow($event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Day</th>
            <th scope="col">Store</th>
            <th scope="col">How</th>
            <th scope="col">State</th>
            <th scope="col" class="num">Amount, {{ sign() }}</th>
          </tr>
        </thead>
        <tbody>
          @for (payment of payments.items(); track payment.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="payment.id">
                  @if (payment.receivedOn) {
                    {{ payment.receivedOn | twDay }}
                  } @else {
                    {{ payment.createdAt | twInstant }}
                  }
                </a>
              </th>
              <td data-label="Store">{{ payment.storeName }}</td>
              <td data-label="How">{{ payment.method | twLabel }}</td>
              <td data-label="State" [class.alarm]="payment.state === 'failed'">
                {{ stateWords(payment) }}
              </td>
              <td class="num" data-label="Amount"><tw-money [amount]="payment.amount" bare /></td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class PaymentList {
  readonly #api = inject(PaymentsApi);
  readonly #exports = inject(RowsExport);
  protected readonly sign = moneySign();

  protected readonly states = [
    { value: 'succeeded', label: 'Paid' },
    { value: 'asked', label: 'Begun' },
    { value: 'failed', label: 'Refused' },
    { value: 'expired', label: 'Given up' },
  ];
  protected readonly payments = listState((ask) => this.#api.list(ask), {
    sorts: { '-createdAt': 'Newest' },
    filters: filtersFromAddress({ state: '' as State }),
  });

  constructor() {
    reloadOn(this.payments, 'payment');
    keepInAddress(this.payments);
  }

  protected stateWords({ state, refunded }: PaymentItem): string {
    if (refunded > 0) return 'Given back, all or a part';
    return this.states.find(({ value }) => value === state)?.label ?? state;
  }

  protected narrow(state: string): void {
    this.payments.filterBy('state', state as State);
  }

  protected save(): void {
    void this.#exports.save({
      name: 'payments',
      one: 'payment',
      columns: [
        { head: 'Payment', text: ({ number }) => number },
        { head: 'Day', text: ({ receivedOn }) => receivedOn },
        { head: 'Store', text: ({ storeName }) => storeName },
        { head: 'How', text: ({ method }) => method },
        { head: 'State', text: ({ state }) => state },
        { head: 'Currency', text: ({ currency }) => currency },
        { head: 'Amount', amount: ({ amount }) => amount },
        { head: 'Given back', amount: ({ refunded }) => refunded },
      ],
      page: (asked) => this.#api.list({ ...this.payments.ask(), ...asked }),
    });
  }
}
