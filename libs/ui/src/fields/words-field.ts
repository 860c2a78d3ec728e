import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { fieldParts } from './field-parts';

/** Several lines of text. */
@Component({
  selector: 'tw-words-field',
  imports: [fieldParts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <textarea matInput [rows]="rows()" [formControl]="control()"></textarea>
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class WordsField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly hint = input<string>();
  readonly rows = input(3);
}
