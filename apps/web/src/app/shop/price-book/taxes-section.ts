import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { lineKinds } from '@lib/contracts/generated/values';
import { type Choice, choicesOf, PercentField, SelectField, TextField } from '@lib/ui';
import { type BookForm, rateForm } from './book-form';
import { type PriceBook } from './price-book-api';

const roundings: readonly Choice<PriceBook['taxes']['rounding']>[] = [
  { value: 'invoice', label: 'On the ticket’s total' },
  { value: 'line', label: 'Line by line' },
];

@Component({
  selector: 'tw-taxes-section',
  imports: [MatButton, PercentField, SelectField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let taxes = book().controls.taxes.controls;
    <h2>Taxes</h2>
    <p class="tw-soft">
      A rate at MN also holds at MN/Hennepin, and one without a place everywhere; where several
      hold, they add up. What has no rate is not taxed.
    </p>
    @for (rate of taxes.rates.controls; track rate) {
      <div class="entry">
        <tw-text-field label="Tax place" [control]="rate.controls.place" />
        <tw-select-field label="On" [options]="kindChoices" [control]="rate.controls.kind" />
        <tw-percent-field label="Rate" fine [control]="rate.controls.basisPoints" />
        <tw-text-field label="From" type="date" [control]="rate.controls.validFrom" />
        <button matButton type="button" (click)="remove($index)">
          Remove<span class="tw-unseen"> rate {{ $index + 1 }}</span>
        </button>
      </div>
    }
    <div class="tw-form">
      <div>
        <button matButton="outlined" type="button" (click)="add()">Add a rate</button>
      </div>
      <tw-select-field label="Rounded" [options]="roundings" [control]="taxes.rounding" />
    </div>
  `,
  styles: `
    .entry {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(100%, 9rem), 1fr));
      align-items: start;
      gap: 0.75rem;
      margin-block-end: 0.75rem;
    }
    .entry button {
      min-block-size: 3rem;
    }
  `,
})
export class TaxesSection {
  readonly book = input.required<BookForm>();
  /** The day a new rate begins on, unless another is written. */
  readonly validFrom = input.required<string>();

  protected readonly roundings = roundings;
  protected readonly kindChoices = choicesOf(lineKinds);

  protected add(): void {
    const { rates } = this.book().controls.taxes.controls;
    const last = rates.at(-1)?.value;
    rates.push(rateForm({ place: last?.place ?? '', validFrom: this.validFrom() }));
    rates.markAsDirty();
  }

  protected remove(index: number): void {
    const { rates } = this.book().controls.taxes.controls;
    rates.removeAt(index);
    rates.markAsDirty();
  }
}
