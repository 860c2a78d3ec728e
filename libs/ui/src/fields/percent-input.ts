import { booleanAttribute, Directive, input } from '@angular/core';
import { MeasureInput, measureProviders } from './measure-input';
import { basisPointsFrom, percentText } from './measures';

/** A rate as people write it, "8.25", in basis points in the form. */
@Directive({
  selector: 'input[twPercent]',
  providers: measureProviders(() => PercentInput),
})
export class PercentInput extends MeasureInput {
  /** Takes parts of a basis point, as taxes have them: "8.875". */
  readonly fine = input(false, { transform: booleanAttribute });

  protected override valueOf(text: string): number | undefined {
    const points = basisPointsFrom(text);
    return this.fine() || Number.isInteger(points) ? points : undefined;
  }

  protected override textOf(value: number): string {
    return percentText(value);
  }

  protected override expected(): string {
    return this.fine() ? 'Write a rate like 8.875.' : 'Write a rate like 8.25.';
  }
}
