import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import {
  ChoiceFilter,
  choicesOf,
  DayPipe,
  labelFor,
  ListShell,
  listState,
  MoneyText,
  SectionHead,
} from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money/money-sign';
import { StoreChoices } from '../stores/store-choices';
import { type AccountCode, type DocumentKind, type Entry, LedgerApi } from './ledger-api';
import {
  accountCodes,
  accountName,
  documentKinds,
  documentLink,
  documentWords,
} from './ledger-words';

/** The entries of the books, newest first. */
@Component({
  selector: 'tw-entry-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MoneyText, RouterLink, SectionHead],
  templateUrl: './entry-list.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EntryList {
  readonly #api = inject(LedgerApi);
  readonly #exports = inject(RowsExport);

  protected readonly sign = moneySign();
  protected readonly accountName = accountName;
  protected readonly documentWords = documentWords;
  protected readonly documentLink = documentLink;
  protected readonly accounts = choicesOf(accountCodes, accountName);
  protected readonly kinds = choicesOf(documentKinds, (value) => labelFor(documentWords(value)));
  protected readonly stores = inject(StoreChoices).current();
  protected readonly entries = listState((ask) => this.#api.entries(ask), {
    sorts: { '-postedOn': 'Newest first', postedOn: 'Oldest first' },
    filters: filtersFromAddress({
      account: '' as '' | AccountCode,
      documentKind: '' as '' | DocumentKind,
      storeId: '' as string,
      from: '' as string,
      to: '' as string,
    }),
  });

  constructor() {
    keepInAddress(this.entries);
    reloadOn(this.entries, 'ticket', 'payment', 'statement-run');
  }

  /** Shows the entries of one account only. */
  narrowTo(account: AccountCode): void {
    this.entries.filterBy('account', account);
  }

  protected save(): void {
    const ask = this.entries.ask();
    void this.#exports.save<Entry>({
      name: 'entries',
      one: 'entry',
      many: 'entries',
      columns: [
        { head: 'Day', text: (row) => row.postedOn },
        { head: 'Account', text: (row) => row.account },
        { head: 'Amount', amount: (row) => row.amount },
        { head: 'Store', text: (row) => row.storeName },
        { head: 'Document', text: (row) => row.documentKind },
        { head: 'Document id', text: (row) => row.documentId },
      ],
      page: (asked) => this.#api.entries({ ...ask, ...asked }),
    });
  }
}
