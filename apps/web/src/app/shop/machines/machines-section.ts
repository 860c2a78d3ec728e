import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { ListShell, listState, SectionHead } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { type KindFilter, MachineFilters, type StateFilter } from './machine-filters';
import { MachineTable } from './machine-table';
import { MachinesApi } from './machines-api';

/** The machines of one store as a list, beside its floor. */
@Component({
  selector: 'tw-machines-section',
  imports: [ListShell, MachineFilters, MachineTable, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Machines" />
    <tw-list-shell
      [list]="machines"
      searchLabel="Search by bay, model or serial number"
      empty="Machines added to the floor are listed here with their data."
    >
      <tw-machine-filters filters [list]="machines" />
      <tw-machine-table [machines]="machines.items()" [ofOneStore]="true" />
    </tw-list-shell>
  `,
})
export class MachinesSection {
  readonly #api = inject(MachinesApi);
  readonly storeId = input.required<string>();

  protected readonly machines = listState(
    (ask) => this.#api.list({ ...ask, storeId: this.storeId() }),
    {
      sorts: { bay: 'Bay', serial: 'Serial number', '-stateSince': 'Changed last' },
      filters: { state: '' as StateFilter, kind: '' as KindFilter },
    },
  );

  constructor() {
    reloadOn(this.machines, 'machines');
  }
}
