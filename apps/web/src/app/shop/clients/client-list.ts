import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { counted, ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ListExport } from '../exports/list-export';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { ClientsApi } from './clients-api';

@Component({
  selector: 'tw-client-list',
  imports: [ListShell, MatButton, PageHead, RouterLink, ShowFilter],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Clients">
      <a matButton="outlined" routerLink="/shop/contacts">Contacts</a>
      @if (session.mayChange('imports.run')) {
        <a matButton="outlined" routerLink="/shop/imports">Import</a>
      }
      @if (session.mayChange('clients.change')) {
        <a matButton="filled" routerLink="new">Add a client</a>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="clients"
      searchLabel="Search clients"
      empty="Clients are who owns the laundries and pays. Those you add or import appear here, with their stores."
      [csv]="session.may('exports.read')"
      (csvAsked)="exports.save('clients')"
    >
      <tw-show-filter filters [list]="clients" />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Client</th>
            <th scope="col">Number</th>
            <th scope="col" class="num">Stores</th>
            <th scope="col" class="num">Machines</th>
            <th scope="col">Not up</th>
          </tr>
        </thead>
        <tbody>
          @for (client of clients.items(); track client.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="client.id">{{ client.name }}</a>
                @if (client.endedAt) {
                  <span class="tw-soft"> ended</span>
                }
              </th>
              <td data-label="Number">{{ client.number }}</td>
              <td class="num" data-label="Stores">{{ client.stores }}</td>
              <td class="num" data-label="Machines">{{ client.machines }}</td>
              <td data-label="Not up" [class.alarm]="client.machinesNotUp > 0">
                {{ client.machinesNotUp ? counted(client.machinesNotUp, 'machine') : 'none' }}
              </td>
            </tr>
          }
        </tbody>
      </table>
      @if (session.mayChange('clients.change')) {
        <a emptyAction matButton="filled" routerLink="new">Add a client</a>
      }
    </tw-list-shell>
  `,
})
export class ClientList {
  readonly #api = inject(ClientsApi);
  protected readonly session = inject(Session);
  protected readonly exports = inject(ListExport);
  protected readonly counted = counted;

  protected readonly clients = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name', number: 'Number' },
    filters: filtersFromAddress({ show: '' as Shown }),
  });

  constructor() {
    keepInAddress(this.clients);
    reloadOn(this.clients, 'clients', 'stores', 'machines');
  }
}
