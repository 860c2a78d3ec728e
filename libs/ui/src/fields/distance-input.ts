import { computed, Directive, inject } from '@angular/core';
import { Reading } from '../format/reading';
import { MeasureInput, measureProviders } from './measure-input';
import { distanceText, distanceUnit, metresFrom } from './measures';

/** A distance in miles or kilometres, as the shop reads it; in metres in the form. */
@Directive({
  selector: 'input[twDistance]',
  providers: measureProviders(() => DistanceInput),
})
export class DistanceInput extends MeasureInput {
  readonly #reading = inject(Reading);
  readonly #unit = computed(() => distanceUnit(this.#reading.locale()));

  protected override valueOf(text: string): number | undefined {
    return metresFrom(text, this.#unit());
  }

  protected override textOf(value: number): string {
    return distanceText(value, this.#unit());
  }

  protected override expected(): string {
    return 'Write a distance like 7.5.';
  }
}
