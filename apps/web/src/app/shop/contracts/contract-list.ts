import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { contractName } from '@lib/domain/words/document-name';
import {
  ChoiceFilter,
  choicesOf,
  DayPipe,
  ListShell,
  listState,
  MoneyText,
  PageHead,
} from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ClientChoices } from '../clients/client-choices';
import { moneySign } from '../money/money-sign';
import { type ContractItem, ContractsApi, type ContractState } from './contracts-api';

const states: readonly ContractState[] = ['running', 'coming', 'ended'];

@Component({
  selector: 'tw-contract-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MatButton, MoneyText, PageHead, RouterLink],
  templateUrl: './contract-list.html',
  styles: `
    .client {
      display: block;
      font-weight: 400;
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ContractList {
  readonly #api = inject(ContractsApi);
  readonly #exports = inject(RowsExport);
  protected readonly session = inject(Session);

  protected readonly sign = moneySign();
  protected readonly states = choicesOf(states);
  protected readonly clients = inject(ClientChoices).current();
  protected readonly contracts = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name', '-startsOn': 'Newest first' },
    filters: filtersFromAddress({
      state: '' as '' | ContractState,
      clientId: '' as string,
      storeId: '' as string,
    }),
  });

  constructor() {
    keepInAddress(this.contracts);
    reloadOn(this.contracts, 'contract');
  }

  protected save(): void {
    const ask = this.contracts.ask();
    void this.#exports.save<ContractItem>({
      name: 'contracts',
      one: 'contract',
      columns: [
        { head: 'Number', text: (row) => contractName(row.number) },
        { head: 'Name', text: (row) => row.name },
        { head: 'Client', text: (row) => row.clientName },
        { head: 'Rounds', text: (row) => row.ruleWords },
        { head: 'Starts', text: (row) => row.startsOn },
        { head: 'Ends', text: (row) => row.endsOn },
        { head: 'State', text: (row) => row.state },
        { head: 'Stores', text: (row) => row.stores },
        { head: 'Fee a month', amount: (row) => row.monthlyFee },
        { head: 'Next round', text: (row) => row.nextRoundOn },
      ],
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}
