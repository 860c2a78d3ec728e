import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { AmountField, type Choice, NumberField, SelectField } from '@lib/ui';
import { type BookForm } from './book-form';
import { type PriceBook } from './price-book-api';

const accessRules: readonly Choice<PriceBook['access']['bill']>[] = [
  { value: 'never', label: 'Are not billed' },
  { value: 'all', label: 'Are billed to the minute' },
  { value: 'beyond_allowance', label: 'Are billed beyond an allowance' },
];
const nothingFoundRules: readonly Choice<PriceBook['nothingFound']>[] = [
  { value: 'bill_minimum', label: 'Share of the trip, and testing up to the least labour' },
  { value: 'bill_trip_share_only', label: 'Share of the trip only' },
  { value: 'free', label: 'Nothing; the other machines share the trip' },
];

@Component({
  selector: 'tw-labour-section',
  imports: [AmountField, NumberField, ReactiveFormsModule, SelectField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let labour = book().controls.labour.controls;
    @let access = book().controls.access.controls;
    <h2>Labour</h2>
    <div class="tw-form">
      <div class="beside">
        <tw-amount-field label="An hour of work" [control]="labour.normalPerHour" />
        <tw-amount-field label="An hour after hours" [control]="labour.afterHoursPerHour" />
      </div>
      <div class="beside">
        <tw-number-field
          label="Least labour of a visit"
          unit="min"
          [control]="labour.minimumMinutes"
        />
        <tw-number-field
          label="Billed in steps of"
          unit="min"
          [control]="labour.incrementMinutes"
        />
      </div>
      <tw-select-field
        label="Extra minutes to reach a machine"
        [options]="accessRules"
        [control]="access.bill"
      />
      @if (access.bill.value === 'beyond_allowance') {
        <tw-number-field
          label="Allowance for each machine"
          unit="min"
          [control]="access.allowanceMinutes"
        />
      }
      <tw-select-field
        label="When nothing is found"
        [options]="nothingFoundRules"
        [control]="book().controls.nothingFound"
        hint="What the store pays for a machine that ran faultlessly when tested"
      />
    </div>
  `,
})
export class LabourSection {
  readonly book = input.required<BookForm>();
  protected readonly accessRules = accessRules;
  protected readonly nothingFoundRules = nothingFoundRules;
}
