import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MoneyText } from '@lib/ui/format/money-text';
import { DayPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { WordPipe } from '@lib/ui/words/words';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money-words';
import { ContractsApi } from './contracts-api';

/** The maintenance contracts of the client, to read. */
@Component({
  selector: 'tw-contract-list',
  imports: [DayPipe, ListShell, MoneyText, PageHead, RouterLink, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Contracts" sub="Maintenance you agreed on with the shop" />
    <tw-list-shell
      [list]="contracts"
      searchLabel="Search contracts"
      empty="There is no maintenance contract. The shop can agree on one with you: regular rounds for a monthly fee."
      [csv]="true"
      (csvAsked)="save()"
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Contract</th>
            <th scope="col">Rounds</th>
            <th scope="col">Next round</th>
            <th scope="col" class="num">Stores</th>
            <th scope="col" class="num">A month, {{ sign() }}</th>
            <th scope="col">State</th>
          </tr>
        </thead>
        <tbody>
          @for (contract of contracts.items(); track contract.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="contract.id">{{ contract.name }}</a>
              </th>
              <td data-label="Rounds">{{ contract.ruleWords }}</td>
              <td data-label="Next round">{{ contract.nextRoundOn | twDay }}</td>
              <td class="num" data-label="Stores">{{ contract.stores }}</td>
              <td class="num" data-label="A month">
                <tw-money [amount]="contract.monthlyFee" bare />
              </td>
              <td data-label="State">{{ contract.state | twWord }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class ContractList {
  readonly #api = inject(ContractsApi);
  readonly #exports = inject(RowsExport);
  protected readonly sign = moneySign();

  protected readonly contracts = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name', '-startsOn': 'Newest' },
  });

  constructor() {
    reloadOn(this.contracts, 'contract');
  }

  protected save(): void {
    void this.#exports.save({
      name: 'contracts',
      one: 'contract',
      columns: [
        { head: 'Contract', text: ({ name }) => name },
        { head: 'Rounds', text: ({ ruleWords }) => ruleWords },
        { head: 'From', text: ({ startsOn }) => startsOn },
        { head: 'Until', text: ({ endsOn }) => endsOn },
        { head: 'Next round', text: ({ nextRoundOn }) => nextRoundOn },
        { head: 'Stores', text: ({ stores }) => stores },
        { head: 'A month', amount: ({ monthlyFee }) => monthlyFee },
        { head: 'State', text: ({ state }) => state },
      ],
      page: (asked) => this.#api.list({ ...this.contracts.ask(), ...asked }),
    });
  }
}
