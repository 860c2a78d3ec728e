import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  type Choice,
  ChoiceFilter,
  choicesOf,
  DayPipe,
  ListShell,
  listState,
  MoneyText,
  MonthPipe,
  monthText,
  PageHead,
  Reading,
} from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { moneySign } from '../money/money-sign';
import { MonthCloseApi } from '../month-close/month-close-api';
import { StoreChoices } from '../stores/store-choices';
import { type StatementItem, type StatementState, StatementsApi } from './statements-api';

const states: readonly StatementState[] = ['open', 'overdue', 'paid'];

@Component({
  selector: 'tw-statement-list',
  imports: [
    ChoiceFilter,
    DayPipe,
    ListShell,
    MatButton,
    MoneyText,
    MonthPipe,
    PageHead,
    RouterLink,
  ],
  templateUrl: './statement-list.html',
  styles: `
    .client {
      display: block;
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatementList {
  readonly #api = inject(StatementsApi);
  readonly #closes = inject(MonthCloseApi);
  readonly #exports = inject(RowsExport);
  readonly #reading = inject(Reading);
  protected readonly session = inject(Session);

  protected readonly sign = moneySign();
  protected readonly states = choicesOf(states);
  protected readonly statements = listState((ask) => this.#api.list(ask), {
    sorts: {
      '-month': 'Newest month',
      month: 'Oldest month',
      dueOn: 'Due first',
      '-number': 'Number',
    },
    filters: filtersFromAddress({
      month: '' as string,
      state: '' as '' | StatementState,
      clientId: '' as string,
      storeId: '' as string,
      runId: '' as string,
    }),
  });
  /** The months that were closed: others have no statements. */
  readonly #closed = rxResource({ stream: () => this.#closes.runs({ limit: 100 }) });
  protected readonly months = computed<readonly Choice[]>(() =>
    this.#closed.hasValue()
      ? this.#closed.value().items.map(({ month }) => ({
          value: month,
          label: monthText(month, this.#reading.locale()),
        }))
      : [],
  );
  protected readonly stores = inject(StoreChoices).current();

  constructor() {
    keepInAddress(this.statements);
    reloadOn(this.statements, 'statement', 'statement-run', 'payment');
  }

  protected save(): void {
    const ask = this.statements.ask();
    void this.#exports.save<StatementItem>({
      name: 'statements',
      one: 'statement',
      columns: [
        { head: 'Number', text: (row) => row.name },
        { head: 'Store', text: (row) => row.storeName },
        { head: 'Client', text: (row) => row.clientName },
        { head: 'Month', text: (row) => row.month },
        { head: 'Issued', text: (row) => row.issuedOn },
        { head: 'Due', text: (row) => row.dueOn },
        { head: 'Currency', text: (row) => row.currency },
        { head: 'Opening', amount: (row) => row.opening },
        { head: 'Charged', amount: (row) => row.charged },
        { head: 'Tax', amount: (row) => row.tax },
        { head: 'Paid', amount: (row) => row.paid },
        { head: 'Borne by the shop', amount: (row) => row.borneByShop },
        { head: 'Closing', amount: (row) => row.closing },
        { head: 'Open', amount: (row) => row.open },
        { head: 'State', text: (row) => row.state },
      ],
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}
