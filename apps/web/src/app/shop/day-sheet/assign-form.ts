import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { type Choice, FormNotes, SelectField } from '@lib/ui';
import { submission, type Submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { type Visit, type VisitItem, VisitsApi } from '../visits/visits-api';

/** Gives an unplaced visit to a tech, right on the day sheet. */
@Component({
  selector: 'tw-assign-form',
  imports: [FormNotes, MatButton, ReactiveFormsModule, SelectField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-select-field
        label="Tech"
        none="Choose"
        [control]="form.controls.techMembershipId"
        [options]="crew()"
      />
      <button matButton="outlined" type="submit" [disabled]="saving.busy()" disabledInteractive>
        Assign<span class="tw-unseen"> {{ visit().store.name }}</span>
      </button>
    </form>
  `,
  styles: `
    form {
      display: flex;
      flex-wrap: wrap;
      align-items: start;
      gap: 0.5rem;
    }
    tw-form-notes {
      flex-basis: 100%;
    }
    tw-select-field {
      flex: 1 1 8rem;
    }
    button {
      margin-block-start: 0.5rem;
    }
  `,
})
export class AssignForm {
  readonly #api = inject(VisitsApi);
  readonly #messages = inject(Messages);
  readonly visit = input.required<VisitItem>();
  readonly crew = input.required<readonly Choice[]>();
  readonly assigned = output<void>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    techMembershipId: ['', Validators.required],
  });
  protected readonly saving: Submission<Visit> = submission(
    this.form,
    () => this.#api.change(this.visit(), this.form.getRawValue()),
    {
      done: (visit) => {
        this.#messages.say(`${visit.tech?.name ?? 'Nobody'} goes to ${visit.store.name}.`);
        this.assigned.emit();
      },
    },
  );
}
