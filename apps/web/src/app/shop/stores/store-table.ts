import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MachineTally } from './machine-tally';
import { type StoreSummary } from './stores-api';

/** Rows of stores, with their client unless all are of the same one. */
@Component({
  selector: 'tw-store-table',
  imports: [MachineTally, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <table class="tw-table">
      <thead>
        <tr>
          <th scope="col">Store</th>
          @if (!ofOneClient()) {
            <th scope="col">Client</th>
          }
          <th scope="col">Address</th>
          <th scope="col">Machines</th>
        </tr>
      </thead>
      <tbody>
        @for (store of stores(); track store.id) {
          <tr>
            <th scope="row">
              <a [routerLink]="['/shop/stores', store.id]">{{ store.name }}</a>
              <span class="tw-soft"> {{ store.number }}{{ store.endedAt ? ', ended' : '' }}</span>
            </th>
            @if (!ofOneClient()) {
              <td data-label="Client">
                <a [routerLink]="['/shop/clients', store.client.id]">{{ store.client.name }}</a>
              </td>
            }
            <td data-label="Address">
              {{
                store.address.replaceAll(
                  '
',
                  ', '
                )
              }}
            </td>
            <td data-label="Machines"><tw-machine-tally [machines]="store.machines" /></td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    th .tw-soft {
      font-weight: 400;
      white-space: nowrap;
    }
  `,
})
export class StoreTable {
  readonly stores = input.required<readonly StoreSummary[]>();
  readonly ofOneClient = input(false);
}
