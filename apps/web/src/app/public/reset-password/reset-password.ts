import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { mailedToken } from '../../core/navigation/mailed-token';
import { PlainPage } from '../../core/pages/plain-page';

@Component({
  selector: 'tw-reset-password',
  imports: [FormNotes, MatButton, PasswordField, PlainPage, ReactiveFormsModule, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (spent()) {
      <tw-plain-page heading="This link no longer works">
        <p>It may have been used before, or it has run out.</p>
        <p><a routerLink="/forgot-password">Ask for a fresh link</a></p>
      </tw-plain-page>
    } @else {
      <tw-plain-page heading="Choose a new password">
        <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="choosing.submit()">
          <tw-form-notes [notes]="choosing.notes()" />
          <tw-password-field
            label="New password"
            hint="At least 8 characters; a few words are fine."
            [control]="form.controls.password"
            autocomplete="new-password"
          />
          <div class="actions">
            <button
              matButton="filled"
              type="submit"
              [disabled]="choosing.busy()"
              disabledInteractive
            >
              Use this password
            </button>
          </div>
        </form>
      </tw-plain-page>
    }
  `,
})
export class ResetPassword {
  readonly #api = inject(Api);
  readonly #router = inject(Router);
  readonly #messages = inject(Messages);
  readonly #token = mailedToken();

  protected readonly spent = signal(this.#token === '');
  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', rulesFor('account.reset', 'password')],
  });
  protected readonly choosing = submission(
    this.form,
    () =>
      this.#api.call('account.reset', {
        body: { token: this.#token, ...this.form.getRawValue() },
      }),
    {
      done: () => {
        this.#messages.say('Your password is changed, and you are signed out everywhere else.');
        void this.#router.navigateByUrl('/sign-in');
      },
      refused: (problem) => {
        const cutShort = problem.errors.some(({ pointer }) => pointer === '/token');
        this.spent.set(problem.kind === 'not-found' || cutShort);
        return this.spent();
      },
    },
  );
}
