import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { type Choice } from '../choices/choice-chips';
import { fieldParts } from './field-parts';

/** One of many; for one of few, `tw-choices` shows them all at once. */
@Component({
  selector: 'tw-select-field',
  imports: [fieldParts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <select matNativeControl [formControl]="control()">
        @if (none(); as text) {
          <option value="">{{ text }}</option>
        }
        @for (option of options(); track option.value) {
          <option [value]="option.value">{{ option.label }}</option>
        }
      </select>
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class SelectField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly options = input.required<readonly Choice[]>();
  /** What '' is called, where nothing need be chosen. */
  readonly none = input<string>();
  readonly hint = input<string>();
}
