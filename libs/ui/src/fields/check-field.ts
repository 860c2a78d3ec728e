import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatCheckbox } from '@angular/material/checkbox';
import { FieldError } from '../choices/field-error';

/** Yes or no, with what yes means. */
@Component({
  selector: 'tw-check-field',
  imports: [FieldError, MatCheckbox, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-checkbox [formControl]="control()">{{ label() }}</mat-checkbox>
    @if (hint(); as text) {
      <p class="hint">{{ text }}</p>
    }
    @if (control().invalid && control().touched) {
      <p class="error"><tw-field-error [control]="control()" /></p>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    p {
      margin: 0 0 0.25rem 2.75rem;
      font-size: 0.875rem;
    }
    .hint {
      color: var(--tw-soft);
    }
    .error {
      color: var(--tw-alarm);
    }
  `,
})
export class CheckField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<boolean>>();
  readonly hint = input<string>();
}
