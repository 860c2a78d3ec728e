import { computed, inject, type Signal } from '@angular/core';
import { moneyText, percentText, Reading } from '@lib/ui';
import { type PriceBook } from '../price-book/price-book-api';

interface BookHints {
  readonly normalPerHour: string;
  readonly afterHoursPerHour: string;
  readonly tripAmount: string;
  readonly markupBasisPoints: string;
}

const unknown = 'As in the price book';

/** What the price book says where nothing else is agreed. Call it where injection is possible. */
export function bookHints(book: () => PriceBook | undefined): Signal<BookHints> {
  const reading = inject(Reading);
  const money = (amount: number) => moneyText(amount, reading.currency(), reading.locale());
  return computed(() => {
    const inForce = book();
    if (!inForce) {
      return {
        normalPerHour: unknown,
        afterHoursPerHour: unknown,
        tripAmount: unknown,
        markupBasisPoints: unknown,
      };
    }
    const trips = inForce.trips.map((trip) => trip.amount);
    const markups = inForce.markup.bands.map((band) => band.basisPoints);
    return {
      normalPerHour: `Price book: ${money(inForce.labour.normalPerHour)}`,
      afterHoursPerHour: `Price book: ${money(inForce.labour.afterHoursPerHour)}`,
      tripAmount: `Price book: ${span(trips, money)}`,
      markupBasisPoints: `Price book: ${span(markups, (points) => `${percentText(points)}\u00a0%`)}`,
    };
  });
}

function span(values: readonly number[], text: (value: number) => string): string {
  const least = Math.min(...values);
  const most = Math.max(...values);
  return least === most ? text(least) : `${text(least)} to ${text(most)}`;
}
