import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { bearers, causes } from '@lib/contracts/generated/values';
import { AmountField, ChoiceChips, choicesOf, NumberField, SelectField, TextField } from '@lib/ui';
import { PartsApi } from '../parts/parts-api';
import { type BookForm, categoryForm } from './book-form';

/** What the shop promises, and what it wants to look at itself. */
@Component({
  selector: 'tw-warranty-section',
  imports: [
    AmountField,
    ChoiceChips,
    MatButton,
    NumberField,
    ReactiveFormsModule,
    SelectField,
    TextField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let warranty = book().controls.warranty.controls;
    <h2>Shop warranty</h2>
    <div class="tw-form">
      <div class="beside">
        <tw-number-field label="On labour" unit="days" [control]="warranty.labourDays" />
        <tw-number-field label="On parts" unit="days" [control]="warranty.partDays" />
        <tw-number-field
          label="Same fault is ours for"
          unit="days"
          [control]="warranty.callbackDays"
        />
      </div>
      <h3>Longer or shorter for a class of parts</h3>
      @for (entry of warranty.partDaysByCategory.controls; track entry) {
        <div class="beside">
          <tw-text-field
            label="Class of parts"
            [suggestions]="categories()"
            [control]="entry.controls.category"
          />
          <tw-number-field label="Warranted" unit="days" [control]="entry.controls.days" />
          <button matButton type="button" (click)="remove($index)">
            Remove<span class="tw-unseen"> {{ entry.controls.category.value }}</span>
          </button>
        </div>
      }
      <div>
        <button matButton="outlined" type="button" (click)="add()">Add a class of parts</button>
      </div>
      <tw-choices
        legend="The store bears it even within warranty when the cause is"
        many
        [choices]="causeChoices"
        [formControl]="warranty.excludedCauses"
      />
      <tw-select-field
        label="Nothing found is borne by"
        [options]="bearerChoices"
        [control]="warranty.nothingFoundBearer"
      />
      <tw-amount-field
        label="The owner decides above"
        [control]="warranty.confirmAbove"
        hint="A line the store does not bear waits for the owner from this value on"
      />
    </div>
  `,
})
export class WarrantySection {
  readonly #parts = inject(PartsApi);
  readonly book = input.required<BookForm>();

  readonly #inUse = rxResource({ stream: () => this.#parts.categories() });
  protected readonly categories = computed(() =>
    this.#inUse.hasValue() ? this.#inUse.value().items : [],
  );
  protected readonly causeChoices = choicesOf(causes);
  protected readonly bearerChoices = choicesOf(bearers);

  protected add(): void {
    const { partDaysByCategory } = this.book().controls.warranty.controls;
    partDaysByCategory.push(categoryForm());
    partDaysByCategory.markAsDirty();
  }

  protected remove(index: number): void {
    const { partDaysByCategory } = this.book().controls.warranty.controls;
    partDaysByCategory.removeAt(index);
    partDaysByCategory.markAsDirty();
  }
}
