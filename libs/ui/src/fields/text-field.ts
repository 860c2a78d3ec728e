import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { fieldParts } from './field-parts';

/** One line of text with its label, hint and error: `<tw-text-field label="Name" [control]="..." />`. */
@Component({
  selector: 'tw-text-field',
  imports: [fieldParts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <input
        matInput
        [type]="type()"
        [formControl]="control()"
        [autocomplete]="autocomplete()"
        [attr.list]="suggestionsId()"
      />
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
    @if (suggestionsId(); as id) {
      <datalist [id]="id">
        @for (suggestion of suggestions(); track suggestion) {
          <option [value]="suggestion"></option>
        }
      </datalist>
    }
  `,
  styleUrl: './field.scss',
})
export class TextField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly type = input<'text' | 'email' | 'tel' | 'date' | 'time'>('text');
  readonly autocomplete = input('off');
  readonly hint = input<string>();
  /** What was written here before, offered while typing; anything else can be written too. */
  readonly suggestions = input<readonly string[]>();

  readonly #number = fields++;
  protected suggestionsId(): string | null {
    return this.suggestions() ? `tw-suggestions-${this.#number}` : null;
  }
}

let fields = 0;
