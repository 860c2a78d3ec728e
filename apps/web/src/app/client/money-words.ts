import { computed, inject, type Signal } from '@angular/core';
import { currencySign, moneyText } from '@lib/ui/format/money';
import { Reading } from '@lib/ui/format/reading';

/** Writes amounts into sentences, as the shop writes money. Call it where injection is possible. */
export function moneyWords(): (amount: number) => string {
  const reading = inject(Reading);
  return (amount) => moneyText(amount, reading.currency(), reading.locale());
}

/** The sign of the shop's currency, for the heads of columns. Call it where injection is possible. */
export function moneySign(): Signal<string> {
  const reading = inject(Reading);
  return computed(() => currencySign(reading.currency(), reading.locale()));
}
