import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  Callout,
  CheckField,
  counted,
  EmptyNote,
  FormNotes,
  LoadNote,
  NumberField,
  PageHead,
  TextField,
} from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { type Plan, PlatformApi } from '../platform-api';

type Saved = Omit<Plan, 'shops'>;

/** Adds a plan, or changes one. */
@Component({
  selector: 'tw-plan-form',
  imports: [
    AmountField,
    Callout,
    CheckField,
    EmptyNote,
    FormNotes,
    LoadNote,
    MatButton,
    NumberField,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    TextField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './plan-form.html',
})
export class PlanForm implements HasChanges {
  readonly #api = inject(PlatformApi);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  /** Of the address; none for a new plan. */
  readonly planId = input<string>();

  protected readonly plans = rxResource({
    params: () => this.planId(),
    stream: () => this.#api.plans(),
  });
  protected readonly plan = computed(() =>
    this.plans.hasValue()
      ? this.plans.value().items.find(({ id }) => id === this.planId())
      : undefined,
  );
  protected readonly ready = computed(() => !this.planId() || this.plan() !== undefined);
  protected readonly heading = computed(() => {
    const plan = this.plan();
    return plan ? `Change ${plan.name}` : 'Add a plan';
  });

  protected readonly form = inject(NonNullableFormBuilder).group({
    code: [''],
    name: ['', rulesFor('platform.createPlan', 'name')],
    monthlyAmount: [null as number | null, rulesFor('platform.createPlan', 'monthlyAmount')],
    currency: ['USD', rulesFor('platform.createPlan', 'currency')],
    storeLimit: [null as number | null, rulesFor('platform.createPlan', 'storeLimit')],
    machineLimit: [null as number | null, rulesFor('platform.createPlan', 'machineLimit')],
    crewLimit: [null as number | null, rulesFor('platform.createPlan', 'crewLimit')],
    trialDays: [30 as number | null, rulesFor('platform.createPlan', 'trialDays')],
    graceDays: [14 as number | null, rulesFor('platform.createPlan', 'graceDays')],
    offered: [true],
  });
  readonly #currency = toSignal(this.form.controls.currency.valueChanges, { initialValue: 'USD' });
  /** Only a whole code is a currency; while it is typed, amounts are read as before. */
  protected readonly currency = computed<string>((): string =>
    /^[A-Z]{3}$/.test(this.#currency()) ? this.#currency() : 'USD',
  );

  protected readonly saving: Submission<Saved> = submission(this.form, () => this.#send(), {
    done: (plan) => this.#saved(plan),
    refused: (problem) => toldStale(problem, this.plans, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      const { code } = this.form.controls;
      code.setValidators(this.planId() ? [] : rulesFor('platform.createPlan', 'code'));
      code.updateValueAndValidity();
    });
    effect(() => {
      const plan = this.plan();
      if (plan && !this.form.dirty) this.form.reset(plan);
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected onIt({ shops }: Plan): string {
    return `${counted(shops, 'shop')} on it ${shops === 1 ? 'goes' : 'go'} on`;
  }

  #send() {
    const plan = this.plan();
    if (plan) {
      const { code: _, ...changed } = changedValues(this.form);
      return this.#api.editPlan(plan, changed as Partial<Saved>);
    }
    return this.#api.createPlan(this.form.getRawValue() as Saved);
  }

  #saved(plan: Saved): void {
    this.#messages.say(
      this.planId()
        ? `${plan.name} was changed.`
        : `${plan.name} is ${plan.offered ? 'on offer now' : 'there now, and not on offer'}.`,
    );
    void this.#router.navigate(['/platform/plans']);
  }
}
