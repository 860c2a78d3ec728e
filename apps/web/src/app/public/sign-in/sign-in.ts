import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { defer } from 'rxjs';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { safeNext } from '../../core/navigation/areas';
import { PlainPage } from '../../core/pages/plain-page';
import { Session } from '../../core/session/session';

@Component({
  selector: 'tw-sign-in',
  imports: [
    FieldError,
    FormNotes,
    MatButton,
    MatError,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    PasswordField,
    PlainPage,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './sign-in.html',
  styles: `
    .below {
      margin-block: 1.5rem 0;
    }
    .other {
      justify-self: start;
      max-inline-size: 100%;
      block-size: auto;
      min-block-size: 2.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignIn {
  readonly #session = inject(Session);
  readonly #router = inject(Router);
  readonly #build = inject(NonNullableFormBuilder);

  /** Where the person wanted to go before they were asked to sign in. */
  readonly next = input<string>();

  protected readonly asksCode = signal(false);
  /** The code typed is a recovery code: letters too, and no authenticator to fill it in. */
  protected readonly recovers = signal(false);
  protected readonly form = this.#build.group({
    email: ['', rulesFor('session.signIn', 'email')],
    password: ['', rulesFor('session.signIn', 'password')],
    code: ['', rulesFor('session.signIn', 'code')],
  });

  protected readonly signingIn = submission(this.form, () => defer(() => this.#signIn()), {
    done: () => void this.#goOn(),
    refused: (problem) => {
      if (problem.kind !== 'code-required') return false;
      const again = this.asksCode();
      this.asksCode.set(true);
      if (again)
        this.form.controls.code.setErrors({ server: 'This code does not fit. Try the next one.' });
      else this.#toCode();
      return true;
    },
  });

  constructor() {
    void this.#session.start().then(() => {
      if (this.#session.signedIn()) void this.#goOn();
    });
  }

  protected switchProof(): void {
    this.recovers.update((recovers) => !recovers);
    this.form.controls.code.reset();
    this.#toCode();
  }

  #toCode(): void {
    setTimeout(() => document.querySelector<HTMLElement>('#tw-sign-in-code')?.focus());
  }

  #signIn(): Promise<void> {
    const { email, password, code } = this.form.getRawValue();
    return this.#session.signIn({ email, password, ...(code ? { code } : {}) });
  }

  #goOn(): Promise<boolean> {
    return this.#router.navigateByUrl(safeNext(this.next()) ?? '/', { replaceUrl: true });
  }
}
