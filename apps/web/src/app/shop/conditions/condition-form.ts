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
import {
  type Choice,
  ChoiceChips,
  FormNotes,
  NumberField,
  SelectField,
  TextField,
  WordsField,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { type Condition, ConditionsApi } from './conditions-api';

const kinds: readonly Choice<Condition['kind']>[] = [
  { value: 'access', label: 'Access' },
  { value: 'supply', label: 'Supply' },
  { value: 'hazard', label: 'Hazard' },
];

/** Notes a condition of a store or a machine, or changes one. */
@Component({
  selector: 'tw-condition-form',
  imports: [
    ChoiceChips,
    FormNotes,
    MatButton,
    NumberField,
    ReactiveFormsModule,
    SelectField,
    TextField,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-choices legend="What kind" [choices]="kinds" formControlName="kind" />
      <tw-words-field
        label="What it is"
        [control]="form.controls.words"
        [rows]="2"
        hint="A plinth, a shelf built across, a makeshift lead, a shared drain"
      />
      @if (!condition() && machines().length > 0) {
        <tw-select-field
          label="Of"
          none="The store as a whole"
          [options]="machines()"
          [control]="form.controls.machineId"
        />
      }
      <div class="beside">
        <tw-number-field
          label="Extra minutes"
          unit="min"
          [control]="form.controls.extraMinutes"
          hint="What it adds to work there"
        />
        <tw-text-field label="To bring" [control]="form.controls.tool" />
      </div>
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          {{ condition() ? 'Save the condition' : 'Note the condition' }}
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class ConditionForm implements OnInit {
  readonly #api = inject(ConditionsApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly condition = input<Condition>();
  readonly storeId = input.required<string>();
  /** The machine it is of, where that is known. */
  readonly machineId = input<string>();
  /** Machines to choose from, where it is not. */
  readonly machines = input<readonly Choice[]>([]);
  readonly saved = output<Condition>();
  readonly closed = output<void>();

  protected readonly kinds = kinds;
  protected readonly form = this.#build.group({
    kind: ['access' as Condition['kind'], rulesFor('conditions.create', 'kind')],
    words: ['', rulesFor('conditions.create', 'words')],
    machineId: [''],
    extraMinutes: [0 as number | null, rulesFor('conditions.create', 'extraMinutes')],
    tool: ['', rulesFor('conditions.create', 'tool')],
  });

  protected readonly saving = submission(this.form, (key) => this.#send(key), {
    done: (condition) => this.saved.emit(condition),
  });

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  ngOnInit(): void {
    const condition = this.condition();
    if (condition) this.form.reset({ ...condition, machineId: condition.machine?.id ?? '' });
    else this.form.controls.machineId.setValue(this.machineId() ?? '');
  }

  #send(key: string) {
    const { machineId, extraMinutes, ...rest } = this.form.getRawValue();
    const body = { ...rest, extraMinutes: extraMinutes ?? 0 };
    const condition = this.condition();
    if (condition) return this.#api.change(condition, body);
    return this.#api.create(
      { ...body, storeId: this.storeId(), machineId: machineId || null },
      key,
    );
  }
}
