import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Callout, type Choice, FormNotes, SectionHead, SelectField } from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { locales } from './locales';
import { type ShopSettings } from './settings-api';
import { SettingsPart } from './settings-part';

/** The shop's clock, currency, and how numbers and days are written. */
@Component({
  selector: 'tw-reading-form',
  imports: [Callout, FormNotes, MatButton, ReactiveFormsModule, SectionHead, SelectField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Clock, currency and writing" />
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="submitting.submit()">
      <tw-form-notes [notes]="submitting.notes()" />
      <tw-select-field
        label="Time zone"
        [options]="zones"
        [control]="form.controls.zone"
        hint="A trade day begins and ends on this clock"
      />
      <tw-select-field
        label="Numbers and days are written as in"
        [options]="locales"
        [control]="form.controls.locale"
      />
      @if (settings().currencyFixed) {
        <p class="tw-soft">
          The currency is {{ settings().currency }} for good: tickets stand in it.
        </p>
      } @else {
        <tw-select-field
          label="Currency"
          [options]="currencies"
          [control]="form.controls.currency"
        />
        @if (form.controls.currency.value !== settings().currency) {
          <tw-callout tone="waiting">
            The price book begins anew in {{ form.controls.currency.value }}, with prices to start
            with. Once a ticket is signed off, the currency is for good.
          </tw-callout>
        }
      }
      @if (mayChange()) {
        <div class="actions">
          <button
            matButton="filled"
            type="submit"
            [disabled]="submitting.busy()"
            disabledInteractive
          >
            Save clock and writing
          </button>
        </div>
      }
    </form>
  `,
})
export class ReadingForm extends SettingsPart {
  readonly #names = new Intl.DisplayNames(navigator.language, { type: 'currency' });

  protected readonly form = inject(NonNullableFormBuilder).group({
    zone: ['', rulesFor('shop.change', 'zone')],
    locale: ['', rulesFor('shop.change', 'locale')],
    currency: ['', rulesFor('shop.change', 'currency')],
  });
  protected readonly zones: readonly Choice[] = Intl.supportedValuesOf('timeZone').map((zone) => ({
    value: zone,
    label: zone.replaceAll('_', ' '),
  }));
  protected readonly locales = locales(navigator.language);
  protected readonly currencies: readonly Choice[] = Intl.supportedValuesOf('currency').map(
    (code) => ({ value: code, label: `${code}, ${this.#names.of(code) ?? code}` }),
  );

  protected readonly submitting = this.saving(
    this.form,
    () => changedValues(this.form),
    ({ zone }) => `Times are on the clock of ${zone.replaceAll('_', ' ')} from now on.`,
  );

  protected override valuesOf({ zone, locale, currency }: ShopSettings): object {
    return { zone, locale, currency };
  }
}
