import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { type AnswerOf } from '@lib/contracts/web';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { type Problem } from '../../core/api/problem';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { RecoveryCodes } from './recovery-codes';

/** A second proof at sign-in: codes from an authenticator (RFC 6238). */
@Component({
  selector: 'tw-one-time-codes',
  imports: [
    FieldError,
    FormNotes,
    MatButton,
    MatError,
    MatFormField,
    MatHint,
    MatInput,
    MatLabel,
    ReactiveFormsModule,
    RecoveryCodes,
  ],
  templateUrl: './one-time-codes.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
  styles: `
    img {
      display: block;
      inline-size: 12rem;
      block-size: 12rem;
      margin-block-end: 0.5rem;
      background: #fff;
    }
    code {
      overflow-wrap: anywhere;
    }
  `,
})
export class OneTimeCodes {
  readonly #api = inject(Api);
  readonly #messages = inject(Messages);

  readonly account =
    input.required<
      Pick<AnswerOf<'account.show'>, 'email' | 'oneTimeCodes' | 'recoveryCodesLeft'>
    >();
  readonly changed = output<void>();

  /** Recovery codes that came with putting one-time codes in force, until they are kept. */
  readonly fresh = signal<readonly string[] | undefined>(undefined);

  protected readonly begun = signal<AnswerOf<'account.startTotp'> | undefined>(undefined);
  protected readonly removing = signal(false);
  protected readonly notes = signal<readonly string[]>([]);
  protected readonly picture = computed(
    () => `data:image/svg+xml,${encodeURIComponent(this.begun()?.qrSvg ?? '')}`,
  );

  readonly #build = inject(NonNullableFormBuilder);
  protected readonly form = this.#build.group({
    code: ['', [Validators.required, ...rulesFor('account.confirmTotp', 'code')]],
  });
  protected readonly stopForm = this.#build.group({
    code: ['', [Validators.required, ...rulesFor('account.removeTotp', 'code')]],
  });

  protected readonly confirming = submission(
    this.form,
    () => this.#api.call('account.confirmTotp', { body: this.form.getRawValue() }),
    {
      done: ({ recoveryCodes }) => {
        this.fresh.set(recoveryCodes);
        this.#settle();
      },
      refused: (problem) => this.#refused(problem, this.form),
    },
  );

  protected readonly stopping = submission(
    this.stopForm,
    () => this.#api.call('account.removeTotp', { body: this.stopForm.getRawValue() }),
    {
      done: () => {
        this.fresh.set(undefined);
        this.#settle('Signing in no longer asks for a one-time code.');
      },
      refused: (problem) => this.#refused(problem, this.stopForm),
    },
  );

  protected begin(): void {
    this.notes.set([]);
    this.#api.call('account.startTotp').subscribe({
      next: (begun) => this.begun.set(begun),
      error: (problem: Problem) => this.notes.set([problem.message]),
    });
  }

  protected leave(): void {
    this.begun.set(undefined);
    this.removing.set(false);
    this.form.reset();
    this.stopForm.reset();
  }

  /** Without words when the page shows what is done: a message would lie over the codes. */
  #settle(said?: string): void {
    this.leave();
    if (said) this.#messages.say(said);
    this.changed.emit();
  }

  #refused(problem: Problem, form: typeof this.form): boolean {
    if (problem.kind !== 'sign-in-refused') return false;
    form.controls.code.setErrors({ server: 'This code does not fit. Try the next one.' });
    return true;
  }
}
