import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { type AnswerOf } from '@lib/contracts/web';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { ProblemNote } from '@lib/ui/notes/problem-note';
import { wordFor } from '@lib/ui/words/words';
import { Api } from '../../core/api/api';
import { isProblem, type Problem } from '../../core/api/problem';
import { PasswordField } from '../../core/forms/password-field';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { PlainPage } from '../../core/pages/plain-page';
import { Session } from '../../core/session/session';

@Component({
  selector: 'tw-invitation',
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
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './invitation.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Invitation {
  readonly #api = inject(Api);
  readonly #router = inject(Router);
  readonly #messages = inject(Messages);
  readonly #build = inject(NonNullableFormBuilder);
  protected readonly session = inject(Session);

  readonly token = input.required<string>();

  protected readonly invitation = signal<AnswerOf<'invitations.look'> | undefined>(undefined);
  protected readonly problem = signal<Problem | undefined>(undefined);
  protected readonly spent = computed(
    () => isProblem(this.problem(), 'not-found') || isProblem(this.problem(), 'invalid-request'),
  );
  protected readonly heading = computed(() => {
    const found = this.invitation();
    return found ? `Join ${found.clientName ?? found.shopName}` : 'Invitation';
  });
  protected readonly role = computed(() => wordFor(this.invitation()?.role ?? ''));
  /** A known person signs in first, so that the link alone does not open their account. */
  protected readonly mustSignIn = computed(
    () =>
      this.invitation()?.known === true &&
      this.session.person()?.email !== this.invitation()?.email,
  );

  /** The contract leaves both out for a known person; whoever is new must give them. */
  protected readonly form = this.#build.group({
    name: ['', [Validators.required, ...rulesFor('invitations.accept', 'name')]],
    password: ['', [Validators.required, ...rulesFor('invitations.accept', 'password')]],
  });
  protected readonly accepting = submission(
    this.form,
    () => {
      const { name, password } = this.form.getRawValue();
      const body = this.invitation()?.known ? {} : { name, password };
      return this.#api.call('invitations.accept', { params: { token: this.token() }, body });
    },
    {
      done: (answer) => {
        this.session.take(answer);
        const joined = this.invitation();
        this.#messages.say(`You have joined ${joined?.clientName ?? joined?.shopName}.`);
        void this.#router.navigateByUrl('/');
      },
    },
  );

  constructor() {
    void this.session.start();
    effect(() => this.look());
  }

  protected look(): void {
    this.problem.set(undefined);
    this.#api.call('invitations.look', { params: { token: this.token() } }).subscribe({
      next: (found) => {
        this.invitation.set(found);
        if (found.known) this.form.disable();
        else this.form.controls.name.setValue(found.name);
      },
      error: (problem: Problem) => this.problem.set(problem),
    });
  }
}
