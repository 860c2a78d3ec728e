import { inject } from '@angular/core';
import { moneyText, Reading } from '@lib/ui';

/** Writes amounts into sentences, as the shop writes money. Call it where injection is possible. */
export function moneyWords(): (amount: number) => string {
  const reading = inject(Reading);
  return (amount) => moneyText(amount, reading.currency(), reading.locale());
}
