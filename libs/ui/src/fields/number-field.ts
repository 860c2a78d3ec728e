import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { fieldParts } from './field-parts';

/** A number with what it counts: minutes, days, volts. */
@Component({
  selector: 'tw-number-field',
  imports: [fieldParts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <input matInput class="num" type="number" [step]="step()" [formControl]="control()" />
      @if (unit(); as text) {
        <span matTextSuffix>&nbsp;{{ text }}</span>
      }
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class NumberField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<number | null>>();
  readonly unit = input<string>();
  readonly hint = input<string>();
  readonly step = input<number | 'any'>(1);
}
