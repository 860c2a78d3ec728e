import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { counted, FormNotes, WordsField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type Visit, VisitsApi } from './visits-api';

/** Calls a visit off, with the consequence in figures. */
@Component({
  selector: 'tw-visit-cancel',
  imports: [FormNotes, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <p>
        Nobody goes to {{ visit().store.name }}.
        @if (visit().callList.length) {
          {{ counted(visit().callList.length, 'call') }}
          {{ visit().callList.length === 1 ? 'becomes' : 'become' }} open again.
        }
      </p>
      <tw-words-field label="Why" [control]="form.controls.words" [rows]="2" />
      <div class="actions">
        <button
          class="tw-destructive"
          matButton="filled"
          type="submit"
          [disabled]="saving.busy()"
          disabledInteractive
        >
          Cancel the visit
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Keep it</button>
      </div>
    </form>
  `,
})
export class VisitCancel {
  readonly #api = inject(VisitsApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly visit = input.required<Visit>();
  readonly saved = output<Visit>();
  /** Somebody else changed the visit meanwhile: it should be loaded anew. */
  readonly stale = output<void>();
  readonly closed = output<void>();
  protected readonly counted = counted;

  protected readonly form = this.#build.group({
    words: ['', rulesFor('visits.cancel', 'words')],
  });
  protected readonly saving: Submission<Visit> = submission(
    this.form,
    () => this.#api.cancel(this.visit(), this.form.getRawValue().words),
    {
      done: (visit) => this.saved.emit(visit),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
