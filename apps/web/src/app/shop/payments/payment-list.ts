import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  ChoiceFilter,
  choicesOf,
  DayPipe,
  labelFor,
  ListShell,
  listState,
  MoneyText,
  PageHead,
} from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { moneySign } from '../money/money-sign';
import { StoreChoices } from '../stores/store-choices';
import { methodWords, nameOf, paymentStateWords } from './payment-words';
import {
  type PaymentItem,
  type PaymentMethod,
  type PaymentState,
  PaymentsApi,
} from './payments-api';

const methods: readonly PaymentMethod[] = ['card', 'transfer', 'cheque', 'cash'];
const states: readonly PaymentState[] = ['succeeded', 'asked', 'failed', 'expired'];

@Component({
  selector: 'tw-payment-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MatButton, MoneyText, PageHead, RouterLink],
  templateUrl: './payment-list.html',
  styles: `
    .client {
      display: block;
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaymentList {
  readonly #api = inject(PaymentsApi);
  readonly #exports = inject(RowsExport);
  protected readonly session = inject(Session);

  protected readonly sign = moneySign();
  protected readonly nameOf = nameOf;
  protected readonly methodWords = methodWords;
  protected readonly paymentStateWords = paymentStateWords;
  protected readonly methods = choicesOf(methods, (value) => labelFor(methodWords(value)));
  protected readonly states = choicesOf(states, (value) => labelFor(paymentStateWords(value)));
  protected readonly stores = inject(StoreChoices).current();
  protected readonly payments = listState((ask) => this.#api.list(ask), {
    sorts: { '-createdAt': 'Newest first' },
    filters: filtersFromAddress({
      method: '' as '' | PaymentMethod,
      state: '' as '' | PaymentState,
      clientId: '' as string,
      storeId: '' as string,
      statementId: '' as string,
    }),
  });

  constructor() {
    keepInAddress(this.payments);
    reloadOn(this.payments, 'payment');
  }

  protected save(): void {
    const ask = this.payments.ask();
    void this.#exports.save<PaymentItem>({
      name: 'payments',
      one: 'payment',
      columns: [
        { head: 'Number', text: (row) => (row.number === null ? '' : nameOf(row)) },
        { head: 'Received', text: (row) => row.receivedOn },
        { head: 'Store', text: (row) => row.storeName },
        { head: 'Client', text: (row) => row.clientName },
        { head: 'How', text: (row) => row.method },
        { head: 'State', text: (row) => row.state },
        { head: 'Currency', text: (row) => row.currency },
        { head: 'Amount', amount: (row) => row.amount },
        { head: 'Refunded', amount: (row) => row.refunded },
        { head: 'Note', text: (row) => row.words },
      ],
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}
