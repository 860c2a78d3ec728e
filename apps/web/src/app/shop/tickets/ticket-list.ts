import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ChoiceFilter, DayPipe, ListShell, listState, MoneyText, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ClientChoices } from '../clients/client-choices';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { moneySign } from '../money/money-sign';
import { StoreChoices } from '../stores/store-choices';
import { type TicketItem, TicketsApi } from './tickets-api';

type Absorbed = '' | 'shop' | 'supplier' | 'contract' | 'goodwill';

/** Signed-off tickets, newest first. */
@Component({
  selector: 'tw-ticket-list',
  imports: [ChoiceFilter, DayPipe, ListShell, MoneyText, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ticket-list.html',
  styles: `
    .more {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class TicketList {
  readonly #api = inject(TicketsApi);
  readonly #exports = inject(RowsExport);
  protected readonly session = inject(Session);
  protected readonly clients = inject(ClientChoices).current();
  protected readonly stores = inject(StoreChoices).current();
  protected readonly sign = moneySign();

  protected readonly tickets = listState((ask) => this.#api.list(ask), {
    sorts: { '-signedOffOn': 'Newest' },
    filters: filtersFromAddress({ clientId: '', storeId: '', absorbed: '' as Absorbed }),
  });
  protected readonly bearers = [
    { value: 'shop', label: 'The shop' },
    { value: 'goodwill', label: 'The shop, as goodwill' },
    { value: 'supplier', label: 'A supplier' },
    { value: 'contract', label: 'A contract' },
  ];

  constructor() {
    reloadOn(this.tickets, 'ticket');
    keepInAddress(this.tickets);
  }

  protected byBearer(bearer: string): void {
    this.tickets.filterBy('absorbed', bearer as Absorbed);
  }

  protected export(): void {
    const { cursor: _cursor, ...ask } = this.tickets.ask();
    void this.#exports.save({
      name: 'tickets',
      one: 'ticket',
      columns,
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }
}

const columns: readonly Column<TicketItem>[] = [
  { head: 'Ticket', text: ({ name }) => name },
  { head: 'Visit', text: ({ visitNumber }) => visitNumber },
  { head: 'Worked on', text: ({ workedOn }) => workedOn },
  { head: 'Signed off on', text: ({ signedOffOn }) => signedOffOn },
  { head: 'Store', text: ({ store }) => store.name },
  { head: 'Client', text: ({ client }) => client.name },
  { head: 'Currency', text: ({ currency }) => currency },
  { head: 'List', amount: ({ list }) => list },
  { head: 'Net', amount: ({ net }) => net },
  { head: 'Tax', amount: ({ tax }) => tax },
  { head: 'Total', amount: ({ total }) => total },
  { head: 'Borne by the shop', amount: ({ borneByShop }) => borneByShop },
  { head: 'Own cost of that', amount: ({ ownCost }) => ownCost },
];
