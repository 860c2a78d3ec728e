import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type FormControl } from '@angular/forms';
import { Reading } from '../format/reading';
import { DistanceInput } from './distance-input';
import { fieldParts } from './field-parts';
import { distanceUnit } from './measures';

/** A distance in the shop's miles or kilometres; metres in the form. */
@Component({
  selector: 'tw-distance-field',
  imports: [DistanceInput, fieldParts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <mat-form-field subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <input matInput class="num" twDistance [formControl]="control()" />
      <span matTextSuffix>&nbsp;{{ sign() }}</span>
      @if (hint(); as text) {
        <mat-hint>{{ text }}</mat-hint>
      }
      <mat-error><tw-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styleUrl: './field.scss',
})
export class DistanceField {
  readonly #reading = inject(Reading);

  readonly label = input.required<string>();
  readonly control = input.required<FormControl<number | null>>();
  readonly hint = input<string>();

  protected readonly sign = computed(() => distanceUnit(this.#reading.locale()).sign);
}
