import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatAutocomplete, MatAutocompleteTrigger, MatOption } from '@angular/material/autocomplete';
import { MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { debounceTime, distinctUntilChanged } from 'rxjs';
import { type StoreSummary, StoresApi } from '../stores/stores-api';

const pause = 250;

/** Finds a store by its name or number while it is typed. */
@Component({
  selector: 'tw-store-picker',
  imports: [
    MatAutocomplete,
    MatAutocompleteTrigger,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    MatOption,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <input
        #field
        matInput
        [matAutocomplete]="found"
        (input)="typed.set(field.value.trim())"
        (keydown.enter)="$event.preventDefault()"
      />
      <mat-autocomplete
        #found="matAutocomplete"
        autoActiveFirstOption
        (optionSelected)="pick($event.option.value, field)"
      >
        @for (store of stores(); track store.id) {
          <mat-option [value]="store">{{ store.name }}, {{ store.client.name }}</mat-option>
        }
      </mat-autocomplete>
      <mat-hint>{{ nothing() ? 'No store is called so.' : 'By name or number' }}</mat-hint>
    </mat-form-field>
  `,
  styles: `
    :host {
      display: block;
    }
    mat-form-field {
      inline-size: 100%;
    }
  `,
})
export class StorePicker {
  readonly #api = inject(StoresApi);
  readonly label = input('Store');
  readonly picked = output<StoreSummary>();

  protected readonly typed = signal('');
  readonly #sought = toSignal(
    toObservable(this.typed).pipe(debounceTime(pause), distinctUntilChanged()),
    { initialValue: '' },
  );
  readonly #found = rxResource({
    params: () => this.#sought() || undefined,
    stream: ({ params }) => this.#api.list({ q: params, limit: 10 }),
  });
  protected readonly stores = () => (this.#found.hasValue() ? this.#found.value().items : []);
  protected readonly nothing = () => this.#found.hasValue() && this.stores().length === 0;

  protected pick(store: StoreSummary, field: HTMLInputElement): void {
    field.value = '';
    this.typed.set('');
    this.picked.emit(store);
  }
}
