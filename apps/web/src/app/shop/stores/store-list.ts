import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ListExport } from '../exports/list-export';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { StoreTable } from './store-table';
import { StoresApi } from './stores-api';

@Component({
  selector: 'tw-store-list',
  imports: [ListShell, MatButton, PageHead, RouterLink, ShowFilter, StoreTable],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Stores">
      @if (session.mayChange('imports.run')) {
        <a matButton="outlined" routerLink="/shop/imports">Import</a>
      }
      @if (session.mayChange('clients.change')) {
        <a matButton="filled" routerLink="new">Add a store</a>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="stores"
      searchLabel="Search stores"
      empty="A store is one laundry at one address. Those you add or import appear here, with how their machines are."
      [csv]="session.may('exports.read')"
      (csvAsked)="exports.save('stores')"
    >
      <tw-show-filter filters [list]="stores" />
      <tw-store-table [stores]="stores.items()" />
      @if (session.mayChange('clients.change')) {
        <a emptyAction matButton="filled" routerLink="new">Add a store</a>
      }
    </tw-list-shell>
  `,
})
export class StoreList {
  readonly #api = inject(StoresApi);
  protected readonly session = inject(Session);
  protected readonly exports = inject(ListExport);

  protected readonly stores = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name', number: 'Number' },
    filters: filtersFromAddress({ show: '' as Shown }),
  });

  constructor() {
    keepInAddress(this.stores);
    reloadOn(this.stores, 'stores', 'clients', 'machines');
  }
}
