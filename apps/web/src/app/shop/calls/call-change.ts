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
import { type Symptom } from '@lib/contracts/web';
import { ChoiceChips, FormNotes, WordsField } from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type Call, CallsApi } from './calls-api';
import { MachineChoice } from './machine-choice';
import { symptomChoices } from './symptoms';

/** Puts right what was written down of a call. */
@Component({
  selector: 'tw-call-change',
  imports: [ChoiceChips, FormNotes, MachineChoice, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-machine-choice
        [storeId]="call().store.id"
        [machineId]="form.controls.machineId.value"
        (machineIdChange)="choose($event)"
      />
      <tw-choices legend="What it does" [choices]="symptoms" formControlName="symptom" />
      <tw-words-field label="In the caller’s words" [control]="form.controls.words" />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          Save
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class CallChange implements OnInit {
  readonly #api = inject(CallsApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly call = input.required<Call>();
  readonly saved = output<Call>();
  /** Somebody else changed the call meanwhile: it should be loaded anew. */
  readonly stale = output<void>();
  readonly closed = output<void>();

  protected readonly symptoms = symptomChoices;
  protected readonly form = this.#build.group({
    machineId: [null as string | null],
    symptom: ['other' as Symptom],
    words: ['', rulesFor('calls.change', 'words')],
  });
  protected readonly saving: Submission<Call> = submission(
    this.form,
    () => this.#api.change(this.call(), changedValues(this.form)),
    {
      done: (call) => this.saved.emit(call),
      refused: (problem) =>
        toldStale(problem, { reload: () => this.stale.emit() }, this.saving.notes),
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  ngOnInit(): void {
    const { machine, symptom, words } = this.call();
    this.form.reset({ machineId: machine?.id ?? null, symptom, words });
  }

  protected choose(machineId: string | null): void {
    this.form.controls.machineId.setValue(machineId);
    this.form.controls.machineId.markAsDirty();
  }
}
