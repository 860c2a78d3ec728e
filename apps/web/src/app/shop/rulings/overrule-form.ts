import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { type Bearer } from '@lib/contracts/web';
import { ChoiceChips, FormNotes, WordsField } from '@lib/ui';
import { isProblem } from '../../core/api/problem';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { type RulingGroup } from './ruling-groups';
import { type Rulings, RulingsApi } from './rulings-api';

/** The owner decides otherwise than the rules propose, and says why for whoever asks later. */
@Component({
  selector: 'tw-overrule-form',
  imports: [ChoiceChips, FormNotes, MatButton, ReactiveFormsModule, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-choices legend="Who bears it instead" formControlName="bearer" [choices]="bearers()" />
      @if (form.controls.bearer.touched && form.controls.bearer.invalid) {
        <p class="problem" role="alert">Choose who bears it.</p>
      }
      <tw-words-field
        label="Why"
        hint="Stands on the ticket for the shop, beside the rules’ own reasons."
        [rows]="2"
        [control]="form.controls.why"
      />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          Decide so
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
  styles: `
    .problem {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class OverruleForm {
  readonly #api = inject(RulingsApi);
  readonly visitId = input.required<string>();
  readonly group = input.required<RulingGroup>();
  readonly decided = output<Rulings>();
  /** The work was changed meanwhile: what was looked at must be looked at again. */
  readonly outdated = output<void>();
  readonly closed = output<void>();

  protected readonly bearers = computed(() =>
    this.group()
      .outcomes.map(({ bearer }) => bearer)
      .filter((bearer) => bearer !== this.group().bearer || this.group().waiting)
      .map((bearer) => ({ value: bearer, label: bearer })),
  );
  protected readonly form = inject(NonNullableFormBuilder).group({
    bearer: [null as Bearer | null, Validators.required],
    why: ['', rulesFor('rulings.overrule', 'why')],
  });
  protected readonly saving: Submission<Rulings> = submission(
    this.form,
    (key) => {
      const { bearer, why } = this.form.getRawValue();
      const lines = this.group().lines.map(({ lineKey, basis }) => ({ lineKey, basis }));
      return this.#api.overrule(this.visitId(), { lines, bearer: bearer as Bearer, why }, key);
    },
    {
      done: (rulings) => this.decided.emit(rulings),
      refused: (problem) => {
        if (isProblem(problem, 'conflict')) this.outdated.emit();
        return false;
      },
    },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
