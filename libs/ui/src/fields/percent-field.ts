import { booleanAttribute, ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { fieldParts } from './field-parts';
import { PercentInput } from './percent-input';

/** A rate in percent; basis points in the form. */
@Component({
  selector: 'tw-percent-field',
  imports: [fieldParts, PercentInput],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <input matInput class="num" twPercent [fine]="fine()" [formControl]="control()" />
      <span matTextSuffix>&nbsp;%</span>
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class PercentField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<number | null>>();
  readonly hint = input<string>();
  /** Takes parts of a basis point, as taxes have them: "8.875". */
  readonly fine = input(false, { transform: booleanAttribute });
}
