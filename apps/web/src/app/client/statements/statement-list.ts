import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MoneyText } from '@lib/ui/format/money-text';
import { DayPipe, MonthPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { ChoiceFilter } from '@lib/ui/list/choice-filter';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { WordPipe } from '@lib/ui/words/words';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money-words';
import { StatementsApi } from './statements-api';

type State = '' | 'open' | 'overdue' | 'paid';

/** One statement a store and month: what it came to, and whether it is paid. */
@Component({
  selector: 'tw-statement-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MoneyText, MonthPipe, PageHead, RouterLink, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Statements" sub="One for each store and month" />
    <tw-list-shell
      [list]="statements"
      searchLabel="Search by store"
      empty="The first statement stands here after the first month is closed."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="Show"
        any="All"
        [options]="states"
        [value]="statements.filters().state"
        (chosen)="narrow($event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Month</th>
            <th scope="col">Store</th>
            <th scope="col" class="num">This month, {{ sign() }}</th>
            <th scope="col" class="num">Borne by the shop, {{ sign() }}</th>
            <th scope="col" class="num">Balance then, {{ sign() }}</th>
            <th scope="col">Due</th>
            <th scope="col">State</th>
          </tr>
        </thead>
        <tbody>
          @for (statement of statements.items(); track statement.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="statement.id">{{ statement.month | twMonth }}</a>
              </th>
              <td data-label="Store">{{ statement.storeName }}</td>
              <td class="num" data-label="This month">
                <tw-money [amount]="statement.charged + statement.tax" bare />
              </td>
              <td class="num" data-label="Borne by the shop">
                <tw-money [amount]="statement.borneByShop" bare />
              </td>
              <td class="num" data-label="Balance then">
                <tw-money [amount]="statement.closing" bare />
              </td>
              <td data-label="Due">{{ statement.dueOn | twDay }}</td>
              <td data-label="State" [class.alarm]="statement.state === 'overdue'">
                {{ statement.state | twWord }}
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class StatementList {
  readonly #api = inject(StatementsApi);
  readonly #exports = inject(RowsExport);
  protected readonly sign = moneySign();

  protected readonly states = [
    { value: 'open', label: 'Open' },
    { value: 'overdue', label: 'Overdue' },
    { value: 'paid', label: 'Paid' },
  ];
  protected readonly statements = listState((ask) => this.#api.list(ask), {
    sorts: { '-month': 'Newest', month: 'Oldest', dueOn: 'Due first' },
    filters: filtersFromAddress({ state: '' as State }),
  });

  constructor() {
    reloadOn(this.statements, 'statement', 'payment');
    keepInAddress(this.statements);
  }

  protected narrow(state: string): void {
    this.statements.filterBy('state', state as State);
  }

  protected save(): void {
    void this.#exports.save({
      name: 'statements',
      one: 'statement',
      columns: [
        { head: 'Statement', text: ({ name }) => name },
        { head: 'Month', text: ({ month }) => month },
        { head: 'Store', text: ({ storeName }) => storeName },
        { head: 'Currency', text: ({ currency }) => currency },
        { head: 'Opening', amount: ({ opening }) => opening },
        { head: 'Charged', amount: ({ charged }) => charged },
        { head: 'Tax', amount: ({ tax }) => tax },
        { head: 'Paid', amount: ({ paid }) => paid },
        { head: 'Borne by the shop', amount: ({ borneByShop }) => borneByShop },
        { head: 'Closing', amount: ({ closing }) => closing },
        { head: 'Due', text: ({ dueOn }) => dueOn },
        { head: 'State', text: ({ state }) => state },
      ],
      page: (asked) => this.#api.list({ ...this.statements.ask(), ...asked }),
    });
  }
}
