import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { AmountField, ChoiceChips, NumberField, SelectField, TextField } from '@lib/ui';
import { energyChoices, kindChoices, type ModelControls } from './machine-fields';

/** The fields that machines of one model share. */
@Component({
  selector: 'tw-model-fields',
  imports: [AmountField, ChoiceChips, NumberField, ReactiveFormsModule, SelectField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="tw-form">
      <tw-select-field label="Kind" [options]="kinds" [control]="controls().kind" />
      <tw-choices
        legend="Heated or driven by"
        [choices]="energies"
        [formControl]="controls().energy"
      />
      <div class="beside">
        <tw-text-field label="Make" [control]="controls().make" />
        <tw-text-field label="Model" [control]="controls().model" />
      </div>
      <ng-content />
      <div class="beside">
        <tw-number-field label="Volts" unit="V" [control]="controls().volts" />
        <tw-number-field label="Amperes" unit="A" step="any" [control]="controls().amps" />
      </div>
      <div class="beside">
        <tw-amount-field label="Price of a cycle" [control]="controls().vendPrice" />
        <tw-number-field
          label="Cycles a day"
          step="any"
          [control]="controls().cyclesADay"
          hint="About; for what a day down costs"
        />
      </div>
      <div class="beside">
        <tw-text-field label="Built" type="date" [control]="controls().builtOn" />
        <tw-text-field label="Installed" type="date" [control]="controls().installedOn" />
        <tw-text-field
          label="Supplier warranty until"
          type="date"
          [control]="controls().supplierWarrantyUntil"
        />
      </div>
    </div>
  `,
})
export class ModelFields {
  readonly controls = input.required<ModelControls>();
  protected readonly kinds = kindChoices;
  protected readonly energies = energyChoices;
}
