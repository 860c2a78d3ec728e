import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { dayIn, FormNotes, Reading, TextField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type Contract, ContractsApi } from './contracts-api';

/** Ends a contract on a day, with what that means. */
@Component({
  selector: 'tw-end-contract',
  imports: [FormNotes, MatButton, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <h2>End {{ contract().name }}</h2>
      <tw-form-notes [notes]="saving.notes()" />
      <p>
        After that day no round comes and no fee is charged; planned rounds after it are cancelled.
        The fee of a month begun is charged for its days.
      </p>
      <tw-text-field label="Its last day" type="date" [control]="form.controls.endsOn" />
      <div class="actions">
        <button
          matButton="filled"
          class="tw-destructive"
          type="submit"
          [disabled]="saving.busy()"
          disabledInteractive
        >
          End the contract
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Keep it</button>
      </div>
    </form>
  `,
  styles: `
    h2,
    p {
      margin: 0;
    }
  `,
})
export class EndContract {
  readonly #api = inject(ContractsApi);

  readonly contract = input.required<Contract>();
  readonly settled = output<Contract>();
  readonly closed = output<void>();
  /** Somebody else changed it meanwhile: it should be loaded anew. */
  readonly stale = output<void>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    endsOn: [dayIn(inject(Reading).zone(), new Date()), Validators.required],
  });
  protected readonly saving: Submission<Contract> = submission(
    this.form,
    () => this.#api.end(this.contract(), this.form.getRawValue().endsOn),
    {
      done: (contract) => this.settled.emit(contract),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
