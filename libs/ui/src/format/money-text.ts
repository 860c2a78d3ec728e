import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
} from '@angular/core';
import { moneyText } from './money';
import { Reading } from './reading';

/** An amount of money. In a table the head of the column carries the currency: say `bare` there. */
@Component({
  selector: 'tw-money',
  template: `{{ text() }}`,
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'tw-figures', '[class.tw-money--struck]': 'struck()' },
  styles: `
    :host {
      white-space: nowrap;
      text-align: end;
    }
    :host(.tw-money--struck) {
      color: var(--tw-soft);
      text-decoration: line-through;
    }
  `,
})
export class MoneyText {
  readonly #reading = inject(Reading);

  /** In minor units. */
  readonly amount = input.required<number>();
  /** Default: the currency of the shop the person works with. */
  readonly currency = input<string>();
  readonly bare = input(false, { transform: booleanAttribute });
  /** For the list value of a line that is not charged. */
  readonly struck = input(false, { transform: booleanAttribute });

  protected readonly text = computed(() =>
    moneyText(
      this.amount(),
      this.currency() ?? this.#reading.currency(),
      this.#reading.locale(),
      this.bare(),
    ),
  );
}
