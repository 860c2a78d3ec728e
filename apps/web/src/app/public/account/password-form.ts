import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';

@Component({
  selector: 'tw-password-form',
  imports: [FormNotes, MatButton, PasswordField, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>Password</h2>
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="changing.submit()">
      <tw-form-notes [notes]="changing.notes()" />
      <!-- Tells password managers whose password it is. -->
      <input
        class="tw-unseen"
        type="text"
        autocomplete="username"
        tabindex="-1"
        aria-hidden="true"
        readonly
        [value]="email()"
      />
      <tw-password-field
        label="Present password"
        [control]="form.controls.current"
        autocomplete="current-password"
      />
      <tw-password-field
        label="New password"
        hint="At least 8 characters; a few words are fine."
        [control]="form.controls.password"
        autocomplete="new-password"
      />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="changing.busy()" disabledInteractive>
          Change the password
        </button>
      </div>
    </form>
  `,
})
export class PasswordForm {
  readonly #api = inject(Api);
  readonly #messages = inject(Messages);

  readonly email = input.required<string>();

  readonly form = inject(NonNullableFormBuilder).group({
    current: ['', rulesFor('account.changePassword', 'current')],
    password: ['', rulesFor('account.changePassword', 'password')],
  });
  protected readonly changing = submission(
    this.form,
    () => this.#api.call('account.changePassword', { body: this.form.getRawValue() }),
    {
      done: () => {
        this.form.reset();
        this.#messages.say('Your password is changed. Your other devices are signed out.');
      },
      refused: (problem) => {
        if (problem.kind !== 'sign-in-refused') return false;
        this.form.controls.current.setErrors({ server: 'This is not your present password.' });
        return true;
      },
    },
  );
}
