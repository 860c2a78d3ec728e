import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';

/** The filter of things that can end: '' is those that stand. */
export type Shown = '' | 'ended' | 'all';

interface Showing {
  filters(): { readonly show: Shown };
  filterBy(name: 'show', value: Shown): void;
}

@Component({
  selector: 'tw-show-filter',
  imports: [MatFormField, MatInput, MatLabel],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>Show</mat-label>
      <select matNativeControl [value]="list().filters().show" (change)="choose($event)">
        <option value="">Current</option>
        <option value="ended">Ended</option>
        <option value="all">All</option>
      </select>
    </mat-form-field>
  `,
  styles: `
    :host {
      flex: 2 1 8.5rem;
      min-inline-size: 0;
      max-inline-size: 13rem;
    }
    mat-form-field {
      inline-size: 100%;
    }
  `,
})
export class ShowFilter {
  readonly list = input.required<Showing>();

  protected choose(event: Event): void {
    this.list().filterBy('show', (event.target as HTMLSelectElement).value as Shown);
  }
}
