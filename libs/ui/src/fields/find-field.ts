import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatAutocomplete, MatAutocompleteTrigger, MatOption } from '@angular/material/autocomplete';
import { MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { debounceTime, distinctUntilChanged, type Observable } from 'rxjs';

const pause = 250;

/** Finds one of many things while a few letters of it are typed, and gives out the picked one. */
@Component({
  selector: 'tw-find-field',
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
        @for (item of items(); track item.id) {
          <mat-option [value]="item">{{ words()(item) }}</mat-option>
        }
      </mat-autocomplete>
      @if (hint(); as text) {
        <mat-hint>{{ nothing() ? none() : text }}</mat-hint>
      }
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
export class FindField<T extends { readonly id: string }> {
  readonly label = input.required<string>();
  readonly find = input.required<(typed: string) => Observable<readonly T[]>>();
  /** How a found thing is called in the list. */
  readonly words = input.required<(item: T) => string>();
  readonly hint = input('');
  /** In the place of the hint, where nothing was found. */
  readonly none = input('');
  readonly picked = output<T>();

  protected readonly typed = signal('');
  readonly #sought = toSignal(
    toObservable(this.typed).pipe(debounceTime(pause), distinctUntilChanged()),
    { initialValue: '' },
  );
  readonly #found = rxResource({
    params: () => this.#sought() || undefined,
    stream: ({ params }) => this.find()(params),
  });
  protected readonly items = () => (this.#found.hasValue() ? this.#found.value() : []);
  protected readonly nothing = () => this.#found.hasValue() && this.items().length === 0;

  protected pick(item: T, field: HTMLInputElement): void {
    field.value = '';
    this.typed.set('');
    this.picked.emit(item);
  }
}
