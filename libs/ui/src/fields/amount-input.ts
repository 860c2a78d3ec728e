import { Directive, inject, input } from '@angular/core';
import { amountField, amountFrom } from '../format/money';
import { Reading } from '../format/reading';
import { MeasureInput, measureProviders } from './measure-input';

/** Money as people write it, in minor units in the form: `<input matInput twAmount formControlName="unitCost" />`. */
@Directive({
  selector: 'input[twAmount]',
  providers: measureProviders(() => AmountInput),
})
export class AmountInput extends MeasureInput {
  readonly #reading = inject(Reading);
  /** Default: the currency of the shop the person works with. */
  readonly twAmount = input<string>('');

  protected override valueOf(text: string): number | undefined {
    return amountFrom(text, this.#currency());
  }

  protected override textOf(value: number): string {
    return amountField(value, this.#currency());
  }

  protected override expected(): string {
    return `Write an amount like ${amountField(1250, this.#currency())}.`;
  }

  #currency(): string {
    return this.twAmount() || this.#reading.currency();
  }
}
