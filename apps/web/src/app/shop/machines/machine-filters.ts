import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { machineKinds, machineStates } from '@lib/contracts/generated/values';
import { type MachineKind, type MachineState } from '@lib/contracts/web';
import { labelFor } from '@lib/ui';

export type StateFilter = '' | 'not_up' | MachineState;
export type KindFilter = '' | MachineKind;

interface FilteredList {
  filters(): { readonly state: StateFilter; readonly kind: KindFilter };
  filterBy(name: 'state' | 'kind', value: string): void;
}

/** Narrows a list of machines by state and kind. */
@Component({
  selector: 'tw-machine-filters',
  imports: [MatFormField, MatInput, MatLabel],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>State</mat-label>
      <select matNativeControl [value]="list().filters().state" (change)="set('state', $event)">
        <option value="">All but retired</option>
        <option value="not_up">Not up</option>
        @for (state of states; track state) {
          <option [value]="state">{{ labelFor(state) }}</option>
        }
      </select>
    </mat-form-field>
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>Kind</mat-label>
      <select matNativeControl [value]="list().filters().kind" (change)="set('kind', $event)">
        <option value="">Every kind</option>
        @for (kind of kinds; track kind) {
          <option [value]="kind">{{ labelFor(kind) }}</option>
        }
      </select>
    </mat-form-field>
  `,
  styles: `
    :host {
      display: contents;
    }
    mat-form-field {
      flex: 2 1 8.5rem;
      min-inline-size: 0;
      max-inline-size: 13rem;
    }
  `,
})
export class MachineFilters {
  readonly list = input.required<FilteredList>();
  protected readonly states = machineStates;
  protected readonly kinds = machineKinds;
  protected readonly labelFor = labelFor;

  protected set(name: 'state' | 'kind', event: Event): void {
    this.list().filterBy(name, (event.target as HTMLSelectElement).value);
  }
}
