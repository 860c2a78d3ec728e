import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { InstantPipe, LabelPipe, StateMark, WordPipe } from '@lib/ui';
import { type MachineSummary } from './machines-api';

/** Rows of machines, with their store unless all are of the same one. */
@Component({
  selector: 'tw-machine-table',
  imports: [InstantPipe, LabelPipe, RouterLink, StateMark, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <table class="tw-table">
      <thead>
        <tr>
          <th scope="col">Bay</th>
          @if (!ofOneStore()) {
            <th scope="col">Store</th>
          }
          <th scope="col">Kind</th>
          <th scope="col">Make and model</th>
          <th scope="col">Serial number</th>
          <th scope="col">State</th>
        </tr>
      </thead>
      <tbody>
        @for (machine of machines(); track machine.id) {
          <tr>
            <th scope="row">
              <a class="tw-figures" [routerLink]="['/shop/machines', machine.id]">{{
                machine.bay
              }}</a>
            </th>
            @if (!ofOneStore()) {
              <td data-label="Store">
                <a [routerLink]="['/shop/stores', machine.store.id]">{{ machine.store.name }}</a>
              </td>
            }
            <td data-label="Kind">{{ machine.kind | twLabel }}</td>
            <td data-label="Make and model">{{ machine.make }} {{ machine.model }}</td>
            <td data-label="Serial number">{{ machine.serial }}</td>
            <td data-label="State">
              <span [class.alarm]="machine.state === 'down'">
                <tw-state-mark [state]="machine.state" /> {{ machine.state | twWord }}
                @if (machine.state !== 'up') {
                  <span class="since tw-soft">since {{ machine.stateSince | twInstant }}</span>
                }
              </span>
            </td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    .since {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class MachineTable {
  readonly machines = input.required<readonly MachineSummary[]>();
  readonly ofOneStore = input(false);
}
