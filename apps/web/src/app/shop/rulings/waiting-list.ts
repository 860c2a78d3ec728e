import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ChoiceFilter, counted, DayPipe, ListShell, listState, MoneyText, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { ClientChoices } from '../clients/client-choices';
import { moneySign } from '../money/money-sign';
import { RulingsApi, type WaitingVisit } from './rulings-api';

/** Visits with lines whose bearer the owner must decide, oldest first. */
@Component({
  selector: 'tw-waiting-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MoneyText, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './waiting-list.html',
})
export class WaitingList {
  readonly #api = inject(RulingsApi);
  readonly #exports = inject(RowsExport);
  protected readonly session = inject(Session);
  protected readonly clients = inject(ClientChoices).current();
  protected readonly sign = moneySign();
  protected readonly counted = counted;

  protected readonly visits = listState((ask) => this.#api.waiting(ask), {
    sorts: { on: 'Oldest' },
    filters: filtersFromAddress({ clientId: '' }),
  });

  constructor() {
    reloadOn(this.visits, 'ruling', 'visit', 'ticket');
    keepInAddress(this.visits);
  }

  protected export(): void {
    const { cursor: _cursor, ...ask } = this.visits.ask();
    void this.#exports.save({
      name: 'rulings',
      one: 'visit',
      columns,
      page: (asked) => this.#api.waiting({ ...ask, ...asked }),
    });
  }
}

const columns: readonly Column<WaitingVisit>[] = [
  { head: 'Visit', text: ({ visitNumber }) => visitNumber },
  { head: 'Day', text: ({ on }) => on },
  { head: 'Store', text: ({ store }) => store.name },
  { head: 'Client', text: ({ client }) => client.name },
  { head: 'Tech', text: ({ tech }) => tech },
  { head: 'Machines', text: ({ jobs }) => jobs },
  { head: 'Lines', text: ({ lines }) => lines },
  { head: 'Worth', amount: ({ list }) => list },
  { head: 'Our cost', amount: ({ cost }) => cost },
];
