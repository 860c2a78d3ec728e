import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { DayPipe, ListShell, listState } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { ContractsApi } from './contracts-api';
import { roundWords } from './round-words';

/** The rounds of one contract, newest first. */
@Component({
  selector: 'tw-round-table',
  imports: [DayPipe, ListShell, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-list-shell
      [list]="rounds"
      [searchable]="false"
      empty="Rounds appear here a while before they are due, each with its visit."
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Day</th>
            <th scope="col">Store</th>
            <th scope="col">How it stands</th>
            <th scope="col">Visit</th>
          </tr>
        </thead>
        <tbody>
          @for (round of rounds.items(); track round.id) {
            <tr>
              <th scope="row">{{ round.plannedOn | twDay }}</th>
              <td data-label="Store">{{ round.storeName }}</td>
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
})
export class RoundTable {
  readonly #api = inject(ContractsApi);

  readonly contractId = input.required<string>();

  protected readonly roundWords = roundWords;
  protected readonly rounds = listState(
    (ask) => this.#api.rounds({ ...ask, contractId: this.contractId() }),
    { sorts: { '-plannedOn': 'Newest first', plannedOn: 'Oldest first' } },
  );

  constructor() {
    reloadOn(this.rounds, 'contract', 'visit');
  }
}
