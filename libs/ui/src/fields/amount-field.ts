import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { MatPrefix } from '@angular/material/form-field';
import { currencySign } from '../format/money';
import { Reading } from '../format/reading';
import { AmountInput } from './amount-input';
import { fieldParts } from './field-parts';

/** An amount of money, with the sign of its currency. */
@Component({
  selector: 'tw-amount-field',
  imports: [AmountInput, fieldParts, MatPrefix],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <span matTextPrefix>{{ sign() }}&nbsp;</span>
      <input matInput class="num" [twAmount]="currency() ?? ''" [formControl]="control()" />
      @if (unit(); as text) {
        <span matTextSuffix>&nbsp;{{ text }}</span>
      }
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class AmountField {
  readonly #reading = inject(Reading);

  readonly label = input.required<string>();
  readonly control = input.required<FormControl<number | null>>();
  readonly currency = input<string>();
  readonly unit = input<string>();
  readonly hint = input<string>();

  protected readonly sign = computed(() =>
    currencySign(this.currency() ?? this.#reading.currency(), this.#reading.locale()),
  );
}
