import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { PlainPage } from '../../core/pages/plain-page';
import { currencies, guessesFrom, zonesWith } from './guesses';

const passwordHint = 'At least 8 characters; a few words are fine.';

@Component({
  selector: 'tw-sign-up',
  imports: [
    FieldError,
    FormNotes,
    MatButton,
    MatError,
    MatFormField,
    MatInput,
    MatLabel,
    PasswordField,
    PlainPage,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './sign-up.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignUp {
  readonly #api = inject(Api);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #guessed = guessesFrom(
    navigator.language,
    Intl.DateTimeFormat().resolvedOptions().timeZone,
  );

  protected readonly passwordHint = passwordHint;
  protected readonly zones = zonesWith(this.#guessed.zone);
  protected readonly currencies = currencies(navigator.language);
  protected readonly sentTo = signal<string | undefined>(undefined);

  protected readonly form = this.#build.group({
    shopName: ['', rulesFor('shops.signUp', 'shopName')],
    name: ['', rulesFor('shops.signUp', 'name')],
    email: ['', rulesFor('shops.signUp', 'email')],
    password: ['', rulesFor('shops.signUp', 'password')],
    zone: [this.#guessed.zone, rulesFor('shops.signUp', 'zone')],
    currency: [this.#guessed.currency, rulesFor('shops.signUp', 'currency')],
  });

  protected readonly signingUp = submission(
    this.form,
    () =>
      this.#api.call('shops.signUp', {
        body: { ...this.form.getRawValue(), locale: this.#guessed.locale },
      }),
    { done: () => this.sentTo.set(this.form.getRawValue().email) },
  );
}
