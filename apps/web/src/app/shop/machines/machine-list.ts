import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ListExport } from '../exports/list-export';
import { type KindFilter, MachineFilters, type StateFilter } from './machine-filters';
import { MachineTable } from './machine-table';
import { MachinesApi } from './machines-api';

@Component({
  selector: 'tw-machine-list',
  imports: [ListShell, MachineFilters, MachineTable, MatButton, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Machines">
      @if (session.mayChange('imports.run')) {
        <a matButton="outlined" routerLink="/shop/imports">Import</a>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="machines"
      searchLabel="Search by bay, model or serial number"
      empty="The machines of all stores appear here. Add them on the page of their store, or import them."
      [csv]="session.may('exports.read')"
      (csvAsked)="exports.save('machines')"
    >
      <tw-machine-filters filters [list]="machines" />
      <tw-machine-table [machines]="machines.items()" />
      <a emptyAction matButton="filled" routerLink="/shop/stores">Go to the stores</a>
    </tw-list-shell>
  `,
})
export class MachineList {
  readonly #api = inject(MachinesApi);
  protected readonly session = inject(Session);
  protected readonly exports = inject(ListExport);

  protected readonly machines = listState((ask) => this.#api.list(ask), {
    sorts: { bay: 'Bay', serial: 'Serial number', '-stateSince': 'Changed last' },
    filters: filtersFromAddress({ state: '' as StateFilter, kind: '' as KindFilter }),
  });

  constructor() {
    keepInAddress(this.machines);
    reloadOn(this.machines, 'machines', 'stores');
  }
}
