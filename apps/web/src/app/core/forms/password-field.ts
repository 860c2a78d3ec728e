import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { type FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatHint, MatLabel, MatSuffix } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { FieldError } from '@lib/ui/choices/field-error';

/** A password that can be looked at while it is typed (NIST SP 800-63B, 5.1.1.2). */
@Component({
  selector: 'tw-password-field',
  imports: [
    FieldError,
    MatButton,
    MatError,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    MatSuffix,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field>
      <mat-label>{{ label() }}</mat-label>
      <input
        matInput
        [type]="shown() ? 'text' : 'password'"
        [formControl]="control()"
        [autocomplete]="autocomplete()"
      />
      <button
        matButton
        matSuffix
        type="button"
        [attr.aria-pressed]="shown()"
        [attr.aria-label]="'Show: ' + label()"
        (click)="shown.set(!shown())"
      >
        {{ shown() ? 'Hide' : 'Show' }}
      </button>
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styles: `
    mat-form-field {
      inline-size: 100%;
    }
    button {
      margin-inline-end: 0.25rem;
    }
  `,
})
export class PasswordField {
  readonly label = input('Password');
  readonly control = input.required<FormControl<string>>();
  readonly autocomplete = input.required<'current-password' | 'new-password'>();
  readonly hint = input<string>();

  protected readonly shown = signal(false);
}
