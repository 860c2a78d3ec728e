import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  Callout,
  type Choice,
  FormNotes,
  LoadNote,
  moneyText,
  Reading,
  SelectField,
  WordsField,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { PlatformApi, type Shop } from '../platform-api';
import { planConsequence } from './shop-words';

/** Puts the shop on another plan, with what that means for what it has. */
@Component({
  selector: 'tw-shop-plan-form',
  imports: [Callout, FormNotes, LoadNote, MatButton, ReactiveFormsModule, SelectField, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (plans.hasValue()) {
      <form class="tw-form tw-sheet" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
        <h2>Put {{ shop().name }} on another plan</h2>
        <tw-form-notes [notes]="saving.notes()" />
        <tw-select-field
          label="Plan"
          none="Choose one"
          [control]="form.controls.planId"
          [options]="choices()"
        />
        @if (consequence(); as words) {
          <tw-callout>{{ words }}</tw-callout>
        }
        <tw-words-field
          label="Why"
          [rows]="2"
          [control]="form.controls.note"
          hint="Stands in the history, which the shop reads too."
        />
        <div class="actions">
          <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
            Change the plan
          </button>
          <button matButton="outlined" type="button" (click)="given.emit()">
            Leave it as it is
          </button>
        </div>
      </form>
    } @else {
      <tw-load-note [of]="plans" />
    }
  `,
  styles: `
    h2 {
      margin: 0;
    }
  `,
})
export class ShopPlanForm {
  readonly #api = inject(PlatformApi);
  readonly #reading = inject(Reading);

  readonly shop = input.required<Shop>();
  readonly changed = output<Shop>();
  readonly given = output<void>();

  protected readonly plans = rxResource({ stream: () => this.#api.plans() });
  readonly #others = computed(() =>
    this.plans.hasValue()
      ? this.plans.value().items.filter(({ id }) => id !== this.shop().planId)
      : [],
  );
  protected readonly choices = computed<readonly Choice[]>(() =>
    this.#others().map(({ id, name, monthlyAmount, currency, offered }) => {
      const price = moneyText(monthlyAmount, currency, this.#reading.locale());
      return { value: id, label: `${name}, ${price} a month${offered ? '' : ', not on offer'}` };
    }),
  );

  protected readonly form = inject(NonNullableFormBuilder).group({
    planId: ['', Validators.required],
    note: ['', rulesFor('platform.changePlan', 'note')],
  });
  readonly #planId = toSignal(this.form.controls.planId.valueChanges, { initialValue: '' });
  protected readonly consequence = computed(() => {
    const plan = this.#others().find(({ id }) => id === this.#planId());
    return plan && planConsequence(this.shop(), plan);
  });
  protected readonly saving = submission(
    this.form,
    () => this.#api.changePlan(this.shop().id, this.form.getRawValue()),
    { done: (shop) => this.changed.emit(shop) },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }
}
