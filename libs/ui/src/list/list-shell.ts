import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
  output,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { EmptyNote } from '../notes/empty-note';
import { ProblemNote } from '../notes/problem-note';
import { type ListControls } from './list-state';

let shells = 0;

/**
 * What every list has around its rows: search, filters, sort, paging, export, and what to show
 * while there are none. The rows themselves are the content:
 *
 *     <tw-list-shell [list]="stores" searchLabel="Search stores" empty="Stores appear here." [csv]="true"
 *       (csvAsked)="export()">
 *       <mat-form-field filters> ... </mat-form-field>
 *       <table class="tw-table"> @for (store of stores.items(); track store.id) { ... } </table>
 *       <a emptyAction matButton="filled" routerLink="new">Add a store</a>
 *     </tw-list-shell>
 */
@Component({
  selector: 'tw-list-shell',
  imports: [EmptyNote, MatButton, MatFormField, MatInput, MatLabel, ProblemNote],
  templateUrl: './list-shell.html',
  styleUrl: './list-shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ListShell {
  readonly list = input.required<ListControls>();
  readonly searchLabel = input('Search');
  /** False for a list that cannot be searched. */
  readonly searchable = input(true, { transform: booleanAttribute });
  /** What will appear here, said when there is nothing yet. */
  readonly empty = input.required<string>();
  /** Offers the list as CSV; the page does the export when asked. */
  readonly csv = input(false, { transform: booleanAttribute });
  readonly csvAsked = output<void>();

  protected readonly sortId = `tw-list-sort-${shells++}`;
  protected readonly skeletonRows = [0, 1, 2, 3, 4, 5];

  protected readonly showsRows = computed(() => this.list().size() > 0);
  protected readonly waits = computed(() => this.list().phase() === 'loading' && !this.showsRows());
  protected readonly pages = computed(() => this.list().hasNext() || this.list().hasPrevious());

  protected valueOf(event: Event): string {
    return (event.target as HTMLInputElement | HTMLSelectElement).value;
  }
}
