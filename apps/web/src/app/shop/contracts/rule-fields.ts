import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import {
  type FormControl,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  Validators,
} from '@angular/forms';
import { ChoiceChips, NumberField, SelectField, TextField } from '@lib/ui';
import { monthDays, patterns, positions, weekdays } from './rule-choices';
import { ruleOf, type RuleValues, usualRule, valuesOf } from './rule-values';

/** When rounds come, put together from words; the control holds the RFC 5545 rule. */
@Component({
  selector: 'tw-rule-fields',
  imports: [ChoiceChips, NumberField, ReactiveFormsModule, SelectField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div [formGroup]="form" class="fields">
      <tw-choices legend="Rounds come on" [choices]="patterns" formControlName="pattern" />
      @switch (pattern()) {
        @case ('weekday_of_month') {
          <div class="beside">
            <tw-select-field label="The" [options]="positions" [control]="form.controls.nth" />
            <tw-select-field
              label="Weekday"
              [options]="weekdays"
              [control]="form.controls.weekday"
            />
            <tw-number-field label="Every" [unit]="unit('month')" [control]="form.controls.every" />
          </div>
        }
        @case ('day_of_month') {
          <div class="beside">
            <tw-select-field label="Date" [options]="dates" [control]="form.controls.monthDay" />
            <tw-number-field label="Every" [unit]="unit('month')" [control]="form.controls.every" />
          </div>
        }
        @case ('weeks') {
          <tw-choices legend="On" many [choices]="weekdays" formControlName="weekdays" />
          <tw-number-field label="Every" [unit]="unit('week')" [control]="form.controls.every" />
        }
        @case ('own') {
          <tw-text-field
            label="Recurrence rule"
            [control]="form.controls.own"
            hint="As RFC 5545 has it: FREQ=YEARLY;BYMONTH=1,7;BYDAY=2WE"
          />
        }
      }
    </div>
  `,
  styles: `
    :host {
      display: block;
    }
    .fields {
      display: grid;
      gap: 0.75rem;
    }
    .beside {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(100%, 9rem), 1fr));
      gap: 0.75rem;
    }
  `,
})
export class RuleFields {
  readonly control = input.required<FormControl<string>>();

  protected readonly patterns = patterns;
  protected readonly positions = positions;
  protected readonly weekdays = weekdays;
  protected readonly dates = monthDays;
  protected readonly form = inject(NonNullableFormBuilder).group({
    pattern: [usualRule.pattern],
    every: [usualRule.every, [Validators.required, Validators.min(1), Validators.max(120)]],
    nth: [usualRule.nth],
    weekday: [usualRule.weekday],
    monthDay: [usualRule.monthDay],
    weekdays: [usualRule.weekdays],
    own: [usualRule.own],
  });
  protected readonly pattern = toSignal(this.form.controls.pattern.valueChanges, {
    initialValue: usualRule.pattern,
  });

  readonly #every = toSignal(this.form.controls.every.valueChanges, {
    initialValue: usualRule.every,
  });

  constructor() {
    effect((onCleanup) => {
      const control = this.control();
      const show = () => {
        // What the person is just putting together must not be put right under their hands.
        if (control.value && control.value === ruleOf(this.#values())) return;
        this.form.reset(valuesOf(control.value));
      };
      untracked(show);
      const following = control.valueChanges.subscribe(() => {
        if (!control.dirty) show();
      });
      onCleanup(() => following.unsubscribe());
    });
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      const control = this.control();
      const rule = ruleOf(this.#values());
      if (rule === control.value) return;
      if (this.form.dirty) control.markAsDirty();
      control.setValue(rule);
    });
  }

  protected unit(one: string): string {
    return this.#every() === 1 ? one : `${one}s`;
  }

  #values(): RuleValues {
    return this.form.getRawValue();
  }
}
