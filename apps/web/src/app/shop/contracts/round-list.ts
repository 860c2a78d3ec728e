import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type Choice, ChoiceFilter, DayPipe, ListShell, listState, PageHead } from '@lib/ui';
import { RowsExport } from '../../core/lists/rows-export';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { StoreChoices } from '../stores/store-choices';
import { ContractsApi, type Round } from './contracts-api';
import { roundWords } from './round-words';

const states: readonly Choice[] = [
  { value: 'planned', label: 'Planned' },
  { value: 'done', label: 'Done' },
  { value: 'skipped', label: 'Left out' },
];

/** The rounds of every contract. */
@Component({
  selector: 'tw-round-list',
  imports: [ChoiceFilter, DayPipe, ListShell, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Rounds" upLink="/shop/contracts" upLabel="Contracts" />
    <tw-list-shell
      [list]="rounds"
      searchLabel="Search rounds"
      empty="Rounds of your contracts appear here a while before they are due, each with its visit."
      [csv]="true"
      (csvAsked)="save()"
    >
      <tw-choice-filter
        filters
        label="State"
        any="Every state"
        [options]="states"
        [value]="rounds.filters().state"
        (chosen)="rounds.filterBy('state', $any($event))"
      />
      <tw-choice-filter
        filters
        label="Store"
        any="Every store"
        [options]="stores()"
        [value]="rounds.filters().storeId"
        (chosen)="rounds.filterBy('storeId', $event)"
      />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Day</th>
            <th scope="col">Store</th>
            <th scope="col">Contract</th>
            <th scope="col">How it stands</th>
            <th scope="col">Visit</th>
          </tr>
        </thead>
        <tbody>
          @for (round of rounds.items(); track round.id) {
            <tr>
              <th scope="row">
                {{ round.plannedOn | twDay }}
                @if (round.dueOn !== round.plannedOn) {
                  <span class="tw-soft">due {{ round.dueOn | twDay }}</span>
                }
              </th>
              <td data-label="Store">{{ round.storeName }}</td>
              <td data-label="Contract">
                <a [routerLink]="['/shop/contracts', round.contractId]">{{ round.contractName }}</a>
              </td>
              <td data-label="How it stands">{{ roundWords(round) }}</td>
              <td data-label="Visit">
                @if (round.visitId; as visitId) {
                  <a [routerLink]="['/shop/visits', visitId]">Visit {{ round.visitNumber }}</a>
                } @else {
                  none
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
  styles: `
    th span {
      display: block;
      font-weight: 400;
      font-size: 0.875rem;
    }
  `,
})
export class RoundList {
  readonly #api = inject(ContractsApi);
  readonly #exports = inject(RowsExport);

  protected readonly states = states;
  protected readonly roundWords = roundWords;
  protected readonly stores = inject(StoreChoices).current();
  protected readonly rounds = listState((ask) => this.#api.rounds(ask), {
    sorts: { '-plannedOn': 'Newest first', plannedOn: 'Oldest first' },
    filters: filtersFromAddress({
      state: '' as '' | Round['state'],
      storeId: '' as string,
      contractId: '' as string,
    }),
  });

  constructor() {
    keepInAddress(this.rounds);
    reloadOn(this.rounds, 'contract', 'visit');
  }

  protected save(): void {
    const ask = this.rounds.ask();
    void this.#exports.save<Round>({
      name: 'rounds',
      one: 'round',
      columns: [
        { head: 'Due', text: (row) => row.dueOn },
        { head: 'Planned', text: (row) => row.plannedOn },
        { head: 'Store', text: (row) => row.storeName },
        { head: 'Contract', text: (row) => row.contractName },
        { head: 'State', text: (row) => roundWords(row) },
        { head: 'Visit', text: (row) => row.visitNumber },
      ],
      page: (asked) => this.#api.rounds({ ...ask, ...asked }),
    });
  }
}
