import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { AmountField, type Choice, moneyText, PercentField, Reading, SelectField } from '@lib/ui';
import { map, startWith, switchMap } from 'rxjs';
import { bandForm, type BookForm, bookOf, partPriceForm } from './book-form';
import { soldFor } from './sold-for';
import { PartPicker } from '../parts/part-picker';
import { type Part } from '../parts/parts-api';
import { type PriceBook } from './price-book-api';

const roundings: readonly Choice<PriceBook['markup']['rounding']>[] = [
  { value: 'up', label: 'Up to the next' },
  { value: 'nearest', label: 'To the nearest' },
];

/** What parts are sold for: markup by what they cost, and the prices of single parts. */
@Component({
  selector: 'tw-markup-section',
  imports: [AmountField, MatButton, PartPicker, PercentField, SelectField],
  templateUrl: './markup-section.html',
  styles: `
    .entry {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(100%, 10rem), 1fr));
      align-items: start;
      gap: 0.75rem;
      margin-block-end: 0.5rem;
    }
    .entry p,
    .entry button {
      margin: 0;
      min-block-size: 3rem;
    }
    .entry p {
      display: flex;
      align-items: center;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MarkupSection {
  readonly #reading = inject(Reading);
  readonly book = input.required<BookForm>();
  /** What the parts are called that have a price of their own. */
  readonly partNames = input.required<ReadonlyMap<string, string>>();

  protected readonly roundings = roundings;
  readonly #picked = signal<ReadonlyMap<string, string>>(new Map());
  readonly #now = toSignal(
    toObservable(this.book).pipe(
      switchMap((book) =>
        book.valueChanges.pipe(
          startWith(null),
          map(() => bookOf(book)),
        ),
      ),
    ),
  );

  /** What a part of the band's own cost is sold for, to show what a rate comes to. */
  protected readonly examples = computed(() => {
    const book = this.#now();
    if (!book) return [];
    const [locale, currency] = [this.#reading.locale(), this.#reading.currency()];
    return book.markup.bands.map((band) => {
      // A cost of nothing shows nothing: the first band is shown at the cost of ten steps.
      const cost = band.fromUnitCost || book.markup.step * 10;
      const sold = soldFor(cost, book);
      if (sold === undefined) return '';
      return `${moneyText(cost, currency, locale)} is sold for ${moneyText(sold, currency, locale)}`;
    });
  });

  protected nameOf(partId: string): string {
    return this.#picked().get(partId) ?? this.partNames().get(partId) ?? 'A part';
  }

  protected addBand(): void {
    this.book().controls.markup.controls.bands.push(bandForm());
    this.#changed();
  }

  protected removeBand(index: number): void {
    this.book().controls.markup.controls.bands.removeAt(index);
    this.#changed();
  }

  protected addPrice(part: Part): void {
    const { partPrices } = this.book().controls;
    if (partPrices.value.some(({ partId }) => partId === part.id)) return;
    this.#picked.update((known) => new Map(known).set(part.id, `${part.number}, ${part.name}`));
    partPrices.push(partPriceForm({ partId: part.id, unitPrice: part.fixedPrice ?? 0 }));
    this.#changed();
  }

  protected removePrice(index: number): void {
    this.book().controls.partPrices.removeAt(index);
    this.#changed();
  }

  #changed(): void {
    this.book().markAsDirty();
  }
}
