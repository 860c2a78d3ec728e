import { computed, inject, type Signal } from '@angular/core';
import { currencySign, Reading } from '@lib/ui';

/** The sign of the shop's currency, for the heads of columns. Call it where injection is possible. */
export function moneySign(): Signal<string> {
  const reading = inject(Reading);
  return computed(() => currencySign(reading.currency(), reading.locale()));
}
