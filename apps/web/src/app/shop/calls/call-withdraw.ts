import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { FormNotes, WordsField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type Call, CallsApi } from './calls-api';

/** Takes a call back: it runs again, or it was a mistake. */
@Component({
  selector: 'tw-call-withdraw',
  imports: [FormNotes, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-words-field label="Why it is taken back" [control]="form.controls.words" [rows]="2" />
      <div class="actions">
        <button
          class="tw-destructive"
          matButton="filled"
          type="submit"
          [disabled]="saving.busy()"
          disabledInteractive
        >
          Withdraw the call
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Keep it</button>
      </div>
    </form>
  `,
})
export class CallWithdraw {
  readonly #api = inject(CallsApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly call = input.required<Call>();
  readonly saved = output<Call>();
  readonly stale = output<void>();
  readonly closed = output<void>();

  protected readonly form = this.#build.group({
    words: ['', rulesFor('calls.withdraw', 'words')],
  });
  protected readonly saving: Submission<Call> = submission(
    this.form,
    () => this.#api.withdraw(this.call(), this.form.getRawValue().words),
    {
      done: (call) => this.saved.emit(call),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
