import { ChangeDetectionStrategy, Component, effect, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { type AnswerOf } from '@lib/contracts/web';
import { FieldError } from '@lib/ui/choices/field-error';
import { FormNotes } from '@lib/ui/notes/form-notes';
import { Api } from '../../core/api/api';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';

@Component({
  selector: 'tw-name-form',
  imports: [
    FieldError,
    FormNotes,
    MatButton,
    MatError,
    MatFormField,
    MatInput,
    MatLabel,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>Name</h2>
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <mat-form-field>
        <mat-label>Your name</mat-label>
        <input matInput formControlName="name" autocomplete="name" />
        <mat-error><tw-field-error [control]="form.controls.name" /></mat-error>
      </mat-form-field>
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          Save the name
        </button>
      </div>
    </form>
  `,
})
export class NameForm {
  readonly #api = inject(Api);
  readonly #session = inject(Session);
  readonly #messages = inject(Messages);

  readonly account = input.required<AnswerOf<'account.show'>>();
  readonly changed = output<void>();

  readonly form = inject(NonNullableFormBuilder).group({
    name: ['', rulesFor('account.change', 'name')],
  });
  protected readonly saving = submission(
    this.form,
    () =>
      this.#api.call('account.change', {
        body: this.form.getRawValue(),
        ifMatch: this.account().version,
      }),
    {
      done: ({ name }) => {
        this.#session.rename(name);
        this.#messages.say(`You are called ${name} from now on.`);
        this.changed.emit();
      },
    },
  );

  constructor() {
    effect(() => {
      if (!this.form.dirty) this.form.setValue({ name: this.account().name });
    });
  }
}
