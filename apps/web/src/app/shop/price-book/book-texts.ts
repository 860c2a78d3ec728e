import { computed, inject, type Signal } from '@angular/core';
import { dayText, distanceText, distanceUnit, moneyText, Reading } from '@lib/ui';
import { type BookTexts } from './book-lines';

/** Amounts and distances as the shop writes them. Call it where injection is possible. */
export function bookTexts(parts: () => ReadonlyMap<string, string>): Signal<BookTexts> {
  const reading = inject(Reading);
  return computed(() => {
    const unit = distanceUnit(reading.locale());
    const names = parts();
    return {
      money: (amount) => moneyText(amount, reading.currency(), reading.locale()),
      distance: (metres) => `${distanceText(metres, unit)} ${unit.sign}`,
      day: (day) => dayText(day, reading.locale()),
      part: (partId) => names.get(partId) ?? 'A part',
    };
  });
}
