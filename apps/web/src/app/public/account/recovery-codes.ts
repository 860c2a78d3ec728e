import {
  ChangeDetectionStrategy,
  Component,
  effect,
  type ElementRef,
  inject,
  input,
  model,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Callout } from '@lib/ui/notes/callout';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { counted } from '@lib/ui/words/words';
import { Api } from '../../core/api/api';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';

/** What lets a person in who lost the authenticator: shown once, counted ever after. */
@Component({
  selector: 'tw-recovery-codes',
  imports: [Callout, FormNotes, MatButton, PasswordField, ReactiveFormsModule],
  templateUrl: './recovery-codes.html',
  styleUrl: './recovery-codes.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecoveryCodes {
  readonly #api = inject(Api);

  readonly email = input.required<string>();
  readonly left = input.required<number>();
  /** Codes just made. They can be shown now and never again. */
  readonly fresh = model<readonly string[]>();
  readonly changed = output<void>();

  protected readonly counted = counted;
  protected readonly renewing = signal(false);
  protected readonly copied = signal('');
  protected readonly heading = viewChild<ElementRef<HTMLElement>>('heading');

  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', rulesFor('account.renewRecoveryCodes', 'password')],
  });
  protected readonly making = submission(
    this.form,
    () => this.#api.call('account.renewRecoveryCodes', { body: this.form.getRawValue() }),
    {
      done: ({ recoveryCodes }) => {
        this.leave();
        this.fresh.set(recoveryCodes);
        this.changed.emit();
      },
      refused: (problem) => {
        if (problem.kind !== 'sign-in-refused') return false;
        this.form.controls.password.setErrors({ server: 'This is not your password.' });
        return true;
      },
    },
  );

  constructor() {
    // The button that was pressed is gone: who cannot see the codes appear is led to them.
    effect(() => {
      this.copied.set('');
      if (this.fresh()) this.heading()?.nativeElement.focus();
    });
  }

  protected async copy(codes: readonly string[]): Promise<void> {
    try {
      await navigator.clipboard.writeText(codes.join('\n'));
      this.copied.set(
        `${codes.length} codes are copied. Paste them where you keep your passwords.`,
      );
    } catch {
      this.copied.set('The browser does not let us copy. Mark the codes and copy them yourself.');
    }
  }

  protected print(): void {
    window.print();
  }

  protected leave(): void {
    this.renewing.set(false);
    this.form.reset();
  }
}
