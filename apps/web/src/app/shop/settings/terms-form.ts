import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  CheckField,
  type Choice,
  FormNotes,
  NumberField,
  PercentField,
  SectionHead,
  SelectField,
} from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { type ShopSettings } from './settings-api';
import { SettingsPart } from './settings-part';

const dayCounts: readonly Choice<ShopSettings['lateChargeDayCount']>[] = [
  { value: 'actual_365', label: 'Every day, of 365' },
  { value: '30_360', label: 'Months of 30 days, of 360' },
];

/** How a month is closed, until when statements are to be paid, and what being late costs. */
@Component({
  selector: 'tw-terms-form',
  imports: [
    CheckField,
    FormNotes,
    MatButton,
    NumberField,
    PercentField,
    ReactiveFormsModule,
    SectionHead,
    SelectField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Statements" sub="How a month is closed and paid." />
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="submitting.submit()">
      <tw-form-notes [notes]="submitting.notes()" />
      <tw-check-field
        label="Close each month by itself"
        [control]="form.controls.closeBySchedule"
        hint="Without it, a month is closed when somebody says so."
      />
      <div class="beside">
        <tw-number-field
          label="On day"
          [control]="form.controls.statementDay"
          hint="Of the next month, 1 to 28"
        />
        <tw-select-field label="At" [options]="hours" [control]="form.controls.statementHour" />
      </div>
      <tw-number-field
        label="Days to pay"
        unit="days"
        [control]="form.controls.termsDays"
        hint="A client can have other terms"
      />
      <div class="beside">
        <tw-percent-field
          label="Charge a year on what is overdue"
          [control]="form.controls.lateChargeBasisPoints"
          hint="0 for none"
        />
        @if (late()) {
          <tw-select-field
            label="Days are counted"
            [options]="dayCounts"
            [control]="form.controls.lateChargeDayCount"
          />
        }
      </div>
      @if (mayChange()) {
        <div class="actions">
          <button
            matButton="filled"
            type="submit"
            [disabled]="submitting.busy()"
            disabledInteractive
          >
            Save the terms
          </button>
        </div>
      }
    </form>
  `,
})
export class TermsForm extends SettingsPart {
  protected readonly form = inject(NonNullableFormBuilder).group({
    closeBySchedule: [false],
    statementDay: [
      1 as number | null,
      [Validators.required, ...rulesFor('shop.change', 'statementDay')],
    ],
    statementHour: ['6'],
    termsDays: [
      30 as number | null,
      [Validators.required, ...rulesFor('shop.change', 'termsDays')],
    ],
    lateChargeBasisPoints: [
      0 as number | null,
      [Validators.required, ...rulesFor('shop.change', 'lateChargeBasisPoints')],
    ],
    lateChargeDayCount: ['actual_365' as ShopSettings['lateChargeDayCount']],
  });
  protected readonly dayCounts = dayCounts;
  protected readonly hours: readonly Choice[] = Array.from({ length: 24 }, (_, hour) => ({
    value: String(hour),
    label: `${String(hour).padStart(2, '0')}:00`,
  }));
  protected readonly late = toSignal(this.form.controls.lateChargeBasisPoints.valueChanges);

  protected readonly submitting = this.saving(
    this.form,
    () => {
      const { statementDay, statementHour, termsDays, lateChargeBasisPoints, ...changed } =
        changedValues(this.form);
      return {
        ...changed,
        statementDay: statementDay ?? undefined,
        statementHour: statementHour === undefined ? undefined : Number(statementHour),
        termsDays: termsDays ?? undefined,
        lateChargeBasisPoints: lateChargeBasisPoints ?? undefined,
      };
    },
    ({ closeBySchedule, statementDay }) =>
      closeBySchedule
        ? `Each month is closed by itself on day ${statementDay} of the next.`
        : 'A month is closed when somebody says so.',
  );

  protected override valuesOf(settings: ShopSettings): object {
    return { ...settings, statementHour: String(settings.statementHour) };
  }
}
