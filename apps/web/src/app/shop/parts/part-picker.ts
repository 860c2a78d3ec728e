import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatAutocomplete, MatAutocompleteTrigger, MatOption } from '@angular/material/autocomplete';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { debounceTime, distinctUntilChanged } from 'rxjs';
import { type Part, PartsApi } from './parts-api';

const pause = 250;

/** Finds a part by number or name while it is typed. */
@Component({
  selector: 'tw-part-picker',
  imports: [MatAutocomplete, MatAutocompleteTrigger, MatFormField, MatInput, MatLabel, MatOption],
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
        @for (part of parts(); track part.id) {
          <mat-option [value]="part">{{ part.number }}, {{ part.name }}</mat-option>
        }
      </mat-autocomplete>
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
export class PartPicker {
  readonly #api = inject(PartsApi);

  readonly label = input('Find a part');
  /** A part that cannot be chosen, because it is the one in question. */
  readonly except = input<string>();
  readonly picked = output<Part>();

  protected readonly typed = signal('');
  readonly #sought = toSignal(
    toObservable(this.typed).pipe(debounceTime(pause), distinctUntilChanged()),
    { initialValue: '' },
  );
  readonly #found = rxResource({
    params: () => this.#sought() || undefined,
    stream: ({ params }) => this.#api.list({ q: params, limit: 10 }),
  });
  protected readonly parts = () => {
    const found = this.#found.hasValue() ? this.#found.value().items : [];
    return found.filter(({ id }) => id !== this.except());
  };

  protected pick(part: Part, field: HTMLInputElement): void {
    field.value = '';
    this.typed.set('');
    this.picked.emit(part);
  }
}
