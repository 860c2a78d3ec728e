import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { PlainPage } from '../../core/pages/plain-page';

@Component({
  selector: 'tw-forgot-password',
  imports: [
    FieldError,
    FormNotes,
    MatButton,
    MatError,
    MatFormField,
    MatInput,
    MatLabel,
    PlainPage,
    ReactiveFormsModule,
    RouterLink,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-plain-page heading="Forgotten password">
      @if (sentTo(); as address) {
        <p role="status">
          If {{ address }} is known here, a link to choose a new password is on its way to it. The
          link works for a short time.
        </p>
      } @else {
        <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="asking.submit()">
          <tw-form-notes [notes]="asking.notes()" />
          <mat-form-field>
            <mat-label>E-mail address</mat-label>
            <input matInput type="email" formControlName="email" autocomplete="username" />
            <mat-error><tw-field-error [control]="form.controls.email" /></mat-error>
          </mat-form-field>
          <div class="actions">
            <button matButton="filled" type="submit" [disabled]="asking.busy()" disabledInteractive>
              Mail me a link
            </button>
            <a routerLink="/sign-in">Sign in</a>
          </div>
        </form>
      }
    </tw-plain-page>
  `,
})
export class ForgotPassword {
  readonly #api = inject(Api);

  protected readonly sentTo = signal<string | undefined>(undefined);
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', rulesFor('account.requestReset', 'email')],
  });
  protected readonly asking = submission(
    this.form,
    () => this.#api.call('account.requestReset', { body: this.form.getRawValue() }),
    { done: () => this.sentTo.set(this.form.getRawValue().email) },
  );
}
