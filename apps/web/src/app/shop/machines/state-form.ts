import {
  ChangeDetectionStrategy,
  Component,
  inject,
  input,
  type OnInit,
  output,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { ChoiceChips, choicesOf, FormNotes, WordsField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type Machine, MachinesApi, type SettableState } from './machines-api';

const states: readonly SettableState[] = ['up', 'degraded', 'down', 'locked_out'];

/** Sets a machine's state outside a visit: somebody rang that it runs again, or that it stands. */
@Component({
  selector: 'tw-state-form',
  imports: [ChoiceChips, FormNotes, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-choices legend="It is" [choices]="choices" formControlName="state" />
      <tw-words-field label="Why" [control]="form.controls.words" [rows]="2" />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          Set the state
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class StateForm implements OnInit {
  readonly #api = inject(MachinesApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly machine = input.required<Machine>();
  readonly saved = output<Machine>();
  /** Somebody else changed the machine meanwhile: it should be loaded anew. */
  readonly stale = output<void>();
  readonly closed = output<void>();

  protected readonly choices = choicesOf(states);
  protected readonly form = this.#build.group({
    state: ['up' as SettableState],
    words: ['', rulesFor('machines.setState', 'words')],
  });
  protected readonly saving: Submission<Machine> = submission(
    this.form,
    () => this.#api.setState(this.machine(), this.form.getRawValue()),
    {
      done: (machine) => this.saved.emit(machine),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  ngOnInit(): void {
    const { state } = this.machine();
    if (state !== 'retired') this.form.controls.state.setValue(state);
  }
}
